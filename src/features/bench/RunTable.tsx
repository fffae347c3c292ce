import type { RunJson } from '@shared/schemas/run';
import { SET_POINTS } from '@shared/schemas/setPoint';
import type { BriefJson } from '@shared/schemas/study';
import { Link } from 'react-router-dom';
import { DataTable, type Column } from '@/components/DataTable';
import { decimalsFor, formatNumber, formatPlain } from '@/lib/format';

interface RunTableProps {
  readonly studyId: number;
  readonly brief: BriefJson;
  readonly runs: readonly RunJson[];
}

const STATES = { planned: 'open', recorded: 'done', void: 'void' } as const;

/** All runs in run order, with what follows from their masses. */
export function RunTable({ studyId, brief, runs }: RunTableProps) {
  const columns: Column<RunJson>[] = [
    {
      key: 'number',
      header: 'Run',
      numeric: true,
      cell: ({ id, number }) => (
        <Link className="link" to={`/studies/${studyId}/bench/${id}`}>
          {number}
        </Link>
      ),
    },
    { key: 'block', header: 'Block', numeric: true, cell: ({ block }) => block },
    ...SET_POINTS.map(({ key, symbol, unit }): Column<RunJson> => ({
      key,
      header: symbol,
      unit,
      numeric: true,
      cell: ({ settings }) => formatPlain(settings[key]),
    })),
    ...brief.responses.map(({ key, name, unit }): Column<RunJson> => ({
      key: `response ${key}`,
      header: name,
      unit,
      numeric: true,
      cell: ({ results }) => {
        const value = results[key] ?? null;
        return formatNumber(value, decimalsFor(value));
      },
    })),
    {
      key: 'treatment',
      header: 'Treatment loss, %',
      numeric: true,
      cell: ({ balances }) => formatNumber(balances.treatment?.lossPercent, 2),
    },
    {
      key: 'sieving',
      header: 'Sieving loss, %',
      numeric: true,
      cell: ({ balances }) => formatNumber(balances.sieving?.lossPercent, 2),
    },
    {
      key: 'state',
      header: 'State',
      isWordy: true,
      cell: ({ status, voidReason }) =>
        voidReason === null ? STATES[status] : `void: ${voidReason}`,
    },
  ];
  return (
    <DataTable
      caption="Runs in run order"
      columns={columns}
      rows={runs}
      rowKey={({ id }) => id}
      rowClass={({ status }) => status === 'void' && 'faint'}
    />
  );
}
