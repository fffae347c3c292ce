import type { Purpose } from '@shared/schemas/matrix';
import type { SettingJson } from '@shared/schemas/setPoint';
import { brokenLimits } from '@shared/study/envelope';
import type { Context } from '../context';
import { HttpError } from '../errors';
import { Run } from '../models/Run';
import type { Study } from '../models/Study';
import { briefOf } from './briefOf';
import { takeStock } from './countStock';

export interface PlannedRun {
  readonly settings: SettingJson;
  readonly block: number;
  readonly standardOrder: number;
  readonly pointType: string;
  readonly repeatsNumber?: number;
}

/** Each setting that cannot be dialled in, named with its limit: a run that cannot be done is not made. */
function refuseOutside(study: Study, runs: readonly PlannedRun[]): void {
  const { envelope } = briefOf(study);
  const issues = runs.flatMap(({ settings }, i) =>
    brokenLimits(envelope, settings).map(({ message }) => ({ path: `settings.${i}`, message })),
  );
  if (issues.length > 0)
    throw new HttpError(422, 'outside-envelope', issues[0]?.message ?? '', { issues });
}

/** Makes runs with the next numbers and reserves the sample that they need. */
export async function makeRuns(
  study: Study,
  purpose: Purpose,
  planned: readonly PlannedRun[],
  ctx: Context,
): Promise<void> {
  refuseOutside(study, planned);
  const { brief } = briefOf(study);
  const { id: studyId, labId } = study;
  const { transaction } = ctx;
  const last =
    (await Run.max<number | null, Run>('number', { where: { studyId }, transaction })) ?? 0;
  const massG = planned.length * brief.batchMassG;
  await takeStock({ sampleId: study.sampleId, kind: 'reserved', massG, studyId }, ctx);
  for (const [i, run] of planned.entries()) {
    const { voltage, gap, pulses, frequency } = run.settings;
    await Run.create(
      {
        labId,
        studyId,
        number: last + i + 1,
        standardOrder: run.standardOrder,
        block: run.block,
        pointType: run.pointType,
        purpose,
        setVoltageKv: voltage,
        setGapMm: gap,
        setPulses: pulses,
        setFrequencyHz: frequency,
        repeatsNumber: run.repeatsNumber ?? null,
        isSimulated: study.isSimulated,
      },
      ctx,
    );
  }
}
