import type { RunForm } from './runForm';

/** What was typed and not yet sent stays on this tablet, even when the page is closed. */
const keyOf = (runId: number) => `cragline-run-${runId}`;

export function keepDraft(runId: number, form: RunForm): boolean {
  try {
    localStorage.setItem(keyOf(runId), JSON.stringify(form));
    return true;
  } catch {
    // a full or forbidden store: the page says that nothing is kept here
    return false;
  }
}

export function readDraft(runId: number, empty: RunForm): RunForm | null {
  try {
    const stored = localStorage.getItem(keyOf(runId));
    if (stored === null) return null;
    const draft = JSON.parse(stored) as Partial<RunForm>; // written by keepDraft; fields of older drafts may be missing
    return { ...empty, ...draft, sieves: { ...empty.sieves, ...draft.sieves } };
  } catch {
    return null;
  }
}

export function dropDraft(runId: number): void {
  try {
    localStorage.removeItem(keyOf(runId));
  } catch {
    // nothing was kept there either
  }
}
