import type { RunRecord } from '@shared/schemas/run';
import { PRE_RUN_CHECKS } from '@shared/schemas/run';
import { MATERIALS, type MaterialName } from '@shared/comminution/practiceRig/materials';
import {
  runPracticeRig,
  type PracticeResult,
} from '@shared/comminution/practiceRig/runPracticeRig';
import { APERTURES_MM } from '@shared/comminution/practiceRig/sizeClasses';
import type { Run } from '../models/Run';

const toTenths = (value: number) => Math.round(value * 10) / 10;
const toHundredths = (value: number) => Math.round(value * 100) / 100;

/** Puts the simulator's classes on the sieves of a stack: what lies between two of its openings, summed. */
function onStack(result: PracticeResult, aperturesMm: readonly number[]): RunRecord['sieves'] {
  const sizes = [...aperturesMm].sort((a, b) => b - a);
  const retained = sizes.map(() => 0);
  let panG = 0;
  result.masses.forEach((massG, i) => {
    const openingMm = APERTURES_MM[i] ?? 0;
    const at = sizes.findIndex((size) => openingMm >= size);
    if (at < 0) panG += massG;
    else retained[at] = (retained[at] ?? 0) + massG;
  });
  return [...retained, panG].map((massG, i) => {
    const retainedG = toHundredths(massG);
    return { apertureMm: sizes[i] ?? 0, retainedG, typed: String(retainedG) };
  });
}

/** Share of the aggregate that is free, in percent; null for materials without one. */
function freeAggregate(result: PracticeResult, material: MaterialName): number | null {
  const phase = MATERIALS[material].phases.find(({ name }) => name === 'aggregate');
  const freeG = result.freeG['aggregate'];
  if (!phase || freeG === undefined) return null;
  return Math.min(100, (100 * freeG) / (phase.share * result.feedMassG));
}

/**
 * What an operator would have written down for a run on the practice rig. Invented material; the record
 * is marked as simulated by its study.
 */
export function simulateRun(
  run: Run,
  of: {
    material: MaterialName;
    aperturesMm: readonly number[];
    seed: number;
    dayEffect: number;
    measuredKey: string | null;
  },
): RunRecord {
  const result = runPracticeRig({
    material: of.material,
    voltageKv: run.setVoltageKv,
    gapMm: run.setGapMm,
    pulses: run.setPulses,
    frequencyHz: run.setFrequencyHz,
    seed: of.seed,
    dayEffect: of.dayEffect,
  });
  const free = freeAggregate(result, of.material);
  const measured =
    of.measuredKey === null || free === null
      ? []
      : [{ responseKey: of.measuredKey, value: toTenths(free), typed: String(toTenths(free)) }];
  return {
    actual: { voltage: null, gap: null, pulses: run.setPulses, frequency: null },
    misfires: Math.round(result.misfires),
    conductivityStartUsPerCm: 50,
    conductivityEndUsPerCm: Math.round(result.conductivityEndUsPerCm),
    waterTemperatureC: 20,
    feedMassG: result.feedMassG,
    feedTyped: String(result.feedMassG),
    beforeSievingG: result.beforeSievingG,
    beforeSievingTyped: String(result.beforeSievingG),
    checks: PRE_RUN_CHECKS.map(({ key }) => key),
    sieves: onStack(result, of.aperturesMm),
    measured,
    note: '',
    why: '',
    version: run.version,
  };
}
