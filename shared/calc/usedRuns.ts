import type { CalcRun } from '../schemas/calc/fit';
import type { FitRun } from '../stats/fit/fitModel';

export interface UsedRun extends FitRun {
  readonly id: string | number;
}

export interface RunSelection {
  readonly used: readonly UsedRun[];
  /** Runs without a value, and runs left out on purpose, by id. */
  readonly missing: readonly (string | number)[];
  readonly excluded: readonly (string | number)[];
}

/** Splits runs into those that have a value and are wanted, and the rest. A run without id has its place. */
export function usedRuns(runs: readonly CalcRun[]): RunSelection {
  const used: UsedRun[] = [];
  const missing: (string | number)[] = [];
  const excluded: (string | number)[] = [];
  runs.forEach((run, i) => {
    const { id = i + 1, settings, block, value = null, weight = 1 } = run;
    if (run.excluded) excluded.push(id);
    else if (value === null) missing.push(id);
    else used.push({ id, settings, block, value, weight });
  });
  return { used, missing, excluded };
}
