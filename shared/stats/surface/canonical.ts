import { EigenvalueDecomposition, Matrix as MlMatrix, solve } from 'ml-matrix';
import { fromCoded } from '../coding/code';
import { isCategorical, type NumericFactor } from '../coding/factor';
import { leverageOfRow, meanOfRow, rowAt, type Predictor } from '../fit/predict';
import { restored } from '../fit/transform';
import { order } from '../model/term';

export type Nature = 'maximum' | 'minimum' | 'saddle' | 'ridge';

export interface Canonical {
  readonly stationaryPoint: Readonly<Record<string, number>>;
  readonly coded: Readonly<Record<string, number>>;
  readonly nature: Nature;
  readonly inRegion: boolean;
  /** Descending; `eigenvectors[k]` belongs to `eigenvalues[k]`, in the order of the factors. */
  readonly eigenvalues: readonly number[];
  readonly eigenvectors: readonly (readonly number[])[];
  readonly predicted: number;
  readonly standardError: number | null;
}

/** An eigenvalue this small beside the largest counts as 0: the surface is a ridge that way. */
const RIDGE = 0.02;

/** Gradient b and matrix B of y = b₀ + xᵀb + xᵀBx, or null when the model is no full second order. */
function secondOrder(predictor: Predictor): { b: number[]; matrix: number[][] } | null {
  const { factors, terms, coefficients } = predictor;
  if (factors.some(isCategorical)) return null;
  const k = factors.length;
  const b = new Array<number>(k).fill(0);
  const matrix = Array.from({ length: k }, () => new Array<number>(k).fill(0));
  let hasCurvature = false;
  for (const [j, term] of terms.entries()) {
    const degree = order(term);
    if (degree > 2) return null;
    const places = term.powers.flatMap((power, i) => new Array<number>(power).fill(i));
    const coefficient = coefficients[j]!;
    if (degree === 1) b[places[0]!] = coefficient;
    if (degree < 2) continue;
    const [i, l] = places as [number, number];
    hasCurvature = true;
    if (i === l) matrix[i]![i] = coefficient;
    else {
      matrix[i]![l] = coefficient / 2;
      matrix[l]![i] = coefficient / 2;
    }
  }
  return hasCurvature ? { b, matrix } : null;
}

function natureOf(eigenvalues: readonly number[]): Nature {
  const largest = Math.max(...eigenvalues.map(Math.abs));
  if (eigenvalues.some((value) => Math.abs(value) <= RIDGE * largest)) return 'ridge';
  if (eigenvalues.every((value) => value < 0)) return 'maximum';
  return eigenvalues.every((value) => value > 0) ? 'minimum' : 'saddle';
}

/** Largest component positive, so that a sign does not depend on the solver. */
function oriented(vector: readonly number[]): number[] {
  const largest = vector.reduce((a, b) => (Math.abs(b) > Math.abs(a) + 1e-12 ? b : a), 0);
  return vector.map((value) => (largest < 0 ? -value : value) + 0);
}

/**
 * Canonical analysis of a second-order model: the stationary point, what it is, and the principal axes
 * of the surface, in coded units on the analysed scale; the prediction is on the original scale.
 *
 * @returns null for a model without squares or products, with powers above two, or without a single
 *   stationary point.
 * @see Myers, Montgomery & Anderson-Cook (2016), Response Surface Methodology, 4th ed., §6.3.
 */
export function canonicalOf(predictor: Predictor): Canonical | null {
  const form = secondOrder(predictor);
  if (!form) return null;
  const eigen = new EigenvalueDecomposition(new MlMatrix(form.matrix), { assumeSymmetric: true });
  const order_ = eigen.realEigenvalues
    .map((value, i) => ({ value: value + 0, i }))
    .sort((a, b) => b.value - a.value);
  const eigenvalues = order_.map(({ value }) => value);
  const largest = Math.max(...eigenvalues.map(Math.abs));
  if (eigenvalues.some((value) => Math.abs(value) <= 1e-10 * largest)) return null;
  const vectors = eigen.eigenvectorMatrix;
  const solution = solve(
    new MlMatrix(form.matrix.map((row) => row.map((value) => 2 * value))),
    MlMatrix.columnVector(form.b.map((value) => -value)),
  );
  const point = solution.to1DArray();
  const numeric = predictor.factors as readonly NumericFactor[]; // secondOrder has refused the others
  const row = rowAt(predictor, point);
  const settings = numeric.map((factor, i) => fromCoded(factor, point[i]!));
  if (settings.some((value) => !Number.isFinite(value))) return null;
  return {
    stationaryPoint: Object.fromEntries(numeric.map(({ key }, i) => [key, settings[i]!])),
    coded: Object.fromEntries(numeric.map(({ key }, i) => [key, point[i]!])),
    nature: natureOf(eigenvalues),
    inRegion: point.every((value) => Math.abs(value) <= 1 + 1e-9),
    eigenvalues,
    eigenvectors: order_.map(({ i }) => oriented(vectors.getColumn(i))),
    predicted: restored(predictor.transform, meanOfRow(predictor, row)),
    standardError:
      predictor.residualSd === null
        ? null
        : predictor.residualSd * Math.sqrt(Math.max(0, leverageOfRow(predictor, row))),
  };
}
