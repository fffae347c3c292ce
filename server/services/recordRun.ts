import type { RunRecord, RunJson } from '@shared/schemas/run';
import type { SettingJson } from '@shared/schemas/setPoint';
import { because, type Context } from '../context';
import { impossible } from '../errors';
import { Run } from '../models/Run';
import { StockEntry } from '../models/StockEntry';
import type { Study } from '../models/Study';
import { presentRun } from '../presenters/run';

/** Two weighings of one batch agree to this; more retained than fed beyond it is a slip, not scatter. */
const GAIN_LIMIT_PERCENT = 5;

/** More on the sieves, or before sieving, than was fed. @throws HttpError 422 `more-than-fed`. */
export function checkMasses(record: RunRecord): void {
  const recoveredG = record.sieves.reduce((sum, { retainedG }) => sum + retainedG, 0);
  const limitG = record.feedMassG * (1 + GAIN_LIMIT_PERCENT / 100);
  if (recoveredG > limitG)
    throw impossible(
      'more-than-fed',
      `${round(recoveredG)} g lies on the sieves, but only ${round(record.feedMassG)} g was fed. Check the tare and the rows.`,
      'sieves',
    );
  if (record.beforeSievingG !== null && record.beforeSievingG > limitG)
    throw impossible(
      'more-than-fed',
      `${round(record.beforeSievingG)} g before sieving is more than the ${round(record.feedMassG)} g fed. Is the product still damp?`,
      'beforeSievingG',
    );
}

const round = (massG: number) => Math.round(massG * 100) / 100;

/** Only responses that the Brief calls measured take a typed value. */
function checkMeasured(record: RunRecord, study: Study): void {
  record.measured.forEach(({ responseKey }, i) => {
    const response = (study.responses ?? []).find(({ key }) => key === responseKey);
    if (response?.kind !== 'measured')
      throw impossible(
        'not-measured',
        response
          ? `${response.name} is derived from masses and settings, so it is never typed.`
          : `This study has no response called ${responseKey}.`,
        `measured.${i}.responseKey`,
      );
  });
}

async function checkOrder(run: Run, record: RunRecord, { transaction }: Context): Promise<void> {
  const next = await Run.min<number | null, Run>('number', {
    where: { studyId: run.studyId, status: 'planned' },
    transaction,
  });
  if (next !== null && run.number > next && record.why.length < 5)
    throw impossible(
      'out-of-order',
      `Run ${next} comes first: the order was drawn at random on purpose. To do run ${run.number} now, say why.`,
      'why',
    );
}

/** The sample leaves the reservation and counts as used, at the mass that was really fed. */
async function useStock(run: Run, study: Study, massG: number, ctx: Context): Promise<void> {
  const { labId, sampleId, id: studyId } = study;
  await StockEntry.create(
    {
      labId,
      sampleId,
      kind: 'released',
      massG: study.batchMassG ?? massG,
      studyId,
      runId: run.id,
      byId: ctx.actor.id,
    },
    ctx,
  );
  // what went into the vessel is a fact: it is booked even when a portion was a little heavy
  await StockEntry.create(
    { labId, sampleId, kind: 'used', massG, studyId, runId: run.id, byId: ctx.actor.id },
    ctx,
  );
}

function measuredBy(
  record: RunRecord,
  before: RunJson['measured'],
  ctx: Context,
): RunJson['measured'] {
  const by = { id: ctx.actor.id, name: ctx.actor.name };
  const at = new Date().toISOString();
  return record.measured.map((value) => {
    const same = before.find(
      (other) => other.responseKey === value.responseKey && other.value === value.value,
    );
    return same ?? { ...value, by, at };
  });
}

/** What the person should hear about a run that was saved all the same. */
function warningsOf(record: RunRecord, set: SettingJson, run: RunJson): string[] {
  const warnings = run.shape.map(({ message }) => message);
  const { treatment, sieving } = run.balances;
  if (treatment && treatment.verdict !== 'holds')
    warnings.push(`Treatment: ${round(treatment.lossPercent)} % of the feed is missing.`);
  if (sieving && sieving.verdict !== 'holds')
    warnings.push(`Sieving: ${round(sieving.lossPercent)} % is missing.`);
  const { pulses } = record.actual;
  if (pulses !== null && Math.abs(pulses - set.pulses) > Math.max(1, 0.02 * set.pulses))
    warnings.push(
      `${pulses} of ${set.pulses} pulses were delivered: the model uses the delivered ones.`,
    );
  return warnings;
}

/**
 * Records a run, or corrects one that was recorded (then with a reason). Masses are kept as typed and as
 * parsed; everything else is derived when it is read.
 */
export async function recordRun(
  run: Run,
  study: Study,
  record: RunRecord,
  ctx: Context,
): Promise<{ run: RunJson; warnings: string[] }> {
  if (run.status === 'void')
    throw impossible('void', `Run ${run.number} is void; its repeat has a number of its own.`);
  const isCorrection = run.status === 'recorded';
  if (isCorrection && record.why.length < 5)
    throw impossible(
      'reason-needed',
      'Say why this recorded run is changed: the old values stay readable.',
      'why',
    );
  checkMasses(record);
  checkMeasured(record, study);
  const reasoned = because(ctx, record.why);
  if (!isCorrection) {
    await checkOrder(run, record, ctx);
    await useStock(run, study, record.feedMassG, ctx);
  }
  const { actual, why: _why, version: _version, measured, ...fields } = record;
  await run.update(
    {
      ...fields,
      sieves: [...record.sieves].sort((a, b) => b.apertureMm - a.apertureMm),
      actualVoltageKv: actual.voltage,
      actualGapMm: actual.gap,
      actualPulses: actual.pulses,
      actualFrequencyHz: actual.frequency,
      measured: measuredBy({ ...record, measured }, run.measured, ctx),
      status: 'recorded',
      ...(isCorrection ? {} : { operatorId: ctx.actor.id, recordedAt: new Date() }),
    },
    reasoned,
  );
  await run.reload({ include: ['operator'], transaction: ctx.transaction });
  const presented = presentRun(run, study);
  return { run: presented, warnings: warningsOf(record, presented.settings, presented) };
}
