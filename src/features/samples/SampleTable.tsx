import type { SampleJson } from '@shared/schemas/sample';
import { Link } from 'react-router-dom';
import { DataTable, type Column } from '@/components/DataTable';
import { PracticeTag } from '@/components/PracticeTag';
import { formatDay, formatMass } from '@/lib/format';

const columns: readonly Column<SampleJson>[] = [
  { key: 'code', header: 'Sample', cell: ({ code }) => <span className="mono">{code}</span> },
  {
    key: 'name',
    header: 'Name',
    cell: ({ id, name, isSimulated }) => (
      <>
        <Link className="link text-3 font-mark" to={`/samples/${id}`}>
          {name}
        </Link>{' '}
        {isSimulated && <PracticeTag isShort />}
      </>
    ),
  },
  { key: 'material', header: 'Material', isWordy: true, cell: ({ material }) => material },
  { key: 'customer', header: 'From', cell: ({ customer }) => customer?.name ?? '—' },
  { key: 'received', header: 'Received', cell: ({ receivedOn }) => formatDay(receivedOn) },
  {
    key: 'left',
    header: 'Left',
    numeric: true,
    cell: ({ stock }) => `${formatMass(stock.leftG)} of ${formatMass(stock.receivedG)}`,
  },
];

export function SampleTable({ samples }: { readonly samples: readonly SampleJson[] }) {
  return (
    <DataTable
      caption="Samples of the lab, newest first"
      columns={columns}
      rows={samples}
      rowKey={({ id }) => id}
    />
  );
}
