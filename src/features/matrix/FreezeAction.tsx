import type { StudyJson } from '@shared/schemas/study';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { Dialog } from '@/components/Dialog';
import { Notice } from '@/components/Notice';
import { newKey } from '@/lib/api';
import { formatMass } from '@/lib/format';
import { useFreezeMatrix } from '@/queries/studies';
import type { Plans } from './usePlans';

interface FreezeActionProps {
  readonly study: StudyJson;
  readonly plans: Plans;
  readonly onFrozen: () => void;
}

/** The button of the page, and the question before a step that cannot be taken back. */
export function FreezeAction({ study, plans, onFrozen }: FreezeActionProps) {
  const [isAsking, setIsAsking] = useState(false);
  const [key] = useState(newKey);
  const freeze = useFreezeMatrix(study.id);
  const { picked, isReady } = plans;
  if (!picked?.design)
    return <span className="text-2 text-ink-3">Pick a plan; then it can be frozen.</span>;
  const runs = picked.design.runs.length;
  const onFreeze = async () => {
    try {
      await freeze.mutateAsync({ plan: picked.plan, version: study.version, key });
      onFrozen();
    } catch {
      // shown in the dialog, from the mutation
    }
  };
  return (
    <>
      <Button look="primary" disabled={!isReady} onClick={() => setIsAsking(true)}>
        Freeze {runs} runs
      </Button>
      <Dialog title={`Freeze ${runs} runs?`} isOpen={isAsking} onClose={() => setIsAsking(false)}>
        <p>
          {picked.choice.name}. The Brief no longer changes after this, and{' '}
          {formatMass(runs * (study.brief?.batchMassG ?? 0))} of {study.sample.name} are reserved.
          Runs can be added later, in a block of their own.
        </p>
        {freeze.error && <Notice tone="stop">{freeze.error.message}</Notice>}
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
    </>
  );
}
