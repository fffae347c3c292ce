import { energyAnswer } from '@shared/calc/energy';
import { erectedCapacitanceNf, type EnvelopeJson } from '@shared/schemas/rig';
import type { StudyJson } from '@shared/schemas/study';
import { fullSetting } from '@shared/study/plan';

export interface PlanCost {
  readonly runs: number;
  readonly massG: number;
  /** Handling and pulses together. */
  readonly timeS: number;
  /** From the capacitors into the cell. */
  readonly energyJ: number;
}

/** What the runs of a plan take: sample, time at the bench, stored energy. */
export function costOfRuns(
  brief: NonNullable<StudyJson['brief']>,
  envelope: EnvelopeJson,
  runs: readonly { readonly settings: Readonly<Record<string, number | string>> }[],
): PlanCost {
  const each = runs.map(({ settings }) => {
    const { voltage, gap, pulses, frequency } = fullSetting(brief, settings);
    return energyAnswer({
      capacitanceNf: erectedCapacitanceNf(envelope),
      voltageKv: voltage,
      pulses,
      frequencyHz: frequency,
      gapMm: gap,
      massG: brief.batchMassG,
      chargingPowerW: envelope.chargingPowerW,
    });
  });
  const pulsingS = each.reduce((sum, { achievableDurationS }) => sum + achievableDurationS, 0);
  return {
    runs: runs.length,
    massG: runs.length * brief.batchMassG,
    timeS: 60 * runs.length * brief.handlingMinutes + pulsingS,
    energyJ: each.reduce((sum, { totalEnergyJ }) => sum + totalEnergyJ, 0),
  };
}
