import { StatsError } from '../errors';
import {
  DD_ZERO,
  dd,
  ddAdd,
  ddDivide,
  ddMultiply,
  ddSubtract,
  toNumber,
  type Dd,
} from '../linalg/dd';
import { ddGet, ddRounded, type DdMatrix } from '../linalg/ddMatrix';
import { backSubstitute, ddQr, forwardSubstitute, inverseGram } from '../linalg/ddQr';
import type { Matrix } from '../linalg/matrix';
import type { CodedColumns } from './codedColumns';

/** Beside this share of the total, a residual sum of squares is rounding, not error. */
const PERFECT = 1e-28;
/** Coefficients below this take no part in a dependency when it is named. */
const TAKES_PART = 1e-8;

/** A least-squares fit in double-double; everything weighted where weights were given. */
export interface LeastSquares {
  readonly n: number;
  readonly p: number;
  readonly coefficients: readonly Dd[];
  /** (XᵀX)⁻¹, p × p. */
  readonly inverse: DdMatrix;
  readonly inverseRounded: Matrix;
  /** Each column's share of the sum of squares given those before it. */
  readonly effectSs: readonly Dd[];
  readonly residualSs: Dd;
  /** Residuals on the response's own scale, unweighted. */
  readonly residuals: readonly number[];
  readonly fitted: readonly number[];
  readonly leverages: readonly number[];
  readonly isPerfect: boolean;
}

function refuseDependent(names: readonly string[], r: DdMatrix, column: number): never {
  const z = Array.from({ length: column }, (_, i) => ddGet(r, i, column));
  const others = backSubstitute(r, z, column)
    .map((coefficient, i) => ({ name: names[i]!, size: Math.abs(toNumber(coefficient)) }))
    .filter(({ size }) => size > TAKES_PART)
    .map(({ name }) => name);
  const terms = [...others, names[column]!];
  throw new StatsError(
    'aliased',
    terms.length === 1
      ? `The term ${names[column]!} is the same in every run, so its effect cannot be estimated. Drop it, or add runs that vary it.`
      : `These runs cannot tell these terms apart: ${terms.join(', ')}. Drop one of them, or add runs that separate them.`,
    { terms },
  );
}

/**
 * Ordinary or weighted least squares by Householder QR in double-double; never the normal equations.
 *
 * @param columns n × p coded columns with rows times √weight. @param y n values, unweighted.
 * @throws StatsError `too-few-runs` when n < p; `aliased`, naming the terms that depend on each other.
 */
export function leastSquares(columns: CodedColumns, y: readonly number[]): LeastSquares {
  const { x, names, rootWeights } = columns;
  const { rows: n, cols: p } = x;
  if (n < p)
    throw new StatsError(
      'too-few-runs',
      `This model has ${p} terms with intercept and blocks, but only ${n} runs have a value. Choose a smaller model or add at least ${p - n} run${p - n > 1 ? 's' : ''}.`,
      { runs: n, terms: p },
    );
  const weighted = y.map((value, i) => ddMultiply(rootWeights[i]!, dd(value)));
  const { r, effects, dependent } = ddQr(x, weighted);
  if (dependent >= 0) refuseDependent(names, r, dependent);
  const coefficients = backSubstitute(r, effects);
  const inverse = inverseGram(r);
  const squares = effects.map((effect) => ddMultiply(effect, effect));
  const total = squares.reduce((sum, square) => ddAdd(sum, square), DD_ZERO);
  const rest = squares.slice(p).reduce((sum, square) => ddAdd(sum, square), DD_ZERO);
  const isPerfect = toNumber(rest) <= PERFECT * toNumber(total);
  const fitted: number[] = [];
  const residuals: number[] = [];
  const leverages: number[] = [];
  for (let i = 0; i < n; i++) {
    const row = Array.from({ length: p }, (_, j) => ddGet(x, i, j));
    const value = row.reduce<Dd>(
      (sum, each, j) => ddAdd(sum, ddMultiply(each, coefficients[j]!)),
      DD_ZERO,
    );
    const own = ddDivide(value, rootWeights[i]!);
    fitted.push(toNumber(own));
    residuals.push(isPerfect ? 0 : toNumber(ddSubtract(dd(y[i]!), own)));
    const q = forwardSubstitute(r, row);
    const leverage = q.reduce<Dd>((sum, each) => ddAdd(sum, ddMultiply(each, each)), DD_ZERO);
    leverages.push(Math.min(1, toNumber(leverage)));
  }
  return {
    n,
    p,
    coefficients,
    inverse,
    inverseRounded: ddRounded(inverse),
    effectSs: squares.slice(0, p),
    residualSs: isPerfect ? DD_ZERO : rest,
    residuals,
    fitted,
    leverages,
    isPerfect,
  };
}
