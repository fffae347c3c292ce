import type { sampleDetailSchema } from '@shared/schemas/sample';
import type { z } from 'zod';
import { DataTable, type Column } from '@/components/DataTable';
import { formatMass, formatMoment } from '@/lib/format';

type Entry = z.infer<typeof sampleDetailSchema>['ledger'][number];

const KINDS: Readonly<Record<Entry['kind'], string>> = {
  received: 'received',
  reserved: 'reserved for runs',
  released: 'set free again',
  used: 'used in a run',
  lost: 'lost',
  returned: 'sent back',
};

const columns: readonly Column<Entry>[] = [
  { key: 'at', header: 'When', cell: ({ at }) => formatMoment(at) },
  { key: 'kind', header: 'What', cell: ({ kind }) => KINDS[kind] },
  { key: 'mass', header: 'Mass', numeric: true, cell: ({ massG }) => formatMass(massG) },
  { key: 'by', header: 'By', cell: ({ by }) => by.name },
  { key: 'note', header: 'Note', isWordy: true, cell: ({ note }) => note || '—' },
];

export function LedgerTable({ entries }: { readonly entries: readonly Entry[] }) {
  return (
    <DataTable
      caption="Ledger of the sample, newest first"
      columns={columns}
      rows={[...entries].reverse()}
      rowKey={({ id }) => id}
    />
  );
}
