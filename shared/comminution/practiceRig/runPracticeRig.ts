import { StatsError } from '../../stats/errors';
import { makeRandom } from '../../stats/random/generator';
import { specificEnergyKwhPerT } from '../energy/pulseEnergy';
import type { SieveMass } from '../sieve/sieveCurve';
import { allOf, type Bed } from './bed';
import { classOf } from './breakage';
import {
  PRACTICE_MATERIALS,
  PRACTICE_RIG,
  type Material,
  type PracticeMaterial,
  type PracticeRig,
} from './materials';
import { measure, type Sieving } from './measure';
import { noiseOf, type Noise } from './noise';
import { LOWER_MM, RIG_SIEVES_MM, type Masses } from './sizeClasses';
import { treat, type Treated, type Treatment } from './treat';

/** Free grains from here up count as coarse, mm. */
const COARSE_FROM_MM = 4;
/** Spread of a point count of free grains, points of per cent. */
const COUNT_SD = 1.5;

export interface PracticeRunInput {
  readonly material: PracticeMaterial;
  /** kV, mm, pulses, Hz. */
  readonly setting: {
    readonly voltage: number;
    readonly gap: number;
    readonly pulses: number;
    readonly frequency: number;
  };
  /** Whole number 0 … 2³²−1; null = free of chance, the expected run. */
  readonly seed: number | null;
  readonly feedMassG?: number;
  /** The lab’s stack, coarse to fine, of sieves that the rig knows; default all 21. */
  readonly aperturesMm?: readonly number[];
  /** Toughness on this day against the mean, as a logarithm; 0.04 is usual. */
  readonly dayEffect?: number;
  readonly conductivityStartUsPerCm?: number;
  /** Pulses that the electrode has done: it wears and the gap opens. */
  readonly pulsesOnElectrode?: number;
  readonly mode?: Treatment['mode'];
  readonly screenMm?: number;
  readonly stages?: number;
  readonly rig?: Partial<PracticeRig>;
}

export interface PracticeRun extends Sieving {
  readonly feedMassG: number;
  readonly pulses: {
    readonly set: number;
    readonly delivered: number;
    readonly solid: number;
    readonly water: number;
    readonly misfires: number;
  };
  /** As the monitors show it. */
  readonly actual: {
    readonly voltage: number;
    readonly gap: number;
    readonly pulses: number;
    readonly frequency: number;
  };
  readonly energyJ: number;
  readonly specificEnergyKwhPerT: number;
  readonly durationS: number;
  readonly conductivityStartUsPerCm: number;
  readonly conductivityEndUsPerCm: number;
  readonly temperatureEndC: number;
  /** Per cent of each phase that is free, and that is free and coarse; as a lab would count them. */
  readonly freePercent: Readonly<Record<string, number>>;
  readonly freeCoarsePercent: Readonly<Record<string, number>>;
  readonly lossPercent: { readonly treatment: number; readonly sieving: number };
  /** What no bench sees: the masses and shares before any error of measurement. */
  readonly truth: {
    readonly sieves: readonly SieveMass[];
    readonly panG: number;
    readonly freePercent: Readonly<Record<string, number>>;
    readonly freeCoarsePercent: Readonly<Record<string, number>>;
  };
}

function checkStack(aperturesMm: readonly number[]): void {
  const unknown = aperturesMm.find((size) => classOf(size) < 0);
  if (unknown !== undefined)
    throw new StatsError(
      'out-of-bounds',
      `The practice rig has no sieve of ${unknown} mm; it has ${RIG_SIEVES_MM.join(', ')} mm.`,
    );
}

function treatmentOf(
  input: PracticeRunInput,
  material: Material,
  rig: PracticeRig,
  noise: Noise,
): Treatment {
  const { setting, dayEffect = 0, pulsesOnElectrode = 0 } = input;
  const worn = (rig.wearMmPer1000 * pulsesOnElectrode) / 1000;
  return {
    hardness: Math.exp(noise.gauss(material.feedSpread) + dayEffect),
    voltageKv: setting.voltage * (1 + noise.gauss(0.008)),
    gapMm: setting.gap + noise.gauss(0.4) + worn,
    pulses: setting.pulses,
    frequencyHz: setting.frequency,
    feedMassG: input.feedMassG ?? material.feedMassG,
    conductivityUsPerCm: input.conductivityStartUsPerCm ?? rig.conductivityUsPerCm,
    mode: input.mode ?? 'closed',
    screenMm: input.screenMm ?? 2,
    stages: input.stages ?? 1,
  };
}

function freeShares(bed: Bed, material: Material, feedMassG: number, from: number) {
  const grams = (masses: Masses) =>
    masses.reduce((sum, mass, i) => (LOWER_MM[i]! >= from ? sum + mass : sum), 0);
  return Object.fromEntries(
    material.phases.map(({ name, share }, k) => [
      name,
      (100 * grams(bed.free[k]!)) / (feedMassG * share),
    ]),
  );
}

/** A point count: off by a point or two, in tenths, within 0 … 100 %. */
function counted(shares: Record<string, number>, noise: Noise): Record<string, number> {
  if (!noise.random) return shares;
  return Object.fromEntries(
    Object.entries(shares).map(([name, percent]) => {
      const read = Math.round((percent + noise.gauss(COUNT_SD)) * 10) / 10;
      return [name, Math.min(100, Math.max(0, read))];
    }),
  );
}

const rounded = (value: number, decimals: number, noise: Noise) =>
  noise.random ? Number(value.toFixed(decimals)) : value;

function monitors(treated: Treated, treatment: Treatment, noise: Noise): PracticeRun['actual'] {
  return {
    voltage: rounded(treatment.voltageKv, 1, noise),
    gap: rounded(treatment.gapMm, 1, noise),
    pulses: treatment.pulses,
    frequency: rounded(treated.frequencyHz, 2, noise),
  };
}

/**
 * One run on the practice rig: an invented machine with invented materials, for rehearsals and the demo
 * lab. One seed, one run. Never to be shown as a fact about a material.
 *
 * @throws StatsError `out-of-bounds` for a sieve that the rig does not have.
 */
export function runPracticeRig(input: PracticeRunInput): PracticeRun {
  const { aperturesMm = RIG_SIEVES_MM, seed } = input;
  checkStack(aperturesMm);
  const material: Material = PRACTICE_MATERIALS[input.material];
  const rig = { ...PRACTICE_RIG, ...input.rig };
  const noise = noiseOf(seed === null ? null : makeRandom(seed));
  // this sub-sample’s electrical strength
  const strength = Math.exp(noise.gauss(0.04));
  const sample = { ...material, field30KvPerMm: material.field30KvPerMm * strength };
  const treatment = treatmentOf(input, material, rig, noise);
  const treated = treat(treatment, sample, rig, noise);
  const { feedMassG, pulses } = treatment;
  const product = allOf(treated.bed);
  const sieving = measure(product, aperturesMm, material.lossPercent, noise);
  const truth = measure(product, aperturesMm, 0, noiseOf(null));
  const freePercent = freeShares(treated.bed, material, feedMassG, 0);
  const freeCoarsePercent = freeShares(treated.bed, material, feedMassG, COARSE_FROM_MM);
  const afterG = sieving.sieves.reduce((sum, { retainedG }) => sum + retainedG, sieving.panG);
  const { beforeSievingG } = sieving;
  const { solid, water, misfires, energyJ } = treated;
  return {
    ...sieving,
    feedMassG,
    pulses: { set: pulses, delivered: pulses, solid, water, misfires },
    actual: monitors(treated, treatment, noise),
    energyJ,
    specificEnergyKwhPerT: specificEnergyKwhPerT(energyJ, feedMassG),
    durationS: pulses / treated.frequencyHz,
    conductivityStartUsPerCm: treatment.conductivityUsPerCm,
    conductivityEndUsPerCm: rounded(treated.conductivityUsPerCm, 0, noise),
    temperatureEndC: rounded(treated.temperatureC, 1, noise),
    freePercent: counted(freePercent, noise),
    freeCoarsePercent: counted(freeCoarsePercent, noise),
    lossPercent: {
      treatment: (100 * (feedMassG - beforeSievingG)) / feedMassG,
      sieving: (100 * (beforeSievingG - afterG)) / beforeSievingG,
    },
    truth: { sieves: truth.sieves, panG: truth.panG, freePercent, freeCoarsePercent },
  };
}
