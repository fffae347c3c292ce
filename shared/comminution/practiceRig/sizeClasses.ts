/** ISO 565 R20/3 openings in mm, coarse to fine. Class i is what sieve i holds; the last is the pan. */
export const RIG_SIEVES_MM: readonly number[] = [
  63, 45, 31.5, 22.4, 16, 11.2, 8, 5.6, 4, 2.8, 2, 1.4, 1, 0.71, 0.5, 0.355, 0.25, 0.18, 0.125,
  0.09, 0.063,
];
/** No piece is larger. */
const TOP_MM = 90;
/** Stands for the pan where a logarithm of size is needed. */
const PAN_MM = 0.045;

export const CLASSES = RIG_SIEVES_MM.length + 1;
export const UPPER_MM: readonly number[] = [TOP_MM, ...RIG_SIEVES_MM];
export const LOWER_MM: readonly number[] = [...RIG_SIEVES_MM, 0];
/** Representative size of each class: the geometric mean of its bounds. */
export const MIDDLE_MM: readonly number[] = UPPER_MM.map((upper, i) =>
  Math.sqrt(upper * (LOWER_MM[i]! || PAN_MM)),
);

/** Grams by size class. */
export type Masses = Float64Array;

export const noMass = (): Masses => new Float64Array(CLASSES);

export function totalOf(masses: Masses): number {
  let sum = 0;
  for (const mass of masses) sum += mass;
  return sum;
}

/** target += factor · source */
export function addTo(target: Masses, source: ArrayLike<number>, factor = 1): void {
  for (let i = 0; i < target.length; i++) target[i]! += factor * source[i]!;
}

/** Mass of the classes that lie wholly below a size. */
export function massBelow(masses: Masses, sizeMm: number): number {
  return masses.reduce((sum, mass, i) => (UPPER_MM[i]! <= sizeMm + 1e-9 ? sum + mass : sum), 0);
}
