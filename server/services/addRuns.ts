import type { addRunsSchema } from '@shared/schemas/matrix';
import type { z } from 'zod';
import type { Context } from '../context';
import { Run } from '../models/Run';
import type { Study } from '../models/Study';
import { makeRuns } from './makeRuns';

/** Adds runs in a block of their own, with the next run numbers. */
export async function addRuns(
  study: Study,
  { purpose, settings }: Pick<z.output<typeof addRunsSchema>, 'purpose' | 'settings'>,
  ctx: Context,
): Promise<void> {
  const where = { studyId: study.id };
  const lastBlock =
    (await Run.max<number | null, Run>('block', { where, transaction: ctx.transaction })) ?? 0;
  const planned = settings.map((each, i) => ({
    settings: each,
    block: lastBlock + 1,
    standardOrder: i + 1,
    pointType: 'added',
  }));
  await makeRuns(study, purpose, planned, ctx);
  // the study's row carries the version that a stale page is told by
  study.changed('updatedAt', true);
  await study.save(ctx);
}
