import {
  CLASSES,
  LOWER_MM,
  MIDDLE_MM,
  RIG_SIEVES_MM,
  UPPER_MM,
  totalOf,
  type Masses,
} from './sizeClasses';
import type { Material } from './materials';

/** Free grains break by one form, whatever the material. */
const FREE_GRAIN = { phi: 0.25, gamma: 0.8, beta: 2.5 };
/** Size of the crushed zone's fines: 63.2 % passing in mm, slope. */
const CRUSHED = { d63Mm: 0.11, n: 0.9, topMm: 0.5 };
const MAX_FREED = 0.98;

/** Rosin–Rammler shares of the classes below a top size, summing to 1. */
export function rosinRammlerShares(d63Mm: number, n: number, topMm: number): Float64Array {
  const bounds = [...UPPER_MM, 0];
  const passing = bounds.map((size) => (size === 0 ? 0 : 1 - Math.exp(-((size / d63Mm) ** n))));
  const first = bounds.findIndex((size) => size < topMm);
  // what is coarser than the top is shared out over the classes that exist
  const cut = passing.map((value, i) => (i < first ? passing[first]! : value));
  const shares = Float64Array.from({ length: CLASSES }, (_, i) => cut[i]! - cut[i + 1]!);
  const sum = totalOf(shares);
  if (sum > 0) return shares.map((share) => share / sum);
  return Float64Array.from({ length: CLASSES }, (_, i) => (i === CLASSES - 1 ? 1 : 0));
}

/** Daughters of each class: row i says which share falls into which finer class. */
function daughters({ phi, gamma, beta }: typeof FREE_GRAIN): Float64Array[] {
  return Array.from({ length: CLASSES }, (_, i) => {
    const row = new Float64Array(CLASSES);
    if (i === CLASSES - 1) {
      row[i] = 1;
      return row;
    }
    // daughters pass the sieve that held their parent
    const parentMm = LOWER_MM[i]!;
    const passing = (size: number) =>
      size === 0 ? 0 : phi * (size / parentMm) ** gamma + (1 - phi) * (size / parentMm) ** beta;
    for (let j = i + 1; j < CLASSES; j++) row[j] = passing(UPPER_MM[j]!) - passing(LOWER_MM[j]!);
    const sum = totalOf(row);
    return row.map((share) => share / sum);
  });
}

/** Toughness by class, J/g: ε = ε0·(x/10)^−ζ, small pieces are tougher. */
const toughness = (at10mm: number, zeta: number) =>
  MIDDLE_MM.map((size) => at10mm * (size / 10) ** -zeta);

/** All that follows from a material alone. */
export interface BreakageTables {
  readonly composite: readonly Float64Array[];
  readonly free: readonly Float64Array[];
  /** Sizes of the grains freed from a class: by phase, then by class. */
  readonly natural: readonly (readonly Float64Array[])[];
  readonly crushed: Masses;
  readonly freedShare: readonly number[];
  readonly hit: readonly number[];
  readonly toughness: readonly number[];
  readonly phaseToughness: readonly (readonly number[])[];
}

function freedShares({ freedShare, freedSizeMm, freedExponent }: Material): number[] {
  return MIDDLE_MM.map((size) =>
    freedSizeMm === null
      ? freedShare
      : Math.min(MAX_FREED, freedShare / (1 + (size / freedSizeMm) ** freedExponent)),
  );
}

/** Breakage tables of a material whose sub-sample is `hardness` times as tough as the mean. */
export function breakageTables(material: Material, hardness: number): BreakageTables {
  return {
    composite: daughters(material),
    free: daughters(FREE_GRAIN),
    natural: material.phases.map(({ d63Mm, n }) =>
      UPPER_MM.map((upper) => rosinRammlerShares(d63Mm, n, upper)),
    ),
    crushed: rosinRammlerShares(CRUSHED.d63Mm, CRUSHED.n, CRUSHED.topMm),
    freedShare: freedShares(material),
    hit: MIDDLE_MM.map((size) => (size / 10) ** material.hitExponent),
    toughness: toughness(hardness * material.toughnessJPerG, material.zeta),
    phaseToughness: material.phases.map(({ toughnessJPerG, zeta }) =>
      toughness(hardness * toughnessJPerG, zeta),
    ),
  };
}

/** Place of the class that a sieve of the rig holds; −1 when it has no such sieve. */
export function classOf(apertureMm: number): number {
  return RIG_SIEVES_MM.findIndex((size) => Math.abs(size - apertureMm) < 1e-9);
}
