/** One sieve of a stack, with the mass that stayed on it. */
export interface SieveRow {
  readonly apertureMm: number;
  readonly retainedG: number;
}

/** A point of the cumulative curve: percent by mass of the recovered sum that passes a size. */
export interface CurvePoint {
  readonly sizeMm: number;
  readonly passingPercent: number;
}

export type Interpolation = 'logSize' | 'logLog';

/**
 * The cumulative passing curve, coarse to fine.
 *
 * @param sieves masses in g, in any order, openings distinct and in mm.
 * @param panG mass in the pan, g.
 * @returns percent of the recovered sum (not of the feed) that passes each opening; 0 where nothing was
 *   recovered.
 */
export function passingCurve(sieves: readonly SieveRow[], panG: number): CurvePoint[] {
  const rows = [...sieves].sort((a, b) => b.apertureMm - a.apertureMm);
  const below: number[] = [];
  // from the pan upwards, so that no passing is a small difference of large sums
  let passed = panG;
  for (const { retainedG } of [...rows].reverse()) {
    below.unshift(passed);
    passed += retainedG;
  }
  return rows.map(({ apertureMm }, i) => ({
    sizeMm: apertureMm,
    passingPercent: passed === 0 ? 0 : (100 * below[i]!) / passed,
  }));
}

const axisOf = (interpolation: Interpolation) =>
  interpolation === 'logLog' ? Math.log : (percent: number) => percent;

/**
 * Percent passing at a size; read directly at a sieve of the stack, else interpolated between its
 * neighbours.
 *
 * @param curve coarse to fine.
 * @returns percent, or null outside the stack and where a logarithm has no value: nothing is extrapolated.
 */
export function passingAt(
  curve: readonly CurvePoint[],
  sizeMm: number,
  interpolation: Interpolation,
): number | null {
  const exact = curve.find((point) => Math.abs(point.sizeMm - sizeMm) <= 1e-9 * sizeMm);
  if (exact) return exact.passingPercent;
  const i = curve.findIndex((point) => point.sizeMm < sizeMm);
  if (i <= 0) return null;
  const coarse = curve[i - 1]!;
  const fine = curve[i]!;
  if (interpolation === 'logLog' && fine.passingPercent === 0) return null;
  const share = Math.log(sizeMm / fine.sizeMm) / Math.log(coarse.sizeMm / fine.sizeMm);
  const axis = axisOf(interpolation);
  const value =
    axis(fine.passingPercent) + share * (axis(coarse.passingPercent) - axis(fine.passingPercent));
  return interpolation === 'logLog' ? Math.exp(value) : value;
}

/**
 * The size that a percentage passes, mm: between the two sieves that bracket it, linear in ln(size)
 * (`logSize`) or with ln(passing) linear in ln(size) (`logLog`).
 *
 * @returns mm, or null when the stack does not bracket the percentage.
 */
export function sizeAt(
  curve: readonly CurvePoint[],
  percent: number,
  interpolation: Interpolation,
): number | null {
  const axis = axisOf(interpolation);
  for (let i = 0; i + 1 < curve.length; i++) {
    const coarse = curve[i]!;
    const fine = curve[i + 1]!;
    if (coarse.passingPercent < percent || fine.passingPercent > percent) continue;
    if (coarse.passingPercent === fine.passingPercent) return fine.sizeMm;
    if (fine.passingPercent === 0 && interpolation === 'logLog') return null;
    const share =
      (axis(percent) - axis(fine.passingPercent)) /
      (axis(coarse.passingPercent) - axis(fine.passingPercent));
    return fine.sizeMm * (coarse.sizeMm / fine.sizeMm) ** share;
  }
  return null;
}
