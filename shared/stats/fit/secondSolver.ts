import { Matrix as MlMatrix, SingularValueDecomposition } from 'ml-matrix';
import MLR from 'ml-regression-multivariate-linear';
import { toNumber, type Dd } from '../linalg/dd';
import { ddRounded, type DdMatrix } from '../linalg/ddMatrix';

const MAX_DIGITS = 15;

function rowsOf(x: DdMatrix): number[][] {
  const { rows, cols, data } = ddRounded(x);
  return Array.from({ length: rows }, (_, i) => [...data.subarray(i * cols, (i + 1) * cols)]);
}

/**
 * Digits to which the coefficients agree with those of an independent solver (in plain doubles, on the
 * same coded columns): −log₁₀ of the largest difference over the largest coefficient, capped at 15.
 */
export function agreementDigits(
  x: DdMatrix,
  weightedY: readonly number[],
  coefficients: readonly Dd[],
): number {
  const other = new MLR(
    rowsOf(x),
    weightedY.map((value) => [value]),
    { intercept: false, statistics: false },
  );
  let difference = 0;
  let size = 0;
  coefficients.forEach((coefficient, j) => {
    const value = toNumber(coefficient);
    difference = Math.max(difference, Math.abs(other.weights[j]![0]! - value));
    size = Math.max(size, Math.abs(value));
  });
  if (difference === 0) return MAX_DIGITS;
  if (size === 0 || !Number.isFinite(difference)) return 0;
  return Math.min(MAX_DIGITS, Math.max(0, -Math.log10(difference / size)));
}

/** Ratio of the largest to the smallest singular value of the coded columns. */
export function conditionNumber(x: DdMatrix): number {
  const { diagonal } = new SingularValueDecomposition(new MlMatrix(rowsOf(x)), {
    computeLeftSingularVectors: false,
    computeRightSingularVectors: false,
  });
  const smallest = Math.min(...diagonal);
  return smallest > 0 ? Math.max(...diagonal) / smallest : Number.MAX_VALUE;
}
