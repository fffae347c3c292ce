import { StatsError } from '../errors';

export type TransformKind = 'none' | 'log' | 'sqrt' | 'logit' | 'boxcox';

/** A response's transformation with its parameters settled. */
export interface Transform {
  readonly kind: TransformKind;
  /** logit: bounds of the response. */
  readonly lower: number;
  readonly upper: number;
  /** logit: runs used, when the values were moved off the bounds, else 0. */
  readonly movedBy: number;
  /** boxcox: the power. */
  readonly lambda: number;
}

export const IDENTITY: Transform = { kind: 'none', lower: 0, upper: 1, movedBy: 0, lambda: 1 };

/** Below this size a Box–Cox power counts as 0: the logarithm. */
const LAMBDA_ZERO = 1e-8;

const outOfBounds = (message: string) => new StatsError('out-of-bounds', message);

function refuseOutside(kind: TransformKind, values: readonly number[]): void {
  const smallest = Math.min(...values);
  if ((kind === 'log' || kind === 'boxcox') && smallest <= 0)
    throw outOfBounds(
      `A logarithm or power needs values above 0; the smallest is ${smallest}. Take no transformation, or the square root.`,
    );
  if (kind === 'sqrt' && smallest < 0)
    throw outOfBounds(`A square root needs values of 0 or more; the smallest is ${smallest}.`);
}

function settleLogit(values: readonly number[], lower: number, upper: number): Transform {
  if (!(lower < upper))
    throw outOfBounds(`The bounds of the logit run from ${lower} to ${upper}: they are reversed.`);
  const outside = values.find((value) => value < lower || value > upper);
  if (outside !== undefined)
    throw outOfBounds(`The value ${outside} lies outside the bounds ${lower} to ${upper}.`);
  const isOnBound = values.some((value) => value === lower || value === upper);
  return { kind: 'logit', lower, upper, movedBy: isOnBound ? values.length : 0, lambda: 1 };
}

/**
 * Settles a transformation for these values.
 *
 * Logit: when any value lies on a bound all are moved, y′ = (y(n − 1) + ½)/n in units of the bounds
 * (Smithson & Verkuilen 2006, Psychological Methods 11: 54–71).
 *
 * @throws StatsError `out-of-bounds` when a value has no image.
 */
export function settleTransform(
  kind: TransformKind,
  values: readonly number[],
  parameters: {
    lower?: number | undefined;
    upper?: number | undefined;
    lambda?: number | undefined;
  },
): Transform {
  const { lower = 0, upper = 100, lambda = 1 } = parameters;
  refuseOutside(kind, values);
  if (kind === 'logit') return settleLogit(values, lower, upper);
  return { ...IDENTITY, kind, lambda };
}

/** The share of the bounds, moved off them where settled so. */
function shareOf({ lower, upper, movedBy }: Transform, value: number): number {
  const share = (value - lower) / (upper - lower);
  return movedBy > 0 ? (share * (movedBy - 1) + 0.5) / movedBy : share;
}

/** From the original to the analysed scale. */
export function transformed(transform: Transform, value: number): number {
  switch (transform.kind) {
    case 'none':
      return value;
    case 'log':
      return Math.log(value);
    case 'sqrt':
      return Math.sqrt(value);
    case 'logit': {
      const share = shareOf(transform, value);
      return Math.log(share / (1 - share));
    }
    case 'boxcox':
      return Math.abs(transform.lambda) < LAMBDA_ZERO
        ? Math.log(value)
        : Math.expm1(transform.lambda * Math.log(value)) / transform.lambda;
  }
}

/**
 * From the analysed back to the original scale: a median. A value beyond the image of the
 * transformation (a square root below 0) comes back as its bound.
 */
export function restored(transform: Transform, value: number): number {
  switch (transform.kind) {
    case 'none':
      return value;
    case 'log':
      return Math.exp(value);
    case 'sqrt':
      return Math.max(0, value) ** 2;
    case 'logit': {
      const { lower, upper, movedBy } = transform;
      const share = 1 / (1 + Math.exp(-value));
      const unmoved = movedBy > 0 ? (share * movedBy - 0.5) / (movedBy - 1) : share;
      return lower + (upper - lower) * Math.min(1, Math.max(0, unmoved));
    }
    case 'boxcox': {
      const { lambda } = transform;
      if (Math.abs(lambda) < LAMBDA_ZERO) return Math.exp(value);
      const inner = lambda * value;
      if (inner <= -1) return lambda > 0 ? 0 : Number.MAX_VALUE;
      return Math.min(Number.MAX_VALUE, Math.exp(Math.log1p(inner) / lambda));
    }
  }
}

/** ln |dz/dy| of the transformation at a value: what makes likelihoods of different scales comparable. */
export function lnJacobian(transform: Transform, value: number): number {
  switch (transform.kind) {
    case 'none':
      return 0;
    case 'log':
      return -Math.log(value);
    case 'sqrt':
      return -Math.log(2) - Math.log(value) / 2;
    case 'logit': {
      const { lower, upper, movedBy } = transform;
      const share = shareOf(transform, value);
      const shrink = movedBy > 0 ? (movedBy - 1) / movedBy : 1;
      return Math.log(shrink / (upper - lower)) - Math.log(share * (1 - share));
    }
    case 'boxcox':
      return (transform.lambda - 1) * Math.log(value);
  }
}
