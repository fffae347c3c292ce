import type { PlanInput } from '@shared/schemas/matrix';
import { designRequestSchema } from '@shared/schemas/calc/design';
import { designAnswer } from '@shared/calc/design';
import { designRequestOf } from '@shared/study/requests';
import { fullSetting } from '@shared/study/plan';
import type { Context } from '../context';
import { impossible } from '../errors';
import { Matrix } from '../models/Matrix';
import type { Study } from '../models/Study';
import { briefOf } from './briefOf';
import { makeRuns } from './makeRuns';

/**
 * Freezes a matrix. The runs are computed here from the plan and its seed, by the same engine that
 * showed them, so what is frozen is what was compared.
 */
export async function freezeMatrix(study: Study, plan: PlanInput, ctx: Context): Promise<void> {
  const { brief, envelope } = briefOf(study);
  const design = designAnswer(designRequestSchema.parse(designRequestOf(brief, envelope, plan)));
  const runs = [...design.runs].sort((a, b) => a.runOrder - b.runOrder);
  const { runLimit, massLimitG, batchMassG } = brief;
  if (runLimit !== null && runs.length > runLimit)
    throw impossible(
      'too-many-runs',
      `The Brief allows ${runLimit} runs; this matrix has ${runs.length}.`,
      'plan',
    );
  if (massLimitG !== null && runs.length * batchMassG > massLimitG)
    throw impossible(
      'too-much-sample',
      `The Brief allows ${massLimitG} g; this matrix takes ${runs.length} × ${batchMassG} g.`,
      'plan',
    );
  await Matrix.create(
    {
      labId: study.labId,
      studyId: study.id,
      kind: plan.kind,
      plan,
      seed: plan.seed,
      runCount: runs.length,
      frozenById: ctx.actor.id,
    },
    ctx,
  );
  const planned = runs.map(({ settings, block, standardOrder, pointType }) => ({
    settings: fullSetting(brief, settings),
    block,
    standardOrder,
    pointType,
  }));
  await makeRuns(study, 'matrix', planned, ctx);
  study.changed('updatedAt', true);
  await study.save(ctx);
}
