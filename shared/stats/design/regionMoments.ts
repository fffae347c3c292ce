import { isCategorical } from '../coding/factor';
import type { RowAt } from '../model/compileRow';
import type { Term } from '../model/term';
import { spreadOver, type DesignRegion } from './designRegion';

/** Points for a region cut by limits: its moments have no closed form. Error about 0.1 %. */
const POINTS = 8000;

/** Mean of x^n over low … high. */
function power(low: number, high: number, n: number): number {
  return (high ** (n + 1) - low ** (n + 1)) / ((n + 1) * (high - low));
}

/** Mean over the levels of a product of contrasts of one categorical factor. */
function contrastMean(levels: number, wanted: readonly number[]): number {
  let sum = 0;
  for (let at = 0; at < levels; at++)
    sum += wanted.reduce((all, level) => all * (at === levels - 1 ? -1 : at === level ? 1 : 0), 1);
  return sum / levels;
}

function exactMoment(region: DesignRegion, a: Term, b: Term): number {
  return region.factors.reduce((product, factor, i) => {
    if (isCategorical(factor)) {
      const wanted = [...a.contrasts, ...b.contrasts]
        .filter((contrast) => contrast.factor === i)
        .map(({ level }) => level);
      return product * contrastMean(factor.levels.length, wanted);
    }
    return product * power(region.low[i]!, region.high[i]!, a.powers[i]! + b.powers[i]!);
  }, 1);
}

/**
 * Mean of f(x)f(x)′ over the region, uniform in coded units: exact without limits, by evenly spread
 * points with them. The mean of d over the region is trace(M⁻¹ · this).
 *
 * @returns p × p, row-major.
 */
export function regionMoments(
  region: DesignRegion,
  terms: readonly Term[],
  rowAt: RowAt,
): Float64Array {
  const p = terms.length;
  const out = new Float64Array(p * p);
  if (!region.hasLimits) {
    for (let a = 0; a < p; a++)
      for (let b = 0; b <= a; b++) {
        const moment = exactMoment(region, terms[a]!, terms[b]!);
        out[a * p + b] = moment;
        out[b * p + a] = moment;
      }
    return out;
  }
  const points = spreadOver(region, POINTS);
  const row = new Float64Array(p);
  for (const point of points) {
    rowAt(point, row);
    for (let a = 0; a < p; a++)
      for (let b = 0; b < p; b++) out[a * p + b]! += (row[a]! * row[b]!) / points.length;
  }
  return out;
}
