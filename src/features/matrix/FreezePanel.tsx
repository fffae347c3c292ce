import type { DesignAnswer } from '@shared/schemas/calc/design';
import type { PlanInput } from '@shared/schemas/matrix';
import { setPointKeySchema, setPointOf } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { DataTable, type Column } from '@/components/DataTable';
import { Dialog } from '@/components/Dialog';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { newKey } from '@/lib/api';
import { formatMass, formatPlain } from '@/lib/format';
import { useFreezeMatrix } from '@/queries/studies';

type Run = DesignAnswer['runs'][number];

interface FreezePanelProps {
  readonly study: StudyJson;
  readonly name: string;
  readonly design: DesignAnswer;
  readonly plan: PlanInput;
  readonly why: string | null;
  readonly isReady: boolean;
  readonly onFrozen: () => void;
}

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

/** The run list of the picked plan, and the step that cannot be taken back. */
export function FreezePanel(props: FreezePanelProps) {
  const { study, name, design, plan, why, isReady, onFrozen } = props;
  const [isAsking, setIsAsking] = useState(false);
  const [key] = useState(newKey);
  const freeze = useFreezeMatrix(study.id);
  const runs = design.runs.length;
  const massG = runs * (study.brief?.batchMassG ?? 0);
  const onFreeze = async () => {
    try {
      await freeze.mutateAsync({ plan, version: study.version, key });
      onFrozen();
    } catch {
      // shown below, from the mutation
      setIsAsking(false);
    }
  };
  return (
    <Panel
      name={`${name}: ${runs} runs`}
      fact={`random order from seed ${plan.seed}`}
      isFlush
      control={
        why === null && (
          <Button look="primary" disabled={!isReady} onClick={() => setIsAsking(true)}>
            Freeze {runs} runs
          </Button>
        )
      }
    >
      {why !== null && <Notice>{why}</Notice>}
      {freeze.error && <Notice tone="stop">{freeze.error.message}</Notice>}
      {design.warnings.map(({ code, message }) => (
        <Notice key={code} tone="caution">
          {message}
        </Notice>
      ))}
      {design.properties.snapLoss !== null && design.properties.snapLoss > 0.005 && (
        <Notice>
          Snapping to the rig’s steps costs {(100 * design.properties.snapLoss).toFixed(1)} % of
          D-efficiency.
        </Notice>
      )}
      <DataTable
        caption={`Runs of ${name}, in run order`}
        columns={columnsOf(design.runs)}
        rows={design.runs}
        rowKey={({ runOrder }) => runOrder}
      />
      <Dialog title={`Freeze ${runs} runs?`} isOpen={isAsking} onClose={() => setIsAsking(false)}>
        <p>
          The Brief no longer changes after this, and {formatMass(massG)} of {study.sample.name} are
          reserved. Runs can be added later, in a block of their own.
        </p>
        <div className="flex gap-2">
          <Button
            look="primary"
            isBusy={freeze.isPending}
            onClick={() => {
              void onFreeze();
            }}
          >
            Freeze the matrix
          </Button>
          <Button onClick={() => setIsAsking(false)}>Not yet</Button>
        </div>
      </Dialog>
    </Panel>
  );
}
