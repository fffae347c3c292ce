import { samplePolicy } from '@shared/policies/lab';
import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { LedgerBar } from '@/components/LedgerBar';
import { Panel } from '@/components/Panel';
import { PracticeTag } from '@/components/PracticeTag';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { LedgerTable } from '@/features/samples/LedgerTable';
import { StockForm } from '@/features/samples/StockForm';
import { useActor } from '@/hooks/useActor';
import { useNumberParam } from '@/hooks/useNumberParam';
import { useTitle } from '@/hooks/useTitle';
import { formatDay, formatMass, formatPlain } from '@/lib/format';
import { sampleQueries } from '@/queries/samples';

export function SamplePage() {
  const sampleId = useNumberParam('sampleId');
  const actor = useActor();
  const {
    data: sample,
    error,
    refetch,
  } = useQuery({
    ...sampleQueries.one(sampleId),
    enabled: Number.isFinite(sampleId),
  });
  useTitle(sample?.name ?? 'Sample');
  if (!Number.isFinite(sampleId))
    return (
      <main className="page">
        <EmptyState title="There is no such sample">The address may be mistyped.</EmptyState>
      </main>
    );
  if (error)
    return (
      <main className="page">
        <ErrorState error={error} onRetry={() => void refetch()} />
      </main>
    );
  if (!sample)
    return (
      <main className="page">
        <LoadingState what="Reading the sample." />
      </main>
    );
  const { stock } = sample;
  const mayEnter = samplePolicy.enterStock(actor) === null;
  const mayOpen = studyPolicy.open(actor) === null;
  return (
    <main className="page desk:grid-cols-[minmax(0,1.4fr)_minmax(0,1fr)]">
      <div className="col-span-full flex flex-wrap items-center gap-4">
        <div className="flex-1">
          <h1 className="text-6">{sample.name}</h1>
          <p className="text-2 text-ink-3">
            {sample.code} · {sample.material} ·{' '}
            {sample.customer ? `from ${sample.customer.name}` : 'the lab’s own'} · received{' '}
            {formatDay(sample.receivedOn)}
            {sample.feedFromMm !== null && sample.feedToMm !== null
              ? ` · feed ${formatPlain(sample.feedFromMm)}–${formatPlain(sample.feedToMm)} mm`
              : ''}{' '}
            {sample.isSimulated && <PracticeTag />}
          </p>
        </div>
        {mayOpen && (
          <LinkButton to={`/studies/new?sample=${sample.id}`} look="primary">
            Open a study on it
          </LinkButton>
        )}
      </div>
      <Panel name="Ledger" fact={`${formatMass(stock.leftG)} left`} isFlush>
        <LedgerTable entries={sample.ledger} />
      </Panel>
      <div className="grid gap-4">
        <Panel name="Budget" fact={`${formatMass(stock.receivedG)} received`}>
          <LedgerBar
            usedG={stock.usedG}
            lostG={stock.lostG + stock.returnedG}
            reservedG={stock.reservedG}
            leftG={stock.leftG}
          />
        </Panel>
        <Panel name="Studies on it">
          <ul className="grid gap-2">
            {sample.studies.map(({ id, code, title }) => (
              <li key={id}>
                <span className="mono text-2">{code}</span>{' '}
                <Link className="link" to={`/studies/${id}`}>
                  {title}
                </Link>
              </li>
            ))}
            {sample.studies.length === 0 && <li className="text-ink-3">None yet.</li>}
          </ul>
        </Panel>
        {sample.description !== '' && (
          <Panel name="Description">
            <p>{sample.description}</p>
          </Panel>
        )}
        {mayEnter && (
          <Panel name="Correct the ledger">
            <StockForm sampleId={sample.id} />
          </Panel>
        )}
      </div>
    </main>
  );
}
