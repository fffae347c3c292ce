import type { SieveAnswer } from '@shared/schemas/calc/sieve';
import type { BriefJson } from '@shared/schemas/study';
import { Chart } from '@/charts/Chart';
import { sieveCurveOption } from '@/charts/sieveCurveOption';
import { formatAperture, formatNumber, formatSignificant, withUnit } from '@/lib/format';

interface SieveReadingProps {
  readonly sieve: SieveAnswer;
  readonly brief: BriefJson;
}

/** The passing curve as it is typed, and the responses that follow from it. */
export function SieveReading({ sieve, brief }: SieveReadingProps) {
  const rows = sieve.table;
  const marks = brief.responses.flatMap(({ kind, apertureMm }) => {
    const passingPercent = sieve.passing[String(apertureMm)] ?? null;
    return kind === 'passing' && apertureMm !== null && passingPercent !== null
      ? [{ apertureMm, passingPercent }]
      : [];
  });
  return (
    <section aria-label="Passing" className="grid gap-3">
      <h2 className="text-4 font-mark">
        Passing <span className="text-2 text-ink-3">the line follows as you type</span>
      </h2>
      <Chart
        label="Percent passing over the sieve opening"
        height={320}
        option={(tokens, size) =>
          sieveCurveOption(
            {
              points: rows.map(({ apertureMm, cumulativePassingPercent }) => ({
                openingMm: apertureMm,
                passingPercent: cumulativePassingPercent,
              })),
              others: [],
              marked: marks.map(({ apertureMm, passingPercent }) => ({
                openingMm: apertureMm,
                passingPercent,
              })),
            },
            tokens,
            size,
          )
        }
        table={{
          columns: [
            {
              key: 'mm',
              header: 'Opening',
              numeric: true,
              cell: ({ apertureMm }) => formatAperture(apertureMm),
            },
            {
              key: 'kept',
              header: 'Retained, %',
              numeric: true,
              cell: ({ retainedPercent }) => formatNumber(retainedPercent, 2),
            },
            {
              key: 'passing',
              header: 'Passing, %',
              numeric: true,
              cell: ({ cumulativePassingPercent }) => formatNumber(cumulativePassingPercent, 2),
            },
          ],
          rows,
          rowKey: ({ apertureMm }) => apertureMm,
        }}
      />
      <dl className="flex flex-wrap gap-6">
        {marks.map(({ apertureMm, passingPercent }) => (
          <div key={apertureMm}>
            <dt className="text-2 text-ink-3">Below {formatAperture(apertureMm)}</dt>
            <dd className="mono text-6">{withUnit(formatNumber(passingPercent, 1), '%')}</dd>
          </div>
        ))}
        {Object.entries(sieve.percentiles).map(([percent, sizeMm]) => (
          <div key={percent}>
            <dt className="text-2 text-ink-3">P{percent}</dt>
            <dd className="mono text-6">
              {sizeMm === null ? 'outside the stack' : withUnit(formatSignificant(sizeMm), 'mm')}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
