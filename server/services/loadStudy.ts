import type { StudyFacts } from '@shared/policies/study';
import { stageOf } from '@shared/study/stage';
import type { ProgressJson } from '@shared/schemas/study';
import type { Context } from '../context';
import { notFound } from '../errors';
import { Candidate } from '../models/Candidate';
import { Customer } from '../models/Customer';
import { Fit } from '../models/Fit';
import { Matrix } from '../models/Matrix';
import { Person } from '../models/Person';
import { Release } from '../models/Release';
import { Rig } from '../models/Rig';
import { RigEnvelope } from '../models/RigEnvelope';
import { Run } from '../models/Run';
import { Sample } from '../models/Sample';
import { SieveStack } from '../models/SieveStack';
import { Study } from '../models/Study';

const WITH_ALL = [
  { model: Sample, as: 'sample', include: [{ model: Customer, as: 'customer' }] },
  { model: RigEnvelope, as: 'rigEnvelope', include: [{ model: Rig, as: 'rig' }] },
  { model: SieveStack, as: 'sieveStack' },
  { model: Person, as: 'openedBy' },
];

/** A study with what its page shows beside it, and how far it is. */
export interface LoadedStudy {
  readonly study: Study;
  readonly progress: ProgressJson;
  readonly facts: StudyFacts;
}

/** What a response needs before it can be modelled: it is not computed from the settings alone. */
const needsModel = (study: Study) =>
  (study.responses ?? []).filter(
    ({ kind, aim }) => aim !== 'observe' && kind !== 'specificEnergy' && kind !== 'duration',
  );

interface Counts {
  readonly runs: readonly Run[];
  readonly kept: readonly string[];
  readonly candidates: number;
  readonly isFrozen: boolean;
  readonly releasedAt: Date | null;
}

function progressOf(study: Study, counts: Counts): ProgressJson {
  const { runs, kept, candidates, isFrozen, releasedAt } = counts;
  const having = (status: Run['status']) => runs.filter((run) => run.status === status).length;
  const needed = needsModel(study);
  const modelsKept = needed.filter(({ key }) => kept.includes(key)).length;
  const stage = stageOf({
    hasBrief: study.factors !== null,
    isFrozen,
    runsOpen: having('planned'),
    modelsKept,
    modelsNeeded: needed.length,
    candidates,
    isReleased: releasedAt !== null,
  });
  return {
    stage,
    runsPlanned: having('planned'),
    runsRecorded: having('recorded'),
    runsVoid: having('void'),
    blocks: new Set(runs.map(({ block }) => block)).size,
    modelsKept,
    modelsNeeded: needed.length,
    candidates,
    releasedAt: releasedAt?.toISOString() ?? null,
  };
}

const group = <T extends { studyId: number }>(rows: readonly T[], studyId: number) =>
  rows.filter((row) => row.studyId === studyId);

/** How far each of these studies is: five queries, however many there are. */
export async function withProgress(
  studies: readonly Study[],
  { transaction }: Pick<Context, 'transaction'>,
): Promise<LoadedStudy[]> {
  const where = { studyId: studies.map(({ id }) => id) };
  const [runs, kept, candidates, matrices, releases] = await Promise.all([
    Run.findAll({ attributes: ['studyId', 'status', 'block'], where, transaction }),
    Fit.findAll({
      attributes: ['studyId', 'responseKey'],
      where: { ...where, isKept: true },
      transaction,
    }),
    Candidate.findAll({ attributes: ['studyId'], where, transaction }),
    Matrix.findAll({ attributes: ['studyId'], where, transaction }),
    Release.findAll({ attributes: ['studyId', 'createdAt'], where, transaction }),
  ]);
  return studies.map((study) => {
    const isFrozen = group(matrices, study.id).length > 0;
    const releasedAt = group(releases, study.id).at(-1)?.createdAt ?? null;
    const progress = progressOf(study, {
      runs: group(runs, study.id),
      kept: group(kept, study.id).map(({ responseKey }) => responseKey),
      candidates: group(candidates, study.id).length,
      isFrozen,
      releasedAt,
    });
    const facts = { stage: progress.stage, isFrozen, isReleased: releasedAt !== null };
    return { study, progress, facts };
  });
}

/**
 * One study of the actor's lab. For a write its row is locked, so two writes to one study go one after
 * the other.
 *
 * @throws HttpError 404, also for a study of another lab.
 */
export async function loadStudy(
  studyId: number,
  ctx: Context,
  { forWrite = false } = {},
): Promise<LoadedStudy> {
  const { actor, transaction } = ctx;
  const where = { id: studyId, labId: actor.labId };
  if (forWrite) await Study.findOne({ attributes: ['id'], where, transaction, lock: true });
  const study = await Study.findOne({ where, include: WITH_ALL, transaction });
  if (!study) throw notFound('study');
  const [loaded] = await withProgress([study], ctx);
  if (!loaded) throw notFound('study');
  return loaded;
}

export async function listStudies(ctx: Context): Promise<LoadedStudy[]> {
  const { actor, transaction } = ctx;
  const studies = await Study.findAll({
    where: { labId: actor.labId },
    include: WITH_ALL,
    order: [['updatedAt', 'DESC']],
    limit: 500,
    transaction,
  });
  return withProgress(studies, ctx);
}
