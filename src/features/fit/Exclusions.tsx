import type { FitInput } from '@shared/schemas/fit';
import type { RunJson } from '@shared/schemas/run';
import { reasonSchema } from '@shared/schemas/text';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { Field, SelectField } from '@/components/Field';

type Exclusion = FitInput['exclusions'][number];

interface ExclusionsProps {
  readonly runs: readonly RunJson[];
  readonly exclusions: readonly Exclusion[];
  readonly onChange: (exclusions: Exclusion[]) => void;
}

/** Runs that a model leaves out, each with its cause. Statistics alone is no cause. */
export function Exclusions({ runs, exclusions, onChange }: ExclusionsProps) {
  const [runId, setRunId] = useState('');
  const [why, setWhy] = useState('');
  const [problem, setProblem] = useState<string | undefined>();
  const recorded = runs.filter(({ status }) => status === 'recorded');
  const numberOf = (id: number) => runs.find((run) => run.id === id)?.number ?? id;
  const add = () => {
    const reason = reasonSchema.safeParse(why);
    if (runId === '') setProblem('Choose a run.');
    else if (!reason.success) setProblem(reason.error.issues[0]?.message);
    else {
      onChange([...exclusions, { runId: Number(runId), why: reason.data }]);
      setRunId('');
      setWhy('');
      setProblem(undefined);
    }
  };
  return (
    <details>
      <summary className="link text-2">
        {exclusions.length === 0 ? 'Leave a run out …' : `${exclusions.length} left out`}
      </summary>
      <div className="grid gap-3 pt-3">
        <ul className="grid gap-1 text-2">
          {exclusions.map((each) => (
            <li key={each.runId} className="flex gap-2">
              <span className="flex-1">
                run {numberOf(each.runId)}: {each.why}
              </span>
              <button
                type="button"
                className="link"
                onClick={() => onChange(exclusions.filter(({ runId: id }) => id !== each.runId))}
              >
                Take it in<span className="sr-only"> again, run {numberOf(each.runId)}</span>
              </button>
            </li>
          ))}
        </ul>
        <SelectField
          label="Run"
          value={runId}
          options={[
            { value: '', label: 'choose' },
            ...recorded
              .filter(({ id }) => !exclusions.some((each) => each.runId === id))
              .map(({ id, number }) => ({ value: id, label: `run ${number}` })),
          ]}
          onChange={(event) => setRunId(event.target.value)}
        />
        <Field
          label="Cause found at the bench"
          value={why}
          error={problem}
          onChange={(event) => setWhy(event.target.value)}
        />
        <div>
          <Button onClick={add}>Leave it out</Button>
        </div>
      </div>
    </details>
  );
}
