import { samplePolicy } from '@shared/policies/lab';
import { useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { SampleForm } from '@/features/samples/SampleForm';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { labQueries } from '@/queries/lab';

export function NewSamplePage() {
  useTitle('Register a sample');
  const why = samplePolicy.register(useActor());
  const navigate = useNavigate();
  const { data: customers, error } = useQuery({ ...labQueries.customers(), enabled: why === null });
  return (
    <main className="page">
      <h1 className="text-6">Register a sample</h1>
      {why !== null && (
        <ForbiddenState why={why} action={<LinkButton to="/samples">To the samples</LinkButton>} />
      )}
      {error && <ErrorState error={error} />}
      {why === null && !customers && !error && <LoadingState what="Reading the customers." />}
      {customers && (
        <SampleForm
          customers={customers}
          onRegistered={(sampleId) => void navigate(`/samples/${sampleId}`)}
        />
      )}
    </main>
  );
}
