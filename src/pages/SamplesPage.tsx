import { samplePolicy } from '@shared/policies/lab';
import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '@/components/Button';
import { Panel } from '@/components/Panel';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { SampleTable } from '@/features/samples/SampleTable';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { sampleQueries } from '@/queries/samples';

export function SamplesPage() {
  useTitle('Samples');
  const mayRegister = samplePolicy.register(useActor()) === null;
  const { data: samples, error, refetch } = useQuery(sampleQueries.all());
  const registerButton = mayRegister && (
    <LinkButton to="/samples/new" look="primary">
      Register a sample
    </LinkButton>
  );
  return (
    <main className="page">
      <div className="flex items-center gap-4">
        <h1 className="text-6 flex-1">Samples</h1>
        {registerButton}
      </div>
      {error && <ErrorState error={error} onRetry={() => void refetch()} />}
      {!samples && !error && <LoadingState what="Reading the samples." />}
      {samples?.length === 0 && (
        <EmptyState title="No sample yet" action={registerButton}>
          What arrives is registered with its mass; every gram it loses afterwards has its line in
          the ledger.
        </EmptyState>
      )}
      {samples && samples.length > 0 && (
        <Panel name="Sample store" fact={`${samples.length}, newest first`} isFlush>
          <SampleTable samples={samples} />
        </Panel>
      )}
    </main>
  );
}
