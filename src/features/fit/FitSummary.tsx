import type { FitAnswer } from '@shared/schemas/calc/fit';
import { formatNumber, formatSignificant } from '@/lib/format';
import { readingOf } from './reading';

const share = (value: number | null) => formatNumber(value === null ? null : 100 * value, 1);

const TONES = { holds: '', careful: 'half', open: 'open' } as const;

/** Predicted R² first; then what the numbers mean, in words. */
export function FitSummary({ answer }: { readonly answer: FitAnswer }) {
  const { summary } = answer;
  const figures = [
    { name: 'Predicted R²', value: share(summary.predictedRSquared), unit: '%' },
    { name: 'Adjusted R²', value: share(summary.adjustedRSquared), unit: '%' },
    { name: 'R²', value: share(summary.rSquared), unit: '%' },
    { name: 'Residual SD', value: formatSignificant(summary.residualSd), unit: '' },
    { name: 'AICc', value: formatNumber(summary.aicc, 1), unit: '' },
    {
      name: 'Two solvers agree to',
      value: formatNumber(summary.agreementDigits, 0),
      unit: 'digits',
    },
  ];
  return (
    <div className="grid gap-4">
      <dl className="flex flex-wrap gap-6">
        {figures.map(({ name, value, unit }) => (
          <div key={name}>
            <dt className="text-2 text-ink-3">{name}</dt>
            <dd className="figure">
              {value} <span className="unit text-3">{unit}</span>
            </dd>
          </div>
        ))}
      </dl>
      <ul className="grid gap-2 key">
        {readingOf(answer).map(({ tone, words }) => (
          <li key={words} className="grid grid-cols-[16px_1fr] gap-3 reading items-start">
            <i className={`${TONES[tone]} mt-2`} />
            <span>{words}</span>
          </li>
        ))}
      </ul>
    </div>
  );
}
