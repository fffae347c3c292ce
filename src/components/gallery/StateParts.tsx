import { useState } from 'react';
import { useSort } from '@/hooks/useSort';
import { formatNumber } from '@/lib/format';
import { Button } from '../Button';
import { DataTable, type Column } from '../DataTable';
import { EmptyState, ForbiddenState } from '../EmptyState';
import { ErrorState } from '../ErrorState';
import { LoadingState } from '../LoadingState';
import { Notice } from '../Notice';
import { Panel } from '../Panel';

interface Coefficient {
  readonly term: string;
  readonly estimate: number | null;
  readonly error: number | null;
}

const ROWS: readonly Coefficient[] = [
  { term: 'Intercept', estimate: 81.73, error: 0.72 },
  { term: 'Voltage', estimate: 6.93, error: 0.63 },
  { term: 'Gap', estimate: -1.21, error: 0.73 },
  { term: 'Gap × pulses', estimate: null, error: null },
];

const COLUMNS: readonly Column<Coefficient>[] = [
  { key: 'term', header: 'Term', cell: ({ term }) => term, sortValue: ({ term }) => term },
  {
    key: 'estimate',
    header: 'Estimate',
    unit: 'points',
    numeric: true,
    cell: ({ estimate }) => formatNumber(estimate, 2),
    sortValue: ({ estimate }) => estimate,
  },
  { key: 'error', header: '± SE', numeric: true, cell: ({ error }) => formatNumber(error, 2) },
];

function Tables() {
  const sort = useSort();
  const [key, setKey] = useState<string | null>('Voltage');
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <Panel name="Coefficients" fact="coded −1 to +1, 95 %" isFlush>
        <DataTable
          caption="Coefficients"
          columns={COLUMNS}
          rows={ROWS}
          rowKey={({ term }) => term}
          sort={sort}
          picked={{ key, onPicked: ({ term }) => setKey(term) }}
        />
      </Panel>
      <Panel name="Runs" isFlush>
        <DataTable
          caption="Runs"
          columns={COLUMNS}
          rows={[]}
          rowKey={({ term }) => term}
          whenEmpty="No run is recorded yet."
        />
      </Panel>
    </div>
  );
}

function States() {
  const nothing = () => undefined;
  return (
    <div className="grid gap-4 sm:grid-cols-2 lg:grid-cols-4">
      <Panel name="Empty" isFlush>
        <EmptyState title="No runs yet" action={<Button variant="primary">Open run 1</Button>}>
          The matrix is frozen with 21 runs. The first run sheet is ready.
        </EmptyState>
      </Panel>
      <Panel name="Loading" isFlush>
        <LoadingState
          label="Looking at every setting"
          progress={{ done: 4210, total: 17_093 }}
          onStop={nothing}
        />
      </Panel>
      <Panel name="Error" isFlush>
        <ErrorState claim="Run 16 was not saved." onRetry={nothing}>
          The server did not answer for 20 s. Your 14 masses are kept on this tablet.
        </ErrorState>
      </Panel>
      <Panel name="Forbidden" isFlush>
        <ForbiddenState title="Signing is for leads" action={<Button>Back to the bench</Button>}>
          You are signed in as operator. Ines Hallworth can sign this study, or change your roles.
        </ForbiddenState>
      </Panel>
    </div>
  );
}

export function StateParts() {
  return (
    <div className="grid gap-4">
      <States />
      <Tables />
      <div>
        <Notice>Fitted on actual settings; set-points would change no coefficient by 0.1.</Notice>
        <Notice tone="caution" claim="Prediction beyond the ranges.">
          185 kV lies 5 kV above the highest run; the interval is a guess there.
        </Notice>
        <Notice tone="voltage" claim="High voltage and stored charge.">
          After a stop: wait, discharge, earth, leave the stick on, then reach in.
        </Notice>
        <Notice
          tone="stop"
          claim="Run 16 was not saved."
          action={<Button size="small">Try again</Button>}
        >
          The server did not answer.
        </Notice>
      </div>
    </div>
  );
}
