import type { StudySummaryJson } from '@shared/schemas/study';
import { Link } from 'react-router-dom';
import { DataTable, type Column } from '@/components/DataTable';
import { PracticeTag } from '@/components/PracticeTag';
import { formatMoment } from '@/lib/format';
import { STAGE_NAMES } from './stations';

const columns: readonly Column<StudySummaryJson>[] = [
  { key: 'code', header: 'Study', cell: ({ code }) => <span className="mono">{code}</span> },
  {
    key: 'title',
    header: 'Question',
    isWordy: true,
    cell: ({ id, title, isSimulated }) => (
      <>
        <Link className="link text-3 font-mark" to={`/studies/${id}`}>
          {title}
        </Link>{' '}
        {isSimulated && <PracticeTag isShort />}
      </>
    ),
  },
  { key: 'sample', header: 'Sample', cell: ({ sample }) => `${sample.code} ${sample.name}` },
  { key: 'customer', header: 'For', cell: ({ customer }) => customer?.name ?? '—' },
  {
    key: 'stage',
    header: 'Stage',
    cell: ({ progress }) => (progress.releasedAt ? 'signed' : STAGE_NAMES[progress.stage]),
  },
  {
    key: 'runs',
    header: 'Runs done',
    numeric: true,
    cell: ({ progress: { runsRecorded, runsPlanned } }) =>
      runsRecorded + runsPlanned === 0 ? '—' : `${runsRecorded} of ${runsRecorded + runsPlanned}`,
  },
  {
    key: 'touched',
    header: 'Last change',
    numeric: true,
    cell: ({ updatedAt }) => formatMoment(updatedAt),
  },
];

export function StudyTable({ studies }: { readonly studies: readonly StudySummaryJson[] }) {
  return (
    <DataTable
      caption="Studies of the lab, last changed first"
      columns={columns}
      rows={studies}
      rowKey={({ id }) => id}
    />
  );
}
