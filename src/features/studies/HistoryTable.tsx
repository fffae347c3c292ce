import type { AuditEventJson } from '@shared/schemas/history';
import { DataTable, type Column } from '@/components/DataTable';
import { formatMoment } from '@/lib/format';
import { eventWords } from './eventWords';

const FEW = 3;

function short(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'empty';
  const text = typeof value === 'string' ? value : JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}

/** "beforeSievingG" as "before sieving g": the record's own names, readable. */
const words = (name: string) =>
  name
    .replace(/([a-z\d])([A-Z])/g, '$1 $2')
    .replace(/ [A-Z](?=[a-z]|$)/g, (part) => part.toLowerCase());

interface Change {
  readonly field: string;
  readonly before: string;
  readonly after: string;
}

/** The changed fields with what they were and are; long contents shortened. */
function changesOf({ before, after, action }: AuditEventJson): Change[] {
  if (action === 'created' || !after) return [];
  return Object.keys(after)
    .filter((key) => key !== 'version')
    .map((key) => ({
      field: words(key),
      before: short(before?.[key]),
      after: short(after[key]),
    }))
    .filter((change) => change.before !== change.after);
}

function ChangeList({ changes }: { readonly changes: readonly Change[] }) {
  return (
    <ul className="list-none p-0 m-0">
      {changes.map(({ field, before, after }) => (
        <li key={field} className="text-2">
          {field}: <span className="text-ink-3">{before}</span> → {after}
        </li>
      ))}
    </ul>
  );
}

function Changes({ event }: { readonly event: AuditEventJson }) {
  const changes = changesOf(event);
  if (changes.length <= FEW) return <ChangeList changes={changes} />;
  return (
    <details>
      <summary className="text-2">{changes.length} fields</summary>
      <ChangeList changes={changes} />
    </details>
  );
}

interface HistoryTableProps {
  readonly events: readonly AuditEventJson[];
  /** Numbers of the runs by their id, to name them. */
  readonly runNumbers: ReadonlyMap<number, number>;
}

export function HistoryTable({ events, runNumbers }: HistoryTableProps) {
  const columns: readonly Column<AuditEventJson>[] = [
    { key: 'at', header: 'When', cell: ({ at }) => formatMoment(at) },
    { key: 'by', header: 'Who', cell: ({ by }) => by?.name ?? 'Cragline' },
    { key: 'what', header: 'What', isWordy: true, cell: (event) => eventWords(event, runNumbers) },
    {
      key: 'changes',
      header: 'Before → after',
      isWordy: true,
      cell: (event) => <Changes event={event} />,
    },
  ];
  return (
    <DataTable
      caption="Every change to this study, newest first"
      columns={columns}
      rows={events}
      rowKey={({ id }) => id}
    />
  );
}
