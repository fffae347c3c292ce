import type { StockJson } from '@shared/schemas/sample';
import type { BriefJson, StudyJson, StudySummaryJson } from '@shared/schemas/study';
import type { Matrix } from '../models/Matrix';
import type { Study } from '../models/Study';
import type { LoadedStudy } from '../services/loadStudy';
import { byLine } from './byLine';
import { presentRig } from './lab';

export function presentStudySummary({ study, progress }: LoadedStudy): StudySummaryJson {
  const { sample, openedBy } = study;
  if (!sample) throw new Error('presentStudySummary needs the study’s sample.');
  return {
    id: study.id,
    code: study.code,
    title: study.title,
    question: study.question,
    sample: { id: sample.id, code: sample.code, name: sample.name, material: sample.material },
    customer: sample.customer ? { id: sample.customer.id, name: sample.customer.name } : null,
    isSimulated: study.isSimulated,
    progress,
    openedBy: byLine(openedBy),
    createdAt: study.createdAt.toISOString(),
    updatedAt: study.updatedAt.toISOString(),
  };
}

/** The Brief, or null until it was saved once: the columns come and go together. */
export function presentBrief(study: Study): BriefJson | null {
  const { factors, fixed, responses, batchMassG, handlingMinutes, sieveStack } = study;
  if (
    !factors ||
    !fixed ||
    !responses ||
    batchMassG === null ||
    handlingMinutes === null ||
    !sieveStack
  )
    return null;
  const { id, name, aperturesMm, frameDiameterMm } = sieveStack;
  return {
    factors,
    fixed,
    responses,
    batchMassG,
    handlingMinutes,
    massLimitG: study.massLimitG,
    runLimit: study.runLimit,
    dayLimit: study.dayLimit,
    effectThatMatters: study.effectThatMatters,
    expectedSpread: study.expectedSpread,
    practiceMaterial: study.practiceMaterial,
    sieveStack: { id, name, aperturesMm, frameDiameterMm },
  };
}

function presentMatrix(matrix: Matrix): StudyJson['matrix'] {
  const { id, kind, plan, seed, runCount, createdAt } = matrix;
  return {
    id,
    kind,
    plan,
    seed,
    runCount,
    frozenAt: createdAt.toISOString(),
    frozenBy: byLine(matrix.frozenBy),
  };
}

export function presentStudy(
  loaded: LoadedStudy,
  stock: StockJson,
  matrix: Matrix | null,
): StudyJson {
  const { study } = loaded;
  return {
    ...presentStudySummary(loaded),
    brief: presentBrief(study),
    rig: study.rigEnvelope ? presentRig(study.rigEnvelope) : null,
    stock,
    matrix: matrix ? presentMatrix(matrix) : null,
    version: study.version,
  };
}
