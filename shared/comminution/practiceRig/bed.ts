import type { BreakageTables } from './breakage';
import type { Material } from './materials';
import {
  CLASSES,
  LOWER_MM,
  MIDDLE_MM,
  UPPER_MM,
  addTo,
  noMass,
  totalOf,
  type Masses,
} from './sizeClasses';

/** The crushed zone takes no more than this share of the bed, and of what can be crushed. */
const MAX_CRUSHED_OF_BED = 0.3;
const MAX_CRUSHED_OF_SOURCE = 0.5;
/** Only pieces from here up are crushed by a channel through them, mm. */
const CRUSHED_FROM_MM = 0.25;
/** Fields far below the threshold still crush a little. */
const MIN_EXCESS = 0.3;

/** What lies in the vessel, in g by size class: composite pieces, and free grains of each phase. */
export interface Bed {
  readonly composite: Masses;
  readonly free: readonly Masses[];
}

export function emptyBed(phases: number): Bed {
  return { composite: noMass(), free: Array.from({ length: phases }, noMass) };
}

/** All mass by size class, g. */
export function allOf({ composite, free }: Bed): Masses {
  const all = composite.slice();
  for (const masses of free) addTo(all, masses);
  return all;
}

/** Mass that can bridge a gap, g: a piece counts in full from 0.35 of the gap. */
export function bridgingMass(all: Masses, gapMm: number): number {
  return all.reduce((sum, mass, i) => sum + mass * Math.min(1, MIDDLE_MM[i]! / (0.35 * gapMm)), 0);
}

interface Work {
  readonly workJ: number;
  readonly excess: number;
}

/** Work shared over classes by mass × hit weight breaks 1 − exp(−e/ε) of each class. */
function breakPieces(bed: Bed, material: Material, tables: BreakageTables, workJ: number): void {
  const { composite, free } = bed;
  const weights = [composite, ...free].map((masses, k) => {
    const hit = k === 0 ? 1 : material.phases[k - 1]!.hit;
    return masses.map((mass, i) => mass * tables.hit[i]! * hit);
  });
  const all = weights.reduce((sum, weight) => sum + totalOf(weight), 0);
  const taken = (masses: Masses, k: number, i: number, toughnessJPerG: number): number => {
    const mass = masses[i]!;
    if (mass <= 1e-9) return 0;
    const perGramJ = (workJ * weights[k]![i]!) / all / mass;
    const broken = mass * (1 - Math.exp(-perGramJ / toughnessJPerG));
    masses[i] = mass - broken;
    return broken;
  };
  const newComposite = noMass();
  const newFree = free.map(noMass);
  for (let i = 0; i < CLASSES - 1; i++) {
    const broken = taken(composite, 0, i, tables.toughness[i]!);
    const freed = tables.freedShare[i]! * broken;
    addTo(newComposite, tables.composite[i]!, broken - freed);
    free.forEach((masses, k) => {
      addTo(newFree[k]!, tables.natural[k]![i]!, freed * material.phases[k]!.share);
      const ground = taken(masses, k + 1, i, tables.phaseToughness[k]![i]!);
      addTo(newFree[k]!, tables.free[i]!, ground);
    });
  }
  addTo(composite, newComposite);
  free.forEach((masses, k) => addTo(masses, newFree[k]!));
}

/** The zone round the channel becomes fines at once; crushed composite counts as freed. */
function crush(bed: Bed, material: Material, tables: BreakageTables, crushedG: number): void {
  const coarse = (masses: Masses) =>
    masses.map((mass, i) => (LOWER_MM[i]! >= CRUSHED_FROM_MM ? mass : 0));
  const fromComposite = coarse(bed.composite);
  const fromFree = bed.free.map((masses, k) =>
    material.phases[k]!.isMetal ? noMass() : coarse(masses),
  );
  const source = totalOf(fromComposite) + fromFree.reduce((sum, m) => sum + totalOf(m), 0);
  if (source <= 0) return;
  const share = Math.min(MAX_CRUSHED_OF_SOURCE, crushedG / source);
  addTo(bed.composite, fromComposite, -share);
  bed.free.forEach((masses, k) => {
    const grams = totalOf(fromFree[k]!) + totalOf(fromComposite) * material.phases[k]!.share;
    addTo(masses, fromFree[k]!, -share);
    addTo(masses, tables.crushed, share * grams);
  });
}

/** One pulse’s work on the bed, in place. */
export function workOn(bed: Bed, material: Material, tables: BreakageTables, work: Work): void {
  const { crushedGPerJ, crushedExponent } = material;
  const zoneG = crushedGPerJ * work.workJ * Math.max(work.excess, MIN_EXCESS) ** crushedExponent;
  const crushedG = Math.min(MAX_CRUSHED_OF_BED * totalOf(allOf(bed)), zoneG);
  breakPieces(bed, material, tables, work.workJ);
  crush(bed, material, tables, crushedG);
}

/** Moves a share of everything below a size from one bed into another, in place. */
export function screenOut(from: Bed, into: Bed, sizeMm: number, share: number): void {
  const pairs = [[from.composite, into.composite] as const].concat(
    from.free.map((masses, k) => [masses, into.free[k]!] as const),
  );
  for (const [source, target] of pairs) {
    const out = source.map((mass, i) => (UPPER_MM[i]! <= sizeMm + 1e-9 ? share * mass : 0));
    addTo(target, out);
    addTo(source, out, -1);
  }
}
