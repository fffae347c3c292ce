import type { FitAnswer } from '@shared/schemas/calc/fit';
import { DataTable, type Column } from '@/components/DataTable';
import { formatP, formatSignificant } from '@/lib/format';

type Line = FitAnswer['anova']['model'];
interface Row extends Line {
  readonly source: string;
}

const columns: readonly Column<Row>[] = [
  { key: 'source', header: 'Source', cell: ({ source }) => source },
  { key: 'df', header: 'df', numeric: true, cell: ({ df }) => df },
  {
    key: 'ss',
    header: 'Sum of squares',
    numeric: true,
    cell: ({ ss }) => formatSignificant(ss, 4),
  },
  { key: 'ms', header: 'Mean square', numeric: true, cell: ({ ms }) => formatSignificant(ms, 4) },
  { key: 'f', header: 'F', numeric: true, cell: ({ f }) => formatSignificant(f) },
  { key: 'p', header: 'p', numeric: true, cell: ({ p }) => formatP(p) },
];

/** Blocks, model, residual with its two parts, total; F of lack of fit is against pure error. */
export function AnovaTable({ anova }: { readonly anova: FitAnswer['anova'] }) {
  const rows = [
    { source: 'Blocks', line: anova.block },
    { source: 'Model', line: anova.model },
    { source: 'Residual', line: anova.residual },
    { source: '· lack of fit', line: anova.lackOfFit },
    { source: '· pure error', line: anova.pureError },
    { source: 'Total, about the mean', line: anova.total },
  ].flatMap(({ source, line }): Row[] => (line ? [{ source, ...line }] : []));
  return (
    <DataTable
      caption="Analysis of variance"
      columns={columns}
      rows={rows}
      rowKey={({ source }) => source}
    />
  );
}
