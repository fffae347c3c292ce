import type { Material } from './materials';
import {
  APERTURES_MM,
  breakageRows,
  CLASSES,
  cutRosinRammler,
  LOWER_MM,
  MEAN_MM,
  noMass,
  UPPER_MM,
  type ClassMasses,
} from './sizeClasses';

const DAUGHTERS_OF_FREE_GRAINS = { phi: 0.25, gamma: 0.8, beta: 2.5 };
const MAX_FREED = 0.98;
/** The crushed zone takes from classes of at least this size. */
const CRUSHED_FROM_MM = 0.25;

/** The batch in the vessel: composite pieces and free grains of each phase, g by size class. */
export interface Batch {
  readonly composite: ClassMasses;
  readonly free: readonly ClassMasses[];
}

export function sumOf(masses: ClassMasses): number {
  let sum = 0;
  for (const mass of masses) sum += mass;
  return sum;
}

export function totalOf({ composite, free }: Batch): ClassMasses {
  return composite.map((mass, i) => free.reduce((sum, phase) => sum + phase[i]!, mass));
}

/** The batch as fed: composite pieces only. */
export function fedBatch(material: Material, feedMassG: number): Batch {
  const composite = noMass();
  for (const { apertureMm, share } of material.feed)
    composite[APERTURES_MM.indexOf(apertureMm)]! += share * feedMassG;
  return { composite, free: material.phases.map(noMass) };
}

/** How a material breaks, worked out once a run. */
export interface BreakageModel {
  readonly break: (batch: Batch, workJ: number) => void;
  readonly crush: (batch: Batch, massG: number) => void;
}

function freedShares(material: Material): number[] {
  const { freedShare, freedSizeMm, freedExponent } = material;
  if (freedSizeMm === null) return MEAN_MM.map(() => freedShare);
  return MEAN_MM.map((x) =>
    Math.min(MAX_FREED, freedShare / (1 + (x / freedSizeMm) ** freedExponent)),
  );
}

/**
 * Breakage of one material: work is shared over the classes by mass, size and readiness to be hit; the
 * broken share of a class is 1 − exp(−e/ε).
 *
 * @param hardness factor on every toughness of this bag.
 */
export function breakageModel(material: Material, hardness: number): BreakageModel {
  const { phases, breakage } = material;
  const compositeRows = breakageRows(breakage.phi, breakage.gamma, breakage.beta);
  const { phi, gamma, beta } = DAUGHTERS_OF_FREE_GRAINS;
  const freeRows = breakageRows(phi, gamma, beta);
  const natural = phases.map(({ d63Mm, slope }) =>
    UPPER_MM.map((upper) => cutRosinRammler(d63Mm, slope, upper)),
  );
  const fines = cutRosinRammler(0.11, 0.9, 0.5);
  const freed = freedShares(material);
  const weight = MEAN_MM.map((x) => (x / 10) ** material.hitExponent);
  const tough = (base: number, exponent: number) =>
    MEAN_MM.map((x) => hardness * base * (x / 10) ** -exponent);
  const compositeTough = tough(material.toughnessJPerG, material.toughnessExponent);
  const freeTough = phases.map((each) => tough(each.toughnessJPerG, each.toughnessExponent));

  const shareOfWork = (batch: Batch): number => {
    let sum = 0;
    for (let i = 0; i < CLASSES; i++) {
      sum += batch.composite[i]! * weight[i]!;
      phases.forEach(({ hit }, k) => (sum += batch.free[k]![i]! * weight[i]! * hit));
    }
    return sum;
  };

  return {
    break(batch, workJ) {
      const perWeight = workJ / shareOfWork(batch);
      const newComposite = noMass();
      const newFree = phases.map(noMass);
      for (let i = 0; i < CLASSES - 1; i++) {
        const energy = perWeight * weight[i]!;
        const broken = batch.composite[i]! * (1 - Math.exp(-energy / compositeTough[i]!));
        batch.composite[i]! -= broken;
        const free = freed[i]! * broken;
        for (let j = i + 1; j < CLASSES; j++)
          newComposite[j]! += (broken - free) * compositeRows[i]![j]!;
        phases.forEach(({ share, hit }, k) => {
          for (let j = 0; j < CLASSES; j++) newFree[k]![j]! += free * share * natural[k]![i]![j]!;
          const grains = batch.free[k]!;
          const gone = grains[i]! * (1 - Math.exp((-energy * hit) / freeTough[k]![i]!));
          grains[i]! -= gone;
          for (let j = i + 1; j < CLASSES; j++) newFree[k]![j]! += gone * freeRows[i]![j]!;
        });
      }
      newComposite.forEach((mass, i) => (batch.composite[i]! += mass));
      newFree.forEach((masses, k) => masses.forEach((mass, i) => (batch.free[k]![i]! += mass)));
    },
    crush(batch, massG) {
      const isSource = LOWER_MM.map((x) => x >= CRUSHED_FROM_MM);
      const sourceOf = (masses: ClassMasses) => masses.map((mass, i) => (isSource[i] ? mass : 0));
      const fromComposite = sourceOf(batch.composite);
      const fromFree = batch.free.map((masses, k) =>
        phases[k]!.isMetal ? noMass() : sourceOf(masses),
      );
      const compositeG = sumOf(fromComposite);
      const freeG = fromFree.map(sumOf);
      const sourceG = freeG.reduce((sum, mass) => sum + mass, compositeG);
      if (sourceG <= 0) return;
      const share = Math.min(0.5, massG / sourceG);
      fromComposite.forEach((mass, i) => (batch.composite[i]! -= share * mass));
      batch.free.forEach((masses, k) => {
        const made = share * (freeG[k]! + compositeG * phases[k]!.share);
        for (let i = 0; i < CLASSES; i++) masses[i]! += made * fines[i]! - share * fromFree[k]![i]!;
      });
    },
  };
}
