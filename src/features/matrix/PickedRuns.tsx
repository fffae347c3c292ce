import type { DesignAnswer } from '@shared/schemas/calc/design';
import type { PlanInput } from '@shared/schemas/matrix';
import { setPointKeySchema, setPointOf } from '@shared/schemas/setPoint';
import { DataTable, type Column } from '@/components/DataTable';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { formatPlain } from '@/lib/format';

type Run = DesignAnswer['runs'][number];

function columnsOf(runs: readonly Run[]): Column<Run>[] {
  const keys = Object.keys(runs[0]?.settings ?? {});
  return [
    { key: 'order', header: 'Run', numeric: true, cell: ({ runOrder }) => runOrder },
    {
      key: 'standard',
      header: 'Standard order',
      numeric: true,
      cell: ({ standardOrder }) => standardOrder,
    },
    { key: 'type', header: 'Point', cell: ({ pointType }) => pointType },
    ...keys.map((key): Column<Run> => {
      const setPoint = setPointOf(setPointKeySchema.parse(key));
      return {
        key,
        header: setPoint.name,
        unit: setPoint.unit,
        numeric: true,
        cell: ({ settings }) => formatPlain(Number(settings[key])),
      };
    }),
  ];
}

interface PickedRunsProps {
  readonly name: string;
  readonly plan: PlanInput;
  readonly design: DesignAnswer;
}

/** The runs of the picked plan in the order in which they will be done. */
export function PickedRuns({ name, plan, design }: PickedRunsProps) {
  const { snapLoss } = design.properties;
  return (
    <Panel
      name={`${name}: ${design.runs.length} runs`}
      fact={`random order from seed ${plan.seed}`}
      isFlush
    >
      {design.warnings.map(({ code, message }) => (
        <Notice key={code} tone="caution">
          {message}
        </Notice>
      ))}
      {snapLoss !== null && snapLoss > 0.005 && (
        <Notice>
          Snapping to the rig’s steps costs {(100 * snapLoss).toFixed(1)} % of D-efficiency.
        </Notice>
      )}
      <DataTable
        caption={`Runs of ${name}, in run order`}
        columns={columnsOf(design.runs)}
        rows={design.runs}
        rowKey={({ runOrder }) => runOrder}
      />
    </Panel>
  );
}
