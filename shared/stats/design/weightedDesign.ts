import { cholesky, inverseOf, lnDeterminant } from '../linalg/cholesky';

/** Candidate rows with weights that sum to 1: an approximate design. Changed in place by the steps below. */
export interface WeightedDesign {
  readonly p: number;
  /** m rows of p. */
  readonly rows: Float64Array;
  readonly weights: Float64Array;
}

/** Inverse information M⁻¹ and the scaled variance d = f′M⁻¹f of every candidate. */
export interface WeightedState {
  readonly inverse: Float64Array;
  readonly d: Float64Array;
  readonly logDet: number;
}

/** Weights below this are no support. */
export const NO_WEIGHT = 1e-12;
/** Exchanges after which variances are computed anew, against drift. */
const REFRESH = 250;

function informationOf({ p, rows, weights }: WeightedDesign): Float64Array {
  const m = new Float64Array(p * p);
  for (let i = 0; i < weights.length; i++) {
    const w = weights[i]!;
    if (w <= 0) continue;
    for (let a = 0; a < p; a++) {
      const wa = w * rows[i * p + a]!;
      if (wa === 0) continue;
      for (let b = 0; b <= a; b++) m[a * p + b]! += wa * rows[i * p + b]!;
    }
  }
  return m;
}

/** M⁻¹ times candidate row `at`. */
function solveFor({ p, rows }: WeightedDesign, inverse: Float64Array, at: number): Float64Array {
  const v = new Float64Array(p);
  for (let a = 0; a < p; a++) {
    let sum = 0;
    for (let b = 0; b < p; b++) sum += inverse[a * p + b]! * rows[at * p + b]!;
    v[a] = sum;
  }
  return v;
}

function dot(rows: Float64Array, i: number, v: Float64Array): number {
  const p = v.length;
  let sum = 0;
  for (let a = 0; a < p; a++) sum += rows[i * p + a]! * v[a]!;
  return sum;
}

/** The state of a design; null when its information matrix is singular. */
function stateOf(design: WeightedDesign): WeightedState | null {
  const { p, rows, weights } = design;
  const l = cholesky(informationOf(design), p);
  if (!l) return null;
  const inverse = inverseOf(l, p);
  const d = weights.map((_, i) => dot(rows, i, solveFor(design, inverse, i)));
  return { inverse, d, logDet: lnDeterminant(l, p) };
}

/**
 * Multiplicative steps w ← w·d/p: each raises the determinant; quick at first, slow at the end.
 *
 * @see Silvey, Titterington & Torsney (1978), An algorithm for optimal designs on a finite design space,
 *   Commun. Statist. A 7: 1379–1389.
 */
export function multiply(design: WeightedDesign, steps: number): void {
  for (let step = 0; step < steps; step++) {
    const state = stateOf(design);
    if (!state) return;
    for (let i = 0; i < design.weights.length; i++) design.weights[i]! *= state.d[i]! / design.p;
  }
}

/** M + share·ff′ for candidate `at`: renews inverse and variances in place. */
function addRow(design: WeightedDesign, state: WeightedState, at: number, share: number): void {
  const { p, rows } = design;
  const { inverse, d } = state;
  const v = solveFor(design, inverse, at);
  const factor = share / (1 + share * d[at]!);
  for (let a = 0; a < p; a++)
    for (let b = 0; b < p; b++) inverse[a * p + b]! -= factor * v[a]! * v[b]!;
  for (let i = 0; i < d.length; i++) d[i]! -= factor * dot(rows, i, v) ** 2;
}

function extremesOf({ weights }: WeightedDesign, { d }: WeightedState) {
  let up = 0;
  let down = -1;
  for (let i = 0; i < d.length; i++) {
    if (d[i]! > d[up]!) up = i;
    if (weights[i]! > NO_WEIGHT && (down < 0 || d[i]! < d[down]!)) down = i;
  }
  return { up, down };
}

/**
 * Moves weight from the support point of least variance to the candidate of largest, by the amount that
 * raises the determinant most, until max d/p − 1 ≤ tolerance.
 *
 * @see Böhning (1986), A vertex-exchange-method in D-optimal design theory, Metrika 33: 337–347.
 */
export function exchangeVertices(
  design: WeightedDesign,
  tolerance: number,
  maxSteps: number,
): WeightedState | null {
  const { p, rows, weights } = design;
  let state = stateOf(design);
  for (let step = 1; state && step <= maxSteps; step++) {
    const { up, down } = extremesOf(design, state);
    if (up === down || state.d[up]! / p - 1 <= tolerance) break;
    const between = dot(rows, up, solveFor(design, state.inverse, down));
    const [dUp, dDown] = [state.d[up]!, state.d[down]!];
    const curvature = 2 * (dUp * dDown - between ** 2);
    const best = curvature > 0 ? (dUp - dDown) / curvature : Infinity;
    const share = Math.min(best, weights[down]!);
    weights[up]! += share;
    weights[down]! -= share;
    if (step % REFRESH === 0) {
      state = stateOf(design);
      continue;
    }
    addRow(design, state, up, share);
    addRow(design, state, down, -share);
  }
  return stateOf(design);
}
