import type { AuditEventJson } from '@shared/schemas/history';
import { DataTable, type Column } from '@/components/DataTable';
import { formatMoment } from '@/lib/format';
import { eventWords } from './eventWords';

function short(value: unknown): string {
  const text = typeof value === 'string' ? value : JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}

/** The changed fields with what they were and are; long contents shortened. */
function changesOf({ before, after, action }: AuditEventJson): string[] {
  if (action === 'created' || !after) return [];
  return Object.keys(after)
    .filter((key) => key !== 'version')
    .map((key) => `${key}: ${short(before?.[key] ?? null)} → ${short(after[key] ?? null)}`);
}

const columns: readonly Column<AuditEventJson>[] = [
  { key: 'at', header: 'When', cell: ({ at }) => formatMoment(at) },
  { key: 'by', header: 'Who', cell: ({ by }) => by?.name ?? 'Cragline' },
  { key: 'what', header: 'What', cell: eventWords },
  {
    key: 'changes',
    header: 'Before → after',
    cell: (event) => (
      <ul>
        {changesOf(event).map((change) => (
          <li key={change} className="mono text-1">
            {change}
          </li>
        ))}
      </ul>
    ),
  },
];

export function HistoryTable({ events }: { readonly events: readonly AuditEventJson[] }) {
  return (
    <DataTable
      caption="Every change to this study, newest first"
      columns={columns}
      rows={events}
      rowKey={({ id }) => id}
    />
  );
}
