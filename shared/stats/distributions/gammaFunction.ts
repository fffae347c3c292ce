const LN_SQRT_2PI = 0.918938533204672741780329736406;

/** Lanczos coefficients, g = 607/128, n = 15 (Godfrey 2001): relative error of Γ about 1e-15. */
const LANCZOS = [
  0.99999999999999709182, 57.156235665862923517, -59.597960355475491248, 14.136097974741747174,
  -0.49191381609762019978, 0.33994649984811888699e-4, 0.46523628927048575665e-4,
  -0.98374475304879564677e-4, 0.15808870322491248884e-3, -0.21026444172410488319e-3,
  0.2174396181152126432e-3, -0.16431810653676389022e-3, 0.84418223983852743293e-4,
  -0.2619083840158140867e-4, 0.36899182659531622704e-5,
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
