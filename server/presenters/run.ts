import type { RunJson } from '@shared/schemas/run';
import type { Purpose } from '@shared/schemas/matrix';
import { runResults } from '@shared/study/results';
import type { Run } from '../models/Run';
import type { Study } from '../models/Study';
import { byLine } from './byLine';

type Recorded = Omit<RunJson, 'results' | 'balances' | 'shape'>;

function presentRecord(run: Run): Recorded {
  return {
    id: run.id,
    studyId: run.studyId,
    number: run.number,
    standardOrder: run.standardOrder,
    block: run.block,
    pointType: run.pointType,
    purpose: run.purpose satisfies Purpose,
    settings: {
      voltage: run.setVoltageKv,
      gap: run.setGapMm,
      pulses: run.setPulses,
      frequency: run.setFrequencyHz,
    },
    status: run.status,
    actual: {
      voltage: run.actualVoltageKv,
      gap: run.actualGapMm,
      pulses: run.actualPulses,
      frequency: run.actualFrequencyHz,
    },
    misfires: run.misfires,
    conductivityStartUsPerCm: run.conductivityStartUsPerCm,
    conductivityEndUsPerCm: run.conductivityEndUsPerCm,
    waterTemperatureC: run.waterTemperatureC,
    feedMassG: run.feedMassG,
    feedTyped: run.feedTyped,
    beforeSievingG: run.beforeSievingG,
    beforeSievingTyped: run.beforeSievingTyped,
    checks: run.checks,
    sieves: run.sieves,
    measured: run.measured,
    note: run.note,
    voidReason: run.voidReason,
    repeats: run.repeatsNumber,
    operator: run.operator ? byLine(run.operator) : null,
    recordedAt: run.recordedAt?.toISOString() ?? null,
    isSimulated: run.isSimulated,
    version: run.version,
  };
}

/** A run with its derived results, as its study asks for them; `study` has its rig's envelope loaded. */
export function presentRun(run: Run, study: Study): RunJson {
  const record = presentRecord(run);
  const envelope = study.rigEnvelope?.envelope;
  if (!study.responses || !envelope)
    throw new Error('A run was presented without the Brief of its study.');
  return { ...record, ...runResults(record, study.responses, envelope) };
}
