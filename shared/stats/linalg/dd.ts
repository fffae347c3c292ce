/**
 * Double-double numbers: an unevaluated sum hi + lo of two doubles with |lo| ≤ ½ ulp(hi), about 32 digits.
 *
 * @see Dekker (1971), Numer. Math. 18: 224–242; Knuth, TAOCP 2, §4.2.2; Hida, Li & Bailey (2001), ARITH-15.
 */
export type Dd = readonly [hi: number, lo: number];

export const DD_ZERO: Dd = [0, 0];
export const DD_ONE: Dd = [1, 0];

const SPLITTER = 134_217_729; // 2^27 + 1

export const dd = (value: number): Dd => [value, 0];
export const toNumber = ([hi, lo]: Dd): number => hi + lo;

function quickTwoSum(a: number, b: number): Dd {
  const s = a + b;
  return [s, b - (s - a)];
}

function twoSum(a: number, b: number): Dd {
  const s = a + b;
  const v = s - a;
  return [s, a - (s - v) + (b - v)];
}

/** a·b exactly. */
export function twoProduct(a: number, b: number): Dd {
  const p = a * b;
  const ta = SPLITTER * a;
  const aHigh = ta - (ta - a);
  const aLow = a - aHigh;
  const tb = SPLITTER * b;
  const bHigh = tb - (tb - b);
  const bLow = b - bHigh;
  return [p, aHigh * bHigh - p + aHigh * bLow + aLow * bHigh + aLow * bLow];
}

export function ddAdd(a: Dd, b: Dd): Dd {
  const [s1, s2] = twoSum(a[0], b[0]);
  const [t1, t2] = twoSum(a[1], b[1]);
  const [u1, u2] = quickTwoSum(s1, s2 + t1);
  return quickTwoSum(u1, u2 + t2);
}

export const ddNegate = ([hi, lo]: Dd): Dd => [-hi, -lo];
export const ddSubtract = (a: Dd, b: Dd): Dd => ddAdd(a, ddNegate(b));

export function ddMultiply(a: Dd, b: Dd): Dd {
  const [p, e] = twoProduct(a[0], b[0]);
  return quickTwoSum(p, e + a[0] * b[1] + a[1] * b[0]);
}

export function ddDivide(a: Dd, b: Dd): Dd {
  const q1 = a[0] / b[0];
  let rest = ddSubtract(a, ddMultiply(b, dd(q1)));
  const q2 = rest[0] / b[0];
  rest = ddSubtract(rest, ddMultiply(b, dd(q2)));
  const q3 = rest[0] / b[0];
  return ddAdd(quickTwoSum(q1, q2), dd(q3));
}

/** √a for a ≥ 0. One Newton step from the double root (Karp's trick). */
export function ddSqrt(a: Dd): Dd {
  if (a[0] <= 0) return DD_ZERO;
  const x = 1 / Math.sqrt(a[0]);
  const ax = a[0] * x;
  const rest = ddSubtract(a, twoProduct(ax, ax));
  return quickTwoSum(ax, rest[0] * x * 0.5);
}

export function ddPower(a: Dd, exponent: number): Dd {
  let result = DD_ONE;
  for (let i = 0; i < exponent; i++) result = ddMultiply(result, a);
  return result;
}
