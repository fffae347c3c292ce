import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '@/components/Button';
import { Panel } from '@/components/Panel';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { StudyTable } from '@/features/studies/StudyTable';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { studyQueries } from '@/queries/studies';

export function StudiesPage() {
  useTitle('Studies');
  const actor = useActor();
  const { data: studies, error, refetch } = useQuery(studyQueries.all());
  const mayOpen = studyPolicy.open(actor) === null;
  const open = mayOpen && (
    <LinkButton to="/studies/new" look="primary">
      Open a study
    </LinkButton>
  );
  return (
    <main className="page">
      <div className="flex items-center gap-4">
        <h1 className="text-6 flex-1">Studies</h1>
        {open}
      </div>
      {error && <ErrorState error={error} onRetry={() => void refetch()} />}
      {!studies && !error && <LoadingState what="Reading the studies." />}
      {studies?.length === 0 && (
        <EmptyState title="No study yet" action={mayOpen && open}>
          A study asks one question of one sample. It starts with a registered sample and a Brief.
        </EmptyState>
      )}
      {studies && studies.length > 0 && (
        <Panel name="All studies" fact={`${studies.length}, last changed first`} isFlush>
          <StudyTable studies={studies} />
        </Panel>
      )}
    </main>
  );
}
