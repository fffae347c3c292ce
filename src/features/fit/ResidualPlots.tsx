import type { FitAnswer } from '@shared/schemas/calc/fit';
import { normalQuantile } from '@shared/stats/distributions/quantiles';
import { Chart } from '@/charts/Chart';
import { residualOption, type ResidualPoint } from '@/charts/residuals';
import { formatNumber } from '@/lib/format';

interface Plot {
  readonly name: string;
  readonly xName: string;
  readonly isJoined?: boolean;
  readonly points: readonly ResidualPoint[];
}

function plotsOf(diagnostics: FitAnswer['diagnostics']): Plot[] {
  const judged = diagnostics.flatMap((each, i) =>
    each.studentizedExternal === null
      ? []
      : [{ id: String(each.id), y: each.studentizedExternal, fitted: each.fitted, order: i + 1 }],
  );
  const sorted = [...judged].sort((a, b) => a.y - b.y);
  const n = sorted.length;
  return [
    {
      name: 'Residual against fitted value',
      xName: 'fitted',
      points: judged.map(({ id, y, fitted }) => ({ id, x: fitted, y })),
    },
    {
      name: 'Residual in run order',
      xName: 'order of the runs',
      isJoined: true,
      points: judged.map(({ id, y, order }) => ({ id, x: order, y })),
    },
    {
      name: 'Residual against normal quantile',
      xName: 'normal quantile',
      points: sorted.map(({ id, y }, i) => ({
        id,
        x: normalQuantile((i + 1 - 0.375) / (n + 0.25)),
        y,
      })),
    },
  ];
}

/** Studentised residuals three ways; beyond ±2 a run deserves a look at its record. */
export function ResidualPlots({ diagnostics }: { readonly diagnostics: FitAnswer['diagnostics'] }) {
  const plots = plotsOf(diagnostics);
  if ((plots[0]?.points.length ?? 0) === 0)
    return <p className="text-ink-3">No scatter is left to look at.</p>;
  return (
    <div className="grid gap-4 desk:grid-cols-3">
      {plots.map(({ name, xName, isJoined = false, points }) => (
        <div key={name}>
          <h3 className="text-2 font-mark">{name}</h3>
          <Chart
            label={name}
            height={220}
            option={(tokens) => residualOption({ points, xName, isJoined }, tokens)}
            table={{
              columns: [
                { key: 'id', header: 'Run', numeric: true, cell: ({ id }) => id },
                { key: 'x', header: xName, numeric: true, cell: ({ x }) => formatNumber(x, 2) },
                {
                  key: 'y',
                  header: 'Studentised residual',
                  numeric: true,
                  cell: ({ y }) => formatNumber(y, 2),
                },
              ],
              rows: points,
              rowKey: ({ id }) => id,
            }}
          />
        </div>
      ))}
    </div>
  );
}
