import type { StudyJson } from '@shared/schemas/study';
import type { Context } from '../context';
import { Matrix } from '../models/Matrix';
import { Person } from '../models/Person';
import { presentStudy } from '../presenters/study';
import { stockOf } from './countStock';
import { loadStudy } from './loadStudy';

/** A study as its page reads it, after whatever this request did to it. */
export async function studyPage(studyId: number, ctx: Context): Promise<StudyJson> {
  const loaded = await loadStudy(studyId, ctx);
  const [stock, matrix] = await Promise.all([
    stockOf(loaded.study.sampleId, ctx),
    Matrix.findOne({
      where: { studyId },
      include: { model: Person, as: 'frozenBy' },
      transaction: ctx.transaction,
    }),
  ]);
  return presentStudy(loaded, stock, matrix);
}
