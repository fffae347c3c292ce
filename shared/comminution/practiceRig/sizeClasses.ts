/**
 * Size classes of the practice rig: ISO 565 R20/3 openings in mm, coarse to fine. Class i is what stays on
 * `APERTURES_MM[i]`; the last class is the pan.
 */
export const APERTURES_MM: readonly number[] = [
  63, 45, 31.5, 22.4, 16, 11.2, 8, 5.6, 4, 2.8, 2, 1.4, 1, 0.71, 0.5, 0.355, 0.25, 0.18, 0.125,
  0.09, 0.063,
];
export const CLASSES = APERTURES_MM.length + 1;
const TOP_MM = 90;
/** What stands for the finest size in the pan, where a class has no lower end. */
const PAN_FLOOR_MM = 0.045;

export const UPPER_MM: readonly number[] = [TOP_MM, ...APERTURES_MM];
export const LOWER_MM: readonly number[] = [...APERTURES_MM, 0];
/** Geometric mean size of each class. */
export const MEAN_MM: readonly number[] = UPPER_MM.map((upper, i) =>
  Math.sqrt(upper * (LOWER_MM[i]! > 0 ? LOWER_MM[i]! : PAN_FLOOR_MM)),
);

export type ClassMasses = Float64Array;
export const noMass = (): ClassMasses => new Float64Array(CLASSES);

/**
 * Rosin–Rammler shares by class, cut below `topMm`; they sum to 1.
 *
 * @param d63Mm size that 63.2 % passes; @param slope of the distribution.
 */
export function cutRosinRammler(d63Mm: number, slope: number, topMm: number): ClassMasses {
  const bounds = [...UPPER_MM, 0];
  const below = bounds.map((x) => (x === 0 ? 0 : 1 - Math.exp(-((x / d63Mm) ** slope))));
  const first = bounds.findIndex((x) => x < topMm);
  const level = first < 0 ? 0 : below[first]!;
  const cut = below.map((share, i) => (i < first ? level : share));
  const out = noMass();
  let sum = 0;
  for (let i = 0; i < CLASSES; i++) {
    out[i] = cut[i]! - cut[i + 1]!;
    sum += out[i]!;
  }
  if (sum <= 0) {
    out.fill(0);
    out[CLASSES - 1] = 1;
    return out;
  }
  return out.map((share) => share / sum);
}

/**
 * Daughters of each class: row i holds the shares that go to the finer classes j > i,
 * B(y) = φ·y^γ + (1 − φ)·y^β with y relative to the parent's own sieve.
 */
export function breakageRows(phi: number, gamma: number, beta: number): ClassMasses[] {
  const bounds = [...UPPER_MM, 0];
  return UPPER_MM.map((_, i) => {
    const row = noMass();
    if (i === CLASSES - 1) {
      row[i] = 1;
      return row;
    }
    const parent = LOWER_MM[i]!;
    const share = (x: number) =>
      x === 0 ? 0 : phi * (x / parent) ** gamma + (1 - phi) * (x / parent) ** beta;
    let sum = 0;
    for (let j = i + 1; j < CLASSES; j++) {
      row[j] = share(bounds[j]!) - (LOWER_MM[j]! > 0 ? share(bounds[j + 1]!) : 0);
      sum += row[j]!;
    }
    return row.map((each) => each / sum);
  });
}
