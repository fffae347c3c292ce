import type { RunJson } from '@shared/schemas/run';
import { SET_POINTS } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { DataTable, type Column } from '@/components/DataTable';
import { Panel } from '@/components/Panel';
import { formatMoment, formatPlain } from '@/lib/format';

interface FrozenMatrixProps {
  readonly matrix: NonNullable<StudyJson['matrix']>;
  readonly runs: readonly RunJson[];
}

const columns: readonly Column<RunJson>[] = [
  { key: 'number', header: 'Run', numeric: true, cell: ({ number }) => number },
  { key: 'block', header: 'Block', numeric: true, cell: ({ block }) => block },
  { key: 'purpose', header: 'Purpose', cell: ({ purpose }) => purpose },
  ...SET_POINTS.map(({ key, name, unit }): Column<RunJson> => ({
    key,
    header: name,
    unit,
    numeric: true,
    cell: ({ settings }) => formatPlain(settings[key]),
  })),
  { key: 'status', header: 'State', cell: ({ status }) => status },
];

export function FrozenMatrix({ matrix, runs }: FrozenMatrixProps) {
  return (
    <Panel
      name={`${matrix.runCount} runs, frozen`}
      fact={`by ${matrix.frozenBy.name}, ${formatMoment(matrix.frozenAt)}; seed ${matrix.seed}`}
      isFlush
    >
      <DataTable
        caption="Runs of the study in run order"
        columns={columns}
        rows={runs}
        rowKey={({ id }) => id}
        rowClass={({ status }) => status === 'void' && 'faint'}
      />
    </Panel>
  );
}
