import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';

export interface Column<Row> {
  readonly key: string;
  readonly header: ReactNode;
  /** Stands in the header, once. */
  readonly unit?: string | undefined;
  readonly numeric?: boolean;
  /** Sentences: they wrap on a phone, where the other cells stay whole and the table scrolls. */
  readonly isWordy?: boolean;
  readonly cell: (row: Row) => ReactNode;
}

interface DataTableProps<Row> {
  /** For screen readers; shown when `isCaptionShown`. */
  readonly caption: string;
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly rowKey: (row: Row) => string | number;
  readonly rowClass?: (row: Row) => string | false;
  /** What stands there when there are no rows. */
  readonly empty?: ReactNode;
}

/** Columns as data. Figures stand right, in one precision a column; the unit stands in the header. */
export function DataTable<Row>({
  caption,
  columns,
  rows,
  rowKey,
  rowClass,
  empty = 'Nothing here yet.',
}: DataTableProps<Row>) {
  return (
    <div className="scroll-x" tabIndex={0} role="region" aria-label={`${caption}, table`}>
      <table className="table">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            {columns.map(({ key, header, unit, numeric }) => (
              <th key={key} scope="col" className={classes(numeric === true && 'num')}>
                {header}
                {unit !== undefined && unit !== '' && `, ${unit}`}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)} className={rowClass?.(row) || undefined}>
              {columns.map(({ key, numeric, isWordy, cell }) => (
                <td
                  key={key}
                  className={classes(numeric === true && 'num', isWordy === true && 'wordy')}
                >
                  {cell(row)}
                </td>
              ))}
            </tr>
          ))}
          {rows.length === 0 && (
            <tr>
              <td colSpan={columns.length} className="text-ink-3">
                {empty}
              </td>
            </tr>
          )}
        </tbody>
      </table>
    </div>
  );
}
