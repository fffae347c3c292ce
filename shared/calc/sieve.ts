import { balanceOf } from '../comminution/sieve/balance';
import { passingAt, passingCurve, sizeAt, type CurvePoint } from '../comminution/sieve/curve';
import { shapeIssues } from '../comminution/sieve/shape';
import { gaudinSchuhmann, rosinRammler } from '../comminution/sieve/sizeLaw';
import type { SieveAnswer, SieveRequest } from '../schemas/calc/sieve';

type Warning = SieveAnswer['warnings'][number];

/** What the engine needs of a request; limits and basis have their defaults. */
export type SieveInput = Omit<SieveRequest, 'limits' | 'massBasis'> &
  Partial<Pick<SieveRequest, 'limits' | 'massBasis'>>;

const DEFAULT_LIMITS: SieveRequest['limits'] = {
  treatmentWarn: 1,
  treatmentRepeat: 2,
  sievingWarn: 0.3,
  sievingRepeat: 1,
};

function balances(input: SieveInput, recoveredG: number): SieveAnswer['balance'] {
  const { feedMassG, beforeSievingG, limits = DEFAULT_LIMITS } = input;
  const treatment = { warn: limits.treatmentWarn, repeat: limits.treatmentRepeat };
  const sieving = { warn: limits.sievingWarn, repeat: limits.sievingRepeat };
  const isWeighed = beforeSievingG !== undefined && beforeSievingG > 0;
  return {
    treatment: isWeighed ? balanceOf(feedMassG, beforeSievingG, treatment) : null,
    sieving: isWeighed ? balanceOf(beforeSievingG, recoveredG, sieving) : null,
    overall: balanceOf(feedMassG, recoveredG, treatment),
  };
}

function outside(curve: readonly CurvePoint[], what: string): Warning {
  const coarsest = curve[0]!;
  const finest = curve.at(-1)!;
  return {
    code: 'outside-stack',
    message: `${what} lies outside the sieves used (${finest.sizeMm} to ${coarsest.sizeMm} mm, ${Number(finest.passingPercent.toFixed(1))} to ${Number(coarsest.passingPercent.toFixed(1))} % passing): no number is given rather than a guessed one.`,
  };
}

/** Size distribution, balances and shape of one sieving: `POST /api/calc/sieve`. */
export function sieveAnswer(input: SieveInput): SieveAnswer {
  const { sieves, panG, interpolation } = input;
  const rows = [...sieves].sort((a, b) => b.apertureMm - a.apertureMm);
  const recoveredG = rows.reduce((sum, { retainedG }) => sum + retainedG, panG);
  const curve = passingCurve(rows, panG);
  const warnings: Warning[] = [];
  if (recoveredG === 0)
    warnings.push({
      code: 'nothing-recovered',
      message: 'No mass on any sieve or in the pan: there is no distribution.',
    });
  const passing: Record<string, number | null> = {};
  const percentiles: Record<string, number | null> = {};
  if (recoveredG > 0) {
    for (const size of input.passingAt) {
      passing[String(size)] = passingAt(curve, size, interpolation);
      if (passing[String(size)] === null) warnings.push(outside(curve, `${size} mm`));
    }
    for (const percent of input.percentiles) {
      percentiles[String(percent)] = sizeAt(curve, percent, interpolation);
      if (percentiles[String(percent)] === null)
        warnings.push(outside(curve, `The size that ${percent} % passes`));
    }
  }
  return {
    table: curve.map(({ sizeMm, passingPercent }, i) => ({
      apertureMm: sizeMm,
      retainedPercent: recoveredG === 0 ? 0 : (100 * rows[i]!.retainedG) / recoveredG,
      cumulativePassingPercent: passingPercent,
    })),
    passing,
    percentiles,
    interpolation,
    recoveredG,
    balance: balances(input, recoveredG),
    shape: shapeIssues(rows, panG),
    rosinRammler: rosinRammler(curve),
    gaudinSchuhmann: gaudinSchuhmann(curve),
    warnings,
  };
}
