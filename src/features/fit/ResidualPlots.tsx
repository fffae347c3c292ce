import type { FitAnswer } from '@shared/schemas/calc/fit';
import { fQuantile, normalQuantile } from '@shared/stats/distributions/quantiles';
import { Chart } from '@/charts/Chart';
import { influenceOption } from '@/charts/influenceOption';
import { residualOption, type ResidualInput, type ResidualPoint } from '@/charts/residualOption';
import { formatNumber } from '@/lib/format';

interface Plot extends ResidualInput {
  readonly title: string;
}

/**
 * Where the i-th smallest of n normal values lies 95 times in 100: its probability follows a beta
 * distribution with parameters i and n + 1 − i, here through F.
 */
function bandAt(i: number, n: number): { low: number; high: number } {
  const [a, b] = [i, n + 1 - i];
  const normal = (p: number) => {
    const f = fQuantile(p, 2 * a, 2 * b);
    return normalQuantile((a * f) / (b + a * f));
  };
  return { low: normal(0.025), high: normal(0.975) };
}

/** Blom's plotting position, as usual for normal plots. */
const scoreOf = (i: number, n: number) => normalQuantile((i - 0.375) / (n + 0.25));

function plotsOf(diagnostics: FitAnswer['diagnostics']): Plot[] {
  const judged = diagnostics.flatMap((each, i) =>
    each.studentizedExternal === null
      ? []
      : [{ id: each.id, residual: each.studentizedExternal, fitted: each.fitted, order: i + 1 }],
  );
  const sorted = [...judged].sort((a, b) => a.residual - b.residual);
  const n = sorted.length;
  return [
    {
      title: 'Residual against fitted value',
      name: 'fitted',
      points: judged.map(({ id, residual, fitted }) => ({ id, residual, x: fitted })),
    },
    {
      title: 'Residual in run order',
      name: 'order of the runs',
      isJoined: true,
      points: judged.map(({ id, residual, order }) => ({ id, residual, x: order })),
    },
    {
      title: 'Residual against normal quantile',
      name: 'normal quantile',
      points: sorted.map(({ id, residual }, i) => ({ id, residual, x: scoreOf(i + 1, n) })),
      band: sorted.map((_, i) => ({ x: scoreOf(i + 1, n), ...bandAt(i + 1, n) })),
    },
  ];
}

const residualColumns = (xName: string) => [
  { key: 'id', header: 'Run', numeric: true, cell: ({ id }: ResidualPoint) => id },
  { key: 'x', header: xName, numeric: true, cell: ({ x }: ResidualPoint) => formatNumber(x, 2) },
  {
    key: 'y',
    header: 'Studentised residual',
    numeric: true,
    cell: ({ residual }: ResidualPoint) => formatNumber(residual, 2),
  },
];

/** How hard each run pulls: Cook's distance as bars, leverage as ticks. */
function Influence({ diagnostics }: { readonly diagnostics: FitAnswer['diagnostics'] }) {
  const points = diagnostics.flatMap(({ id, cooksDistance, leverage }, i) =>
    cooksDistance === null ? [] : [{ id, order: i + 1, cook: cooksDistance, leverage }],
  );
  return (
    <div>
      <h3 className="text-2 font-mark">
        Pull on the fit <span className="text-ink-3">bar Cook, tick leverage</span>
      </h3>
      <Chart
        label="Cook’s distance and leverage of each run"
        height={190}
        option={(tokens) => influenceOption(points, tokens)}
        table={{
          columns: [
            { key: 'id', header: 'Run', numeric: true, cell: ({ id }) => id },
            {
              key: 'cook',
              header: 'Cook’s distance',
              numeric: true,
              cell: ({ cook }) => formatNumber(cook, 3),
            },
            {
              key: 'leverage',
              header: 'Leverage',
              numeric: true,
              cell: ({ leverage }) => formatNumber(leverage, 3),
            },
          ],
          rows: points,
          rowKey: ({ id }) => id,
        }}
      />
    </div>
  );
}

/** Studentised residuals three ways, and the pull of each run; beyond ±2 a run deserves a look. */
export function ResidualPlots({ diagnostics }: { readonly diagnostics: FitAnswer['diagnostics'] }) {
  const plots = plotsOf(diagnostics);
  if ((plots[0]?.points.length ?? 0) === 0)
    return <p className="text-ink-3">No scatter is left to look at.</p>;
  return (
    <div className="grid gap-4 phone:grid-cols-2">
      {plots.map(({ title, ...plot }) => (
        <div key={title}>
          <h3 className="text-2 font-mark">{title}</h3>
          <Chart
            label={title}
            height={190}
            option={(tokens, size) => residualOption({ ...plot, hasNumbers: true }, tokens, size)}
            table={{
              columns: residualColumns(plot.name),
              rows: plot.points,
              rowKey: ({ id }) => id,
            }}
          />
        </div>
      ))}
      <Influence diagnostics={diagnostics} />
    </div>
  );
}
