import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { EmptyState, ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { NewStudyForm } from '@/features/studies/NewStudyForm';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { sampleQueries } from '@/queries/samples';

export function NewStudyPage() {
  useTitle('Open a study');
  const why = studyPolicy.open(useActor());
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const { data: samples, error } = useQuery({ ...sampleQueries.all(), enabled: why === null });
  const wanted = Number(search.get('sample'));
  return (
    <main className="page">
      <h1 className="text-6">Open a study</h1>
      {why !== null && (
        <ForbiddenState why={why} action={<LinkButton to="/">To the studies</LinkButton>} />
      )}
      {error && <ErrorState error={error} />}
      {why === null && !samples && !error && <LoadingState what="Reading the samples." />}
      {samples?.length === 0 && (
        <EmptyState
          title="There is no sample yet"
          action={
            <LinkButton to="/samples/new" look="primary">
              Register a sample
            </LinkButton>
          }
        >
          A study needs a sample to ask: register what has arrived first.
        </EmptyState>
      )}
      {samples && samples.length > 0 && (
        <NewStudyForm
          samples={samples}
          sampleId={Number.isSafeInteger(wanted) && wanted > 0 ? wanted : null}
          onOpened={(studyId) => void navigate(`/studies/${studyId}/brief`)}
        />
      )}
    </main>
  );
}
