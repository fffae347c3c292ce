import { customerPolicy } from '@shared/policies/lab';
import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '@/components/Button';
import { EmptyState, ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { CustomerSample } from '@/features/samples/CustomerSample';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { sampleQueries } from '@/queries/samples';

export function MySamplesPage() {
  useTitle('My samples');
  const why = customerPolicy.readOwnSamples(useActor());
  const {
    data: samples,
    error,
    refetch,
  } = useQuery({
    ...sampleQueries.mine(),
    enabled: why === null,
  });
  return (
    <main className="page">
      <h1 className="text-6">My samples</h1>
      {why !== null && (
        <ForbiddenState why={why} action={<LinkButton to="/">To the studies</LinkButton>} />
      )}
      {error && <ErrorState error={error} onRetry={() => void refetch()} />}
      {why === null && !samples && !error && <LoadingState what="Reading your samples." />}
      {samples?.length === 0 && (
        <EmptyState title="Nothing of yours is here yet">
          As soon as the lab has registered what you sent, it stands here with how far the work is.
        </EmptyState>
      )}
      {samples?.map((sample) => (
        <CustomerSample key={sample.id} sample={sample} />
      ))}
    </main>
  );
}
