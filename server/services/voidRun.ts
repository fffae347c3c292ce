import { because, type Context } from '../context';
import { impossible } from '../errors';
import type { Run } from '../models/Run';
import { StockEntry } from '../models/StockEntry';
import type { Study } from '../models/Study';

/**
 * Marks a run void, with the reason. The row and its masses stay; it is in no fit. A run that was not
 * done yet gives its sample back to the stock.
 */
export async function voidRun(run: Run, study: Study, why: string, ctx: Context): Promise<void> {
  if (run.status === 'void') throw impossible('void', `Run ${run.number} is void already.`);
  if (run.status === 'planned' && study.batchMassG !== null)
    await StockEntry.create(
      {
        labId: study.labId,
        sampleId: study.sampleId,
        kind: 'released',
        massG: study.batchMassG,
        studyId: study.id,
        runId: run.id,
        byId: ctx.actor.id,
      },
      ctx,
    );
  await run.update({ status: 'void', voidReason: why }, because(ctx, why));
}
