import type { ReactNode } from 'react';
import { classes } from '@/lib/classes';
import { SortButton } from './SortButton';

export interface Column<Row> {
  readonly key: string;
  readonly header: ReactNode;
  /** Stands in the header, once. */
  readonly unit?: string | undefined;
  readonly numeric?: boolean;
  readonly cell: (row: Row) => ReactNode;
  /** Given for a column that can be sorted. */
  readonly sortValue?: (row: Row) => number | string | null;
  readonly className?: string;
}

export interface Sort {
  readonly key: string;
  readonly isDescending: boolean;
}

interface DataTableProps<Row> {
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly rowKey: (row: Row) => string | number;
  /** Names the table; shown above it only when it says more than the panel does. */
  readonly caption: string;
  readonly sort?: { readonly by: Sort | null; readonly onSorted: (by: Sort) => void } | undefined;
  readonly picked?:
    { readonly key: string | number | null; readonly onPicked?: (row: Row) => void } | undefined;
  /** Stands in place of the rows when there are none. */
  readonly whenEmpty?: ReactNode;
}

/** Rows sorted as the header asks; what is missing goes last either way. The order of equals is kept. */
export function sortRows<Row>(
  rows: readonly Row[],
  columns: readonly Column<Row>[],
  by: Sort | null,
): readonly Row[] {
  const valueOf = columns.find(({ key }) => key === by?.key)?.sortValue;
  if (!by || !valueOf) return rows;
  const sign = by.isDescending ? -1 : 1;
  return [...rows].sort((one, other) => {
    const [a, b] = [valueOf(one), valueOf(other)];
    if (a === null || b === null) return Number(a === null) - Number(b === null);
    return sign * (typeof a === 'string' ? a.localeCompare(String(b)) : a - Number(b));
  });
}

/** Columns as data. Figures right-aligned, hairlines between rows, no zebra. */
export function DataTable<Row>(props: DataTableProps<Row>) {
  const { columns, rows, rowKey, caption, sort, picked, whenEmpty } = props;
  const sorted = sortRows(rows, columns, sort?.by ?? null);
  return (
    <div className="overflow-x-auto">
      <table className="w-full border-collapse text-2">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <HeaderCell key={column.key} column={column} sort={sort} />
            ))}
          </tr>
        </thead>
        <tbody>
          {sorted.map((row) => (
            <BodyRow key={rowKey(row)} row={row} rowKey={rowKey(row)} {...{ columns, picked }} />
          ))}
          {rows.length === 0 && (
            <tr>
              <td colSpan={columns.length} className="px-4 py-3 text-ink-3">
                {whenEmpty ?? 'Nothing here yet.'}
              </td>
            </tr>
          )}
        </tbody>
      </table>
    </div>
  );
}

interface HeaderCellProps<Row> {
  readonly column: Column<Row>;
  readonly sort: DataTableProps<Row>['sort'];
}

function HeaderCell<Row>({ column, sort }: HeaderCellProps<Row>) {
  const { key, header, unit, numeric, sortValue } = column;
  const text = unit ? (
    <>
      {header}, {unit}
    </>
  ) : (
    header
  );
  const isSorted = sort?.by?.key === key;
  const order = sort?.by?.isDescending ? 'descending' : 'ascending';
  return (
    <th
      scope="col"
      aria-sort={isSorted ? order : undefined}
      className={classes(
        'border-b border-line-strong px-2 py-2 align-bottom text-1 font-body whitespace-nowrap text-ink-3 first:pl-4 last:pr-4',
        numeric ? 'text-right' : 'text-left',
      )}
    >
      {sort && sortValue ? (
        <SortButton
          order={isSorted ? order : null}
          onPressed={() => sort.onSorted({ key, isDescending: isSorted && order === 'ascending' })}
        >
          {text}
        </SortButton>
      ) : (
        text
      )}
    </th>
  );
}

interface BodyRowProps<Row> extends Pick<DataTableProps<Row>, 'columns' | 'picked'> {
  readonly row: Row;
  readonly rowKey: string | number;
}

function BodyRow<Row>({ row, rowKey, columns, picked }: BodyRowProps<Row>) {
  const isPicked = picked?.key === rowKey;
  const onPicked = picked?.onPicked;
  return (
    <tr
      aria-current={isPicked ? 'true' : undefined}
      onClick={onPicked && (() => onPicked(row))}
      className={classes(
        'border-b border-line last:border-b-0',
        isPicked && 'bg-accent-wash',
        onPicked && !isPicked && 'cursor-pointer hover:bg-sunk',
      )}
    >
      {columns.map(({ key, numeric, cell, className }, index) => (
        <td
          key={key}
          className={classes(
            'px-2 py-1.5 first:pl-4 last:pr-4',
            numeric && 'text-right whitespace-nowrap',
            className,
          )}
        >
          {onPicked && index === 0 ? (
            // the row's own click does the work, so that keyboard and mouse go one way
            <button type="button" aria-pressed={isPicked} className="min-h-6 text-left">
              {cell(row)}
            </button>
          ) : (
            cell(row)
          )}
        </td>
      ))}
    </tr>
  );
}
