import { customerPolicy } from '@shared/policies/lab';
import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '@/components/Button';
import { Panel } from '@/components/Panel';
import { EmptyState, ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { useActor } from '@/hooks/useActor';
import { useTitle } from '@/hooks/useTitle';
import { formatDay, formatMass } from '@/lib/format';
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
        <Panel
          key={sample.id}
          name={sample.name}
          fact={`${sample.code} · ${sample.material} · ${formatMass(sample.receivedMassG)} received ${formatDay(sample.receivedOn)}`}
        >
          {sample.studies.length === 0 ? (
            <p className="text-ink-3">Received; no work has started on it yet.</p>
          ) : (
            <ul className="grid gap-4">
              {sample.studies.map((study) => (
                <li key={study.code} className="grid gap-1">
                  <span className="font-mark">{study.title}</span>
                  <span className="text-2 text-ink-2">
                    Stage {study.stageNumber} of 6. {study.words}
                  </span>
                  <progress
                    className="w-full max-w-form"
                    max={6}
                    value={study.stageNumber}
                    aria-label={`Stage ${study.stageNumber} of 6`}
                  />
                </li>
              ))}
            </ul>
          )}
        </Panel>
      ))}
    </main>
  );
}
