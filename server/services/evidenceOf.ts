import type { RunJson } from '@shared/schemas/run';
import type { Evidence } from '@shared/study/requests';
import type { Context } from '../context';
import { Person } from '../models/Person';
import { Run } from '../models/Run';
import type { Study } from '../models/Study';
import { presentRun } from '../presenters/run';
import { briefOf } from './briefOf';

export interface StudyEvidence extends Evidence {
  readonly runs: readonly RunJson[];
}

/** Brief, envelope and runs of a study: all that its models and its choice of settings stand on. */
export async function evidenceOf(
  study: Study,
  { transaction }: Pick<Context, 'transaction'>,
): Promise<StudyEvidence> {
  const { brief, envelope } = briefOf(study);
  const runs = await Run.findAll({
    where: { studyId: study.id },
    include: { model: Person, as: 'operator' },
    order: [['number', 'ASC']],
    transaction,
  });
  return { brief, envelope, runs: runs.map((run) => presentRun(run, study)) };
}
