import { chargingLimitHz, pulseEnergyJ } from '../energy/pulseEnergy';
import { allOf, bridgingMass, emptyBed, screenOut, workOn, type Bed } from './bed';
import { breakageTables, classOf } from './breakage';
import { discharge, type Discharge } from './discharge';
import type { Material, PracticeRig } from './materials';
import type { Noise } from './noise';
import { addTo, massBelow, totalOf } from './sizeClasses';

/** Below this there is nothing left in the vessel to hit, g. */
const MIN_BED_G = 0.5;
const WATER_J_PER_KG_K = 4186;
/** Conductivity of water grows by this share per kelvin. */
const PER_KELVIN = 0.02;
/** Spread of the energy of one pulse, as a log SD; its mean is kept. */
const PULSE_SPREAD = 0.2;
const SIEVE_SHARE = 0.12;
const STAGE_SHARE = 0.98;

export interface Treatment {
  readonly voltageKv: number;
  readonly gapMm: number;
  readonly pulses: number;
  readonly frequencyHz: number;
  readonly feedMassG: number;
  readonly conductivityUsPerCm: number;
  /** How tough this sub-sample is against the mean. */
  readonly hardness: number;
  /** `closed`: all stays in; `sieve`: undersize drops out; `staged`: it is screened out in between. */
  readonly mode: 'closed' | 'sieve' | 'staged';
  readonly screenMm: number;
  readonly stages: number;
}

export interface Treated {
  readonly bed: Bed;
  readonly solid: number;
  readonly water: number;
  readonly misfires: number;
  readonly energyJ: number;
  readonly conductivityUsPerCm: number;
  readonly temperatureC: number;
  readonly frequencyHz: number;
}

function feedBed(material: Material, feedMassG: number, noise: Noise): Bed {
  const bed = emptyBed(material.phases.length);
  const isMixed = material.feed.length > 1;
  // feed classes are split by hand: each share is off by about 6 %
  const shares = material.feed.map(
    ({ share }) => share * (isMixed ? Math.exp(noise.gauss(0.06)) : 1),
  );
  const sum = shares.reduce((a, b) => a + b, 0);
  material.feed.forEach(({ apertureMm }, i) => {
    bed.composite[classOf(apertureMm)]! += (feedMassG * shares[i]!) / sum;
  });
  return bed;
}

interface Shares {
  readonly solid: number;
  readonly water: number;
}

/** Where the pulse went: shares of expectation, or one of three outcomes by chance. */
function fire(probability: Shares, { random }: Noise): Shares {
  if (!random) return probability;
  const u = random.uniform();
  if (u < probability.solid) return { solid: 1, water: 0 };
  return { solid: 0, water: u < probability.solid + probability.water ? 1 : 0 };
}

function workJ(outlook: Discharge, shares: Shares, rig: PracticeRig, noise: Noise): number {
  const { efficiency, availableJ } = outlook;
  const mean = (shares.solid * efficiency + shares.water * rig.waterShare) * availableJ;
  if (mean <= 0 || !noise.random) return mean;
  return mean * Math.exp(noise.gauss(PULSE_SPREAD) - PULSE_SPREAD ** 2 / 2);
}

/**
 * Treats one batch pulse by pulse.
 *
 * @see Equations 1–11 of the practice rig (DEVELOPERS.md): energy and charging limit, leaching and
 *   heating of the water, breakdown race, bridging, work on classes, crushed zone, screening.
 */
export function treat(
  treatment: Treatment,
  material: Material,
  rig: PracticeRig,
  noise: Noise,
): Treated {
  const { voltageKv, pulses, feedMassG, screenMm, mode, stages } = treatment;
  const tables = breakageTables(material, treatment.hardness);
  const bed = feedBed(material, feedMassG, noise);
  const screened = emptyBed(material.phases.length);
  const perPulseJ = pulseEnergyJ(rig.capacitanceNf, voltageKv);
  const frequencyHz = Math.min(
    treatment.frequencyHz,
    chargingLimitHz(rig.chargingPowerW, perPulseJ),
  );
  // bubbles and a bed that has not settled again
  const settled = 1 - 0.1 * (frequencyHz / 5) ** 2;
  const stageEnds = new Set(
    Array.from({ length: stages - 1 }, (_, k) => Math.round((pulses * (k + 1)) / stages)),
  );
  let conductivityUsPerCm = treatment.conductivityUsPerCm;
  let temperatureC = rig.temperatureC;
  const count = { solid: 0, water: 0 };
  for (let pulse = 1; pulse <= pulses; pulse++) {
    const all = allOf(bed);
    if (totalOf(all) < MIN_BED_G) {
      count.water += pulses - pulse + 1;
      break;
    }
    const gapMm = treatment.gapMm + (rig.wearMmPer1000 * pulse) / 1000;
    const leached = (material.leach * massBelow(all, 1)) / rig.waterL;
    conductivityUsPerCm =
      (treatment.conductivityUsPerCm + leached) *
      (1 + PER_KELVIN * (temperatureC - rig.temperatureC));
    const outlook = discharge({ voltageKv, gapMm, conductivityUsPerCm }, material, rig);
    const bridged = 1 - Math.exp(-bridgingMass(all, gapMm) / material.bridgeMassG);
    const solid = settled * bridged * outlook.solidProbability;
    const shares = fire({ solid, water: (1 - solid) * outlook.waterProbability }, noise);
    count.solid += shares.solid;
    count.water += shares.water;
    temperatureC += perPulseJ / (rig.waterL * WATER_J_PER_KG_K);
    const work = workJ(outlook, shares, rig, noise);
    if (work <= 0) continue;
    workOn(bed, material, tables, { workJ: work, excess: outlook.excess });
    if (mode === 'sieve') screenOut(bed, screened, screenMm, SIEVE_SHARE);
    if (mode === 'staged' && stageEnds.has(pulse)) screenOut(bed, screened, screenMm, STAGE_SHARE);
  }
  addTo(bed.composite, screened.composite);
  bed.free.forEach((masses, k) => addTo(masses, screened.free[k]!));
  return {
    bed,
    ...count,
    misfires: pulses - count.solid - count.water,
    energyJ: perPulseJ * pulses,
    conductivityUsPerCm,
    temperatureC,
    frequencyHz,
  };
}
