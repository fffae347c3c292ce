import { reasonSchema } from '@shared/schemas/text';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { Dialog } from '@/components/Dialog';
import { TextArea } from '@/components/Field';
import { useVoidRun } from '@/queries/runs';

interface VoidDialogProps {
  readonly studyId: number;
  readonly run: { readonly id: number; readonly number: number; readonly version: number };
  readonly isOpen: boolean;
  readonly onClose: () => void;
  readonly onVoided: () => void;
}

/** Void with a reason: the row and its masses stay, and no model uses them. */
export function VoidDialog({ studyId, run, isOpen, onClose, onVoided }: VoidDialogProps) {
  const voidRun = useVoidRun(studyId);
  const [why, setWhy] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  const onVoid = async () => {
    const parsed = reasonSchema.safeParse(why);
    if (!parsed.success) {
      setProblem(parsed.error.issues[0]?.message);
      return;
    }
    try {
      await voidRun.mutateAsync({ runId: run.id, why: parsed.data, version: run.version });
      onVoided();
    } catch (error) {
      setProblem(error instanceof Error ? error.message : 'It could not be saved.');
    }
  };
  return (
    <Dialog title={`Mark run ${run.number} void?`} isOpen={isOpen} onClose={onClose}>
      <p>
        Nothing is deleted: its entries stay readable, no model uses them. What a repeat needs is
        taken from the stock when runs are added.
      </p>
      <TextArea
        label="What went wrong?"
        value={why}
        error={problem}
        onChange={(event) => setWhy(event.target.value)}
      />
      <div className="flex gap-2">
        <Button look="stop" isBusy={voidRun.isPending} onClick={() => void onVoid()}>
          Mark it void
        </Button>
        <Button onClick={onClose}>Keep the run</Button>
      </div>
    </Dialog>
  );
}
