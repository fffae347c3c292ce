const LN_SQRT_2PI = 0.9189385332046727;

/** Lanczos coefficients, g = 607/128, n = 15 (Godfrey 2001): relative error of Γ about 1e-15. */
const LANCZOS = [
  0.9999999999999971, 57.15623566586292, -59.59796035547549, 14.136097974741746,
  -0.4919138160976202, 3.399464998481189e-5, 4.652362892704858e-5, -9.837447530487956e-5,
  0.0001580887032249125, -0.00021026444172410488, 0.00021743961811521265, -0.0001643181065367639,
  8.441822398385275e-5, -2.6190838401581408e-5, 3.6899182659531625e-6,
];

/** ln Γ(x) for x > 0. */
export function lnGamma(x: number): number {
  const z = x - 1;
  let sum = LANCZOS[0]!;
  for (let i = 1; i < LANCZOS.length; i++) sum += LANCZOS[i]! / (z + i);
  const t = z + 607 / 128 + 0.5;
  return (z + 0.5) * Math.log(t) - t + LN_SQRT_2PI + Math.log(sum);
}

/**
 * ln Γ(x + 1) − (x + ½) ln x + x − ln √2π: the error of Stirling's formula, without cancellation.
 *
 * @see Loader (2000), Fast and accurate computation of binomial probabilities.
 */
export function stirlingError(x: number): number {
  if (x < 16) return lnGamma(x + 1) - (x + 0.5) * Math.log(x) + x - LN_SQRT_2PI;
  const s = 1 / (x * x);
  return (
    (1 / 12 -
      (1 / 360 - (1 / 1260 - (1 / 1680 - (1 / 1188 - (691 / 360360) * s) * s) * s) * s) * s) /
    x
  );
}

/** x ln(x/m) + m − x, without cancellation for x near m. */
export function deviance(x: number, m: number): number {
  const v = (x - m) / (x + m);
  if (Math.abs(v) >= 0.1) return x * Math.log(x / m) + m - x;
  let sum = (x - m) * v;
  let term = 2 * x * v;
  for (let k = 1; ; k++) {
    term *= v * v;
    const next = sum + term / (2 * k + 1);
    if (next === sum) return sum;
    sum = next;
  }
}
