import type { AuditEventJson } from '@shared/schemas/history';
import { formatPlain } from '@/lib/format';

const NOUNS: Readonly<Record<string, string>> = {
  study: 'the study',
  matrix: 'the matrix',
  fit: 'a model',
  candidate: 'a candidate',
  release: 'the release',
  'stock entry': 'the sample ledger',
};

const NO_NUMBERS: ReadonlyMap<number, number> = new Map();

function runWords({ after, action }: AuditEventJson, run: string): string | null {
  if (action === 'created') return `planned ${run}`;
  if (after?.['status'] === 'recorded') return `recorded ${run}`;
  if (after?.['status'] === 'void') return `marked ${run} void`;
  return null;
}

/** "booked 300 g as used": a line of the sample ledger. */
function stockWords({ after }: AuditEventJson): string | null {
  const [kind, massG] = [after?.['kind'], after?.['massG']];
  if (typeof kind !== 'string' || typeof massG !== 'number') return null;
  return `booked ${formatPlain(massG)} g as ${kind}`;
}

function runName({ nounId, after }: AuditEventJson, numbers: ReadonlyMap<number, number>): string {
  const number = after?.['number'] ?? (nounId === null ? undefined : numbers.get(nounId));
  return typeof number === 'number' ? `run ${number}` : 'a run';
}

/** One event as a clause: "recorded run 6 (imported from runs.csv)". Runs are numbered where known. */
export function eventWords(event: AuditEventJson, runNumbers = NO_NUMBERS): string {
  const run = runName(event, runNumbers);
  const noun = event.noun === 'run' ? run : (NOUNS[event.noun] ?? `a ${event.noun}`);
  const plain =
    event.action === 'created'
      ? `made ${noun}`
      : event.action === 'removed'
        ? `removed ${noun}`
        : `changed ${noun}`;
  const own =
    event.noun === 'run'
      ? runWords(event, run)
      : event.noun === 'stock entry'
        ? stockWords(event)
        : null;
  const words = own ?? plain;
  return event.why === null ? words : `${words} (${event.why})`;
}
