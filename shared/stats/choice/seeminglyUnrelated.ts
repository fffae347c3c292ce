import { cholesky, inverseOf } from '../linalg/cholesky';
import { chiSquareDeviate, type Random } from '../random/random';
import type { JointDraws, JointResponse } from './joint';

/** Σ over runs of products of residuals, m × m. */
export function crossProducts(residuals: readonly (readonly number[])[]): Float64Array {
  const m = residuals.length;
  const s = new Float64Array(m * m);
  for (let a = 0; a < m; a++)
    for (let b = 0; b < m; b++)
      s[a * m + b] = residuals[a]!.reduce((sum, e, i) => sum + e * residuals[b]![i]!, 0);
  return s;
}

const BURN_IN = 200;

/** The runs that all responses have in common. */
function common(responses: readonly JointResponse[]): JointResponse[] {
  const shared = responses[0]!.keys.filter((key) =>
    responses.every(({ keys }) => keys.includes(key)),
  );
  return responses.map((each) => {
    const at = shared.map((key) => each.keys.indexOf(key));
    return {
      ...each,
      keys: shared,
      rows: at.map((i) => each.rows[i]!),
      z: at.map((i) => each.z[i]!),
    };
  });
}

/** A draw from the inverse Wishart with `df` and scale `s` (m × m), by Bartlett's decomposition. */
function inverseWishart(
  s: Float64Array,
  m: number,
  df: number,
  random: Random,
): Float64Array | null {
  const l = cholesky(s, m);
  if (!l) return null;
  const inverse = inverseOf(l, m);
  const root = cholesky(inverse, m);
  if (!root) return null;
  const a = new Float64Array(m * m);
  for (let i = 0; i < m; i++) {
    a[i * m + i] = Math.sqrt(chiSquareDeviate(df - i, random));
    for (let j = 0; j < i; j++) a[i * m + j] = random.normal();
  }
  const half = new Float64Array(m * m);
  for (let i = 0; i < m; i++)
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let k = j; k <= i; k++) sum += root[i * m + k]! * a[k * m + j]!;
      half[i * m + j] = sum;
    }
  const precision = new Float64Array(m * m);
  for (let i = 0; i < m; i++)
    for (let j = 0; j < m; j++) {
      let sum = 0;
      for (let k = 0; k < m; k++) sum += half[i * m + k]! * half[j * m + k]!;
      precision[i * m + j] = sum;
    }
  const factor = cholesky(precision, m);
  return factor ? inverseOf(factor, m) : null;
}

interface Gibbs {
  readonly responses: readonly JointResponse[];
  readonly offsets: readonly number[];
  readonly size: number;
  /** X_rᵀX_s and X_rᵀz_s. */
  readonly gram: (r: number, s: number) => Float64Array;
  readonly cross: (r: number, s: number) => Float64Array;
}

function gibbsOf(responses: readonly JointResponse[]): Gibbs {
  const offsets: number[] = [];
  let size = 0;
  for (const { names } of responses) {
    offsets.push(size);
    size += names.length;
  }
  const pairs = responses.map((a) =>
    responses.map((b) => {
      const gram = new Float64Array(a.names.length * b.names.length);
      const cross = new Float64Array(a.names.length);
      a.rows.forEach((row, i) => {
        for (let p = 0; p < a.names.length; p++) {
          cross[p]! += row[p]! * b.z[i]!;
          for (let q = 0; q < b.names.length; q++)
            gram[p * b.names.length + q]! += row[p]! * b.rows[i]![q]!;
        }
      });
      return { gram, cross };
    }),
  );
  return {
    responses,
    offsets,
    size,
    gram: (r, s) => pairs[r]![s]!.gram,
    cross: (r, s) => pairs[r]![s]!.cross,
  };
}

/** β given Σ: normal, with precision Σ⁻¹ laid over the cross-products. */
function drawCoefficients(gibbs: Gibbs, sigma: Float64Array, random: Random): Float64Array | null {
  const { responses, offsets, size } = gibbs;
  const m = responses.length;
  const factor = cholesky(sigma, m);
  if (!factor) return null;
  const weights = inverseOf(factor, m);
  const precision = new Float64Array(size * size);
  const right = new Float64Array(size);
  for (let r = 0; r < m; r++)
    for (let s = 0; s < m; s++) {
      const w = weights[r * m + s]!;
      const gram = gibbs.gram(r, s);
      const cross = gibbs.cross(r, s);
      const [pr, ps] = [responses[r]!.names.length, responses[s]!.names.length];
      for (let p = 0; p < pr; p++) {
        right[offsets[r]! + p]! += w * cross[p]!;
        for (let q = 0; q < ps; q++)
          precision[(offsets[r]! + p) * size + offsets[s]! + q] = w * gram[p * ps + q]!;
      }
    }
  const l = cholesky(precision, size);
  if (!l) return null;
  // L u = right, then Lᵀ β = u + normal deviates
  const u = new Float64Array(size);
  for (let i = 0; i < size; i++) {
    let sum = right[i]!;
    for (let k = 0; k < i; k++) sum -= l[i * size + k]! * u[k]!;
    u[i] = sum / l[i * size + i]!;
  }
  const beta = new Float64Array(size);
  for (let i = size - 1; i >= 0; i--) {
    let sum = u[i]! + random.normal();
    for (let k = i + 1; k < size; k++) sum -= l[k * size + i]! * beta[k]!;
    beta[i] = sum / l[i * size + i]!;
  }
  return beta;
}

function residualsAt({ responses, offsets }: Gibbs, beta: Float64Array): number[][] {
  return responses.map(({ rows, z, names }, r) =>
    rows.map((row, i) => {
      let mean = 0;
      for (let p = 0; p < names.length; p++) mean += row[p]! * beta[offsets[r]! + p]!;
      return z[i]! - mean;
    }),
  );
}

interface SurDraw {
  readonly beta: Float64Array;
  readonly deviation: Float64Array;
}

function chain(gibbs: Gibbs, draws: number, random: Random): SurDraw[] | null {
  const { responses } = gibbs;
  const m = responses.length;
  const n = responses[0]!.rows.length;
  const start = new Float64Array(m * m);
  responses.forEach(({ residualSd }, r) => (start[r * m + r] = (residualSd ?? 1) ** 2 || 1e-12));
  let sigma: Float64Array = start;
  const kept: SurDraw[] = [];
  for (let i = 0; i < BURN_IN + draws; i++) {
    const beta = drawCoefficients(gibbs, sigma, random);
    if (!beta) return null;
    const drawn = inverseWishart(crossProducts(residualsAt(gibbs, beta)), m, n, random);
    if (!drawn) return null;
    sigma = drawn;
    const l = cholesky(sigma, m);
    if (!l) return null;
    if (i < BURN_IN) continue;
    const z = Float64Array.from({ length: m }, () => random.normal());
    const deviation = Float64Array.from({ length: m }, (_, r) => {
      let sum = 0;
      for (let c = 0; c <= r; c++) sum += l[r * m + c]! * z[c]!;
      return sum;
    });
    kept.push({ beta, deviation });
  }
  return kept;
}

/**
 * Different models for the responses: seemingly unrelated regressions by Gibbs sampling on the runs that
 * all have in common.
 *
 * @see Zellner (1971), §8.5; Percy (1992), J. R. Statist. Soc. B 54: 243–252.
 */
export function seeminglyUnrelated(
  all: readonly JointResponse[],
  draws: number,
  random: Random,
): JointDraws | null {
  if (all.length < 2 || all.some(({ isWeighted }) => isWeighted)) return null;
  const responses = common(all);
  const n = responses[0]!.rows.length;
  const most = Math.max(...responses.map(({ names }) => names.length));
  if (n - most - responses.length + 1 <= 0) return null;
  const gibbs = gibbsOf(responses);
  const kept = chain(gibbs, draws, random);
  if (!kept) return null;
  return {
    kind: 'seemingly-unrelated',
    count({ rows }, holds) {
      const m = responses.length;
      let hits = 0;
      for (const { beta, deviation } of kept) {
        let isAll = true;
        for (let r = 0; r < m && isAll; r++) {
          const row = rows[r]!;
          const offset = gibbs.offsets[r]!;
          let mean = 0;
          for (let p = 0; p < row.length; p++) mean += row[p]! * beta[offset + p]!;
          isAll = holds(r, mean + deviation[r]!);
        }
        if (isAll) hits++;
      }
      return hits;
    },
  };
}
