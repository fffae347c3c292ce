import type { RowAt } from '../model/compileRow';
import type { Random } from '../random/random';
import type { DesignRegion } from './designRegion';
import { candidatesOf, climb, type Variance } from './varianceSearch';
import { exchangeVertices, multiply, NO_WEIGHT, type WeightedDesign } from './weightedDesign';

/** max d/p − 1 at which the search stops. */
const TOLERANCE = 1e-3;
const MULTIPLICATIVE_STEPS = 10;
/** Work of one round, in multiplications: the steps are as many as it allows. */
const WORK = 1.5e8;
/** Rounds of adding points where the variance is too large; models with many terms get fewer, so that
 * an answer stays within seconds. The bound is then wider, and still a bound. */
const roundsFor = (terms: number) => (terms <= 50 ? 10 : 3);
const STARTS = 8;

export interface ApproximateDesign {
  /** ln|M*| of the best approximate design found. */
  readonly logDet: number;
  /** Largest scaled prediction variance found in the region; p at the optimum. */
  readonly maxVariance: number;
  readonly support: readonly { readonly point: readonly number[]; readonly weight: number }[];
}

function rowsOf(points: readonly (readonly number[])[], rowAt: RowAt, p: number): Float64Array {
  const rows = new Float64Array(points.length * p);
  points.forEach((point, i) => {
    rowAt(point, rows.subarray(i * p, (i + 1) * p));
  });
  return rows;
}

/** The candidates of largest variance, as starts to climb from. */
function startsOf(points: readonly (readonly number[])[], d: Float64Array) {
  return Array.from(d.keys())
    .sort((a, b) => d[b]! - d[a]!)
    .slice(0, STARTS)
    .map((i) => points[i]!);
}

export interface ApproximateTask {
  readonly region: DesignRegion;
  readonly rowAt: RowAt;
  /** p, the number of terms. */
  readonly terms: number;
}

/**
 * The best approximate design on a region, to max d/p − 1 ≤ 1e-3: multiplicative steps, then vertex
 * exchange on candidates; points of the region where the variance is larger join the candidates.
 *
 * @returns null when no design on the region separates the terms.
 * @see Kiefer & Wolfowitz (1960), Canad. J. Math. 12: 363–366 (max d = p at the optimum, so
 *   |M|^(1/p)·max d/p bounds every design); Silvey, Titterington & Torsney (1978).
 */
export function approximateDesign(task: ApproximateTask, random: Random): ApproximateDesign | null {
  const { region, rowAt, terms: p } = task;
  let points = candidatesOf(region, random);
  let weights = new Float64Array(points.length).fill(1 / points.length);
  for (let round = 1; ; round++) {
    const design: WeightedDesign = { p, rows: rowsOf(points, rowAt, p), weights };
    if (round === 1) multiply(design, MULTIPLICATIVE_STEPS);
    const steps = Math.ceil(WORK / (2 * points.length * p));
    const state = exchangeVertices(design, TOLERANCE / 3, steps);
    if (!state) return null;
    const search = { region, rowAt, inverse: state.inverse, terms: p };
    const found: Variance[] = startsOf(points, state.d).map((start) =>
      climb(search, start, random),
    );
    const maxVariance = Math.max(...state.d, ...found.map(({ value }) => value));
    if (maxVariance / p - 1 <= TOLERANCE || round === roundsFor(p))
      return { logDet: state.logDet, maxVariance, support: supportOf(points, weights) };
    const added = found.filter(({ value }) => value / p - 1 > TOLERANCE / 3);
    // candidates far from the optimum are let go: fewer rows, quicker rounds
    const kept = Array.from(points.keys()).filter(
      (i) => weights[i]! > NO_WEIGHT || state.d[i]! > p * 0.6,
    );
    points = [...kept.map((i) => points[i]!), ...added.map(({ point }) => [...point])];
    weights = Float64Array.from([...kept.map((i) => weights[i]!), ...added.map(() => 0)]);
  }
}

function supportOf(points: readonly (readonly number[])[], weights: Float64Array) {
  return points.flatMap((point, i) =>
    weights[i]! > NO_WEIGHT ? [{ point, weight: weights[i]! }] : [],
  );
}
