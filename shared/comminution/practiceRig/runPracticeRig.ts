import { seeded, type Random } from '../../stats/random/random';
import { pulseEnergyJ } from '../energy/pulseEnergy';
import { breakageModel, fedBatch, sumOf, totalOf, type Batch } from './batch';
import { discharge, PRACTICE_RIG, type Rig } from './discharge';
import { MATERIALS, type Material, type MaterialName } from './materials';
import { LOWER_MM, MEAN_MM, UPPER_MM, type ClassMasses } from './sizeClasses';
import { weighed } from './weighing';

export interface PracticeRun {
  readonly material: MaterialName;
  readonly voltageKv: number;
  readonly gapMm: number;
  readonly pulses: number;
  readonly frequencyHz: number;
  readonly feedMassG?: number;
  /** Without a seed: the expected run, free of noise. With one: a bag, a firing and a weighing of their own. */
  readonly seed?: number;
  /** Toughness of the day in natural-log units. */
  readonly dayEffect?: number;
  readonly rig?: Partial<Rig>;
}

export interface PracticeResult {
  /** g by size class, coarse to pan: what is there, and what was weighed (the same without a seed). */
  readonly truth: ClassMasses;
  readonly masses: ClassMasses;
  readonly beforeSievingG: number;
  readonly feedMassG: number;
  /** Pulses through the solid, through water, and misfires; expected counts without a seed. */
  readonly solid: number;
  readonly water: number;
  readonly misfires: number;
  /** Free grains of each phase, g: all, and those of 4 mm and more. */
  readonly freeG: Readonly<Record<string, number>>;
  readonly freeCoarseG: Readonly<Record<string, number>>;
  readonly totalEnergyJ: number;
  readonly conductivityEndUsPerCm: number;
  readonly temperatureEndC: number;
}

/** What differs from bag to bag and from day to day. */
interface Bag {
  readonly hardness: number;
  readonly material: Material;
  readonly voltageKv: number;
  readonly gapMm: number;
}

function drawBag(run: PracticeRun, material: Material, random: Random | null): Bag {
  const spread = (sd: number) => (random ? sd * random.normal() : 0);
  const hardness = Math.exp(spread(material.bagSpread) + (run.dayEffect ?? 0));
  const strength = material.strengthKvPerMm * Math.exp(spread(0.04));
  return {
    hardness,
    material: { ...material, strengthKvPerMm: strength },
    voltageKv: run.voltageKv * (1 + spread(0.008)),
    gapMm: run.gapMm + spread(0.4),
  };
}

function splitFeed(batch: Batch, feedMassG: number, random: Random | null): void {
  const { composite } = batch;
  const parts = composite.filter((mass) => mass > 0).length;
  if (!random || parts < 2) return;
  composite.forEach((mass, i) => {
    if (mass > 0) composite[i] = mass * Math.exp(0.06 * random.normal());
  });
  const scale = feedMassG / sumOf(composite);
  composite.forEach((mass, i) => (composite[i] = mass * scale));
}

/** How many of this pulse go through solid and water: shares without noise, one of them with it. */
function fire(solid: number, water: number, random: Random | null): [number, number] {
  if (!random) return [solid, water];
  const u = random.next();
  if (u < solid) return [1, 0];
  return u < solid + water ? [0, 1] : [0, 0];
}

function freeOf(batch: Batch, material: Material, fromMm: number): Record<string, number> {
  return Object.fromEntries(
    material.phases.map(({ name }, k) => [
      name,
      batch.free[k]!.reduce((sum, mass, i) => (LOWER_MM[i]! >= fromMm ? sum + mass : sum), 0),
    ]),
  );
}

const belowOneMm = (masses: ClassMasses) =>
  masses.reduce((sum, mass, i) => (UPPER_MM[i]! <= 1 ? sum + mass : sum), 0);

/**
 * One batch on the practice rig: pulse by pulse, from discharge to breakage to the sieves. Rig and
 * materials are invented; the result is for learning, rehearsing and testing, never a fact.
 */
export function runPracticeRig(run: PracticeRun): PracticeResult {
  const rig: Rig = { ...PRACTICE_RIG, ...run.rig };
  const base: Material = MATERIALS[run.material];
  const random = run.seed === undefined ? null : seeded(run.seed, 'practice rig');
  const feedMassG = run.feedMassG ?? base.feedMassG;
  const bag = drawBag(run, base, random);
  const batch = fedBatch(base, feedMassG);
  splitFeed(batch, feedMassG, random);
  const model = breakageModel(base, bag.hardness);
  const frequencyHz = Math.min(
    run.frequencyHz,
    rig.chargingPowerW / pulseEnergyJ(rig.capacitanceNf, run.voltageKv),
  );
  // bubbles and an unsettled bed
  const settled = 1 - 0.1 * (frequencyHz / 5) ** 2;
  const storedJ = pulseEnergyJ(rig.capacitanceNf, bag.voltageKv);
  let conductivity = rig.startConductivityUsPerCm;
  let temperature = rig.startTemperatureC;
  let solid = 0;
  let water = 0;

  for (let n = 1; n <= run.pulses; n++) {
    const total = totalOf(batch);
    const gapMm = bag.gapMm + (rig.wearMmPer1000 * n) / 1000;
    const leached = (base.leach * belowOneMm(total)) / rig.waterL;
    conductivity =
      (rig.startConductivityUsPerCm + leached) * (1 + 0.02 * (temperature - rig.startTemperatureC));
    const outlook = discharge(
      { voltageKv: bag.voltageKv, gapMm, conductivityUsPerCm: conductivity },
      bag.material,
      rig,
    );
    const bridgeG = total.reduce(
      (sum, mass, i) => sum + mass * Math.min(1, MEAN_MM[i]! / (0.35 * gapMm)),
      0,
    );
    const available = settled * (1 - Math.exp(-bridgeG / base.bridgeMassG));
    const solidChance = available * outlook.solidProbability;
    const waterChance = (1 - solidChance) * outlook.waterProbability;
    const [throughSolid, throughWater] = fire(solidChance, waterChance, random);
    solid += throughSolid;
    water += throughWater;
    temperature += storedJ / (rig.waterL * 4186);
    let workJ =
      (throughSolid * outlook.efficiency + throughWater * rig.waterEfficiency) *
      outlook.availableEnergyJ;
    if (random && workJ > 0) workJ *= Math.exp(-0.02 + 0.2 * random.normal());
    if (workJ <= 0) continue;
    const crushedG = Math.min(
      0.3 * sumOf(total),
      base.crushedGPerJ * workJ * Math.max(outlook.over, 0.3) ** base.crushedExponent,
    );
    model.break(batch, workJ);
    model.crush(batch, crushedG);
  }

  const truth = totalOf(batch);
  const measured = random
    ? weighed(truth, feedMassG, base.lossPercent, random)
    : { masses: truth, beforeSievingG: sumOf(truth) };
  return {
    truth,
    ...measured,
    feedMassG,
    solid,
    water,
    misfires: run.pulses - solid - water,
    freeG: freeOf(batch, base, 0),
    freeCoarseG: freeOf(batch, base, 4),
    totalEnergyJ: storedJ * run.pulses,
    conductivityEndUsPerCm: conductivity,
    temperatureEndC: temperature,
  };
}
