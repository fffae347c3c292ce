import { massBalance, type Balance } from '../comminution/sieve/massBalance';
import { passingAt, sizeAt, type Reading } from '../comminution/sieve/interpolate';
import { shapeHints } from '../comminution/sieve/shapeCheck';
import { sieveCurve } from '../comminution/sieve/sieveCurve';
import { gaudinSchuhmann, rosinRammler } from '../comminution/sieve/sizeModels';
import { sieveLimitsSchema, type SieveAnswer, type SieveRequest } from '../schemas/calc/sieve';

type Warning = SieveAnswer['warnings'][number];

function balancesOf(request: SieveRequest, recoveredG: number): SieveAnswer['balance'] {
  const { feedMassG, beforeSievingG } = request;
  const limits = sieveLimitsSchema.parse(request.limits ?? {});
  const treatment = { warn: limits.treatmentWarn, repeat: limits.treatmentRepeat };
  const sieving = { warn: limits.sievingWarn, repeat: limits.sievingRepeat };
  const overall = massBalance(feedMassG, recoveredG, treatment);
  if (beforeSievingG === undefined) return { treatment: null, sieving: null, overall };
  return {
    treatment: massBalance(feedMassG, beforeSievingG, treatment),
    sieving: massBalance(beforeSievingG, recoveredG, sieving),
    overall,
  };
}

function gainWarning(balance: Balance | null, what: string): Warning[] {
  if (!balance || balance.lossG >= 0 || balance.verdict === 'holds') return [];
  const message = `${what} by ${-balance.lossG} g. A gain means damp, a tare, or a mass in the wrong row.`;
  return [{ code: 'gain', message }];
}

function gains(balance: SieveAnswer['balance']): Warning[] {
  const { treatment, sieving, overall } = balance;
  if (!treatment)
    return gainWarning(overall, 'Sieves and pan together weigh more than the feed, namely');
  return [
    ...gainWarning(treatment, 'The product before sieving weighs more than the feed, namely'),
    ...gainWarning(sieving, 'Sieves and pan together weigh more than before sieving, namely'),
  ];
}

/** Readings by name of what was asked, and the reasons of those that have no value. */
function collect(asked: readonly number[], read: (what: number) => Reading) {
  const values: Record<string, number | null> = {};
  const warnings: Warning[] = [];
  for (const what of asked) {
    const { value, reason } = read(what);
    values[String(what)] = value;
    if (reason !== undefined) warnings.push({ code: 'outside-stack', message: reason });
  }
  return { values, warnings };
}

/**
 * One sieving: the curve in per cent of the recovered sum, passing and sizes by the stated
 * interpolation, two balances, a check of the curve’s shape, two size models.
 *
 * @throws StatsError `out-of-bounds` on a negative mass, `shape` on a sieve named twice.
 */
export function sieveAnswer(request: SieveRequest): SieveAnswer {
  const { passingAt: sizes = [], percentiles = [], interpolation = 'logSize' } = request;
  const { points, panPercent, recoveredG } = sieveCurve(request.sieves, request.panG);
  const balance = balancesOf(request, recoveredG);
  const passing = collect(sizes, (size) => passingAt(points, size, interpolation));
  const sized = collect(percentiles, (percent) => sizeAt(points, percent, interpolation));
  const curve = points.map(({ apertureMm, passingPercent }) => ({
    sizeMm: apertureMm,
    passing: passingPercent / 100,
  }));
  const warnings = [...gains(balance), ...passing.warnings, ...sized.warnings];
  if (recoveredG === 0)
    warnings.unshift({
      code: 'nothing-recovered',
      message: 'All masses are 0: nothing was sieved.',
    });
  if (request.massBasis === 'wet')
    warnings.push({
      code: 'wet-basis',
      message: 'These are wet masses: water counts as product, most of all in the fines.',
    });
  return {
    table: [...request.sieves]
      .sort((a, b) => b.apertureMm - a.apertureMm)
      .map(({ apertureMm }, i) => ({
        apertureMm,
        retainedPercent: points[i]?.retainedPercent ?? null,
        cumulativePassingPercent: points[i]?.passingPercent ?? null,
      })),
    panPercent,
    recoveredG,
    passing: passing.values,
    percentiles: sized.values,
    interpolation,
    balance,
    shape: shapeHints(points),
    rosinRammler: rosinRammler(curve),
    gaudinSchuhmann: gaudinSchuhmann(curve),
    warnings,
  };
}
