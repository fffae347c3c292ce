import type { Context } from '../context';
import { Counter } from '../models/Counter';
import { Lab } from '../models/Lab';
import { Study } from '../models/Study';

/** Opens a study under the lab's next number: TV-041. The Brief follows. */
export async function openStudy(
  input: { title: string; question: string; sampleId: number; isSimulated: boolean },
  ctx: Context,
): Promise<Study> {
  const { actor, transaction } = ctx;
  const lab = await Lab.findByPk(actor.labId, { transaction, rejectOnEmpty: true });
  const number = await Counter.next(lab.id, 'study', transaction);
  return Study.create(
    {
      ...input,
      labId: lab.id,
      code: `${lab.code}-${String(number).padStart(3, '0')}`,
      openedById: actor.id,
      rigEnvelopeId: null,
      sieveStackId: null,
      factors: null,
      fixed: null,
      responses: null,
      batchMassG: null,
      handlingMinutes: null,
      massLimitG: null,
      runLimit: null,
      dayLimit: null,
      effectThatMatters: null,
      expectedSpread: null,
      practiceMaterial: null,
    },
    ctx,
  );
}
