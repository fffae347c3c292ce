import type { FitAnswer, FitTerm } from '@shared/schemas/calc/fit';
import { DataTable, type Column } from '@/components/DataTable';
import { termSymbol } from '@/lib/termSymbol';
import { formatP, formatSignificant } from '@/lib/format';

const columns: readonly Column<FitTerm>[] = [
  {
    key: 'term',
    header: 'Term, coded',
    cell: ({ term }) =>
      term === 'intercept' ? 'intercept' : term.startsWith('block') ? term : termSymbol(term),
  },
  {
    key: 'estimate',
    header: 'Estimate',
    numeric: true,
    cell: ({ estimate }) => formatSignificant(estimate, 4),
  },
  {
    key: 'error',
    header: 'Standard error',
    numeric: true,
    cell: ({ standardError }) => formatSignificant(standardError),
  },
  {
    key: 'interval',
    header: '95 % interval',
    numeric: true,
    cell: ({ ciLow, ciHigh }) =>
      ciLow === null ? '—' : `${formatSignificant(ciLow)} to ${formatSignificant(ciHigh)}`,
  },
  { key: 't', header: 't', numeric: true, cell: ({ t }) => formatSignificant(t) },
  { key: 'p', header: 'p', numeric: true, cell: ({ p }) => formatP(p) },
  { key: 'vif', header: 'VIF', numeric: true, cell: ({ vif }) => formatSignificant(vif) },
];

export function CoefficientTable({ terms }: { readonly terms: FitAnswer['terms'] }) {
  return (
    <DataTable
      caption="Coefficients with intervals"
      columns={columns}
      rows={terms}
      rowKey={({ term }) => term}
    />
  );
}
