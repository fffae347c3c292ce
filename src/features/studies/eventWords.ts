import type { AuditEventJson } from '@shared/schemas/history';

const NOUNS: Readonly<Record<string, string>> = {
  study: 'the study',
  matrix: 'the matrix',
  run: 'a run',
  fit: 'a model',
  candidate: 'a candidate',
  release: 'the release',
  'stock entry': 'the sample ledger',
};

function runWords({ after, action }: AuditEventJson): string | null {
  const number = after?.['number'];
  if (action === 'created') return `planned run ${typeof number === 'number' ? number : ''}`;
  if (after?.['status'] === 'recorded') return 'recorded a run';
  if (after?.['status'] === 'void') return 'marked a run void';
  return null;
}

/** One event as a clause: "recorded a run (imported from runs.csv)". */
export function eventWords(event: AuditEventJson): string {
  const noun = NOUNS[event.noun] ?? `a ${event.noun}`;
  const plain =
    event.action === 'created'
      ? `made ${noun}`
      : event.action === 'removed'
        ? `removed ${noun}`
        : `changed ${noun}`;
  const words = (event.noun === 'run' ? runWords(event) : null) ?? plain;
  return event.why === null ? words : `${words} (${event.why})`;
}
