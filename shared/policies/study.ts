import type { Stage } from '../schemas/stage';
import { has, onlyFor, type Rule } from './actor';

export interface StudyFacts {
  readonly stage: Stage;
  readonly isFrozen: boolean;
  readonly isReleased: boolean;
}

const notFrozen: Rule<StudyFacts> = (_actor, study) =>
  study.isFrozen
    ? 'The matrix is frozen, so the Brief no longer changes. Open a new study to ask another question.'
    : null;

const notReleased: Rule<StudyFacts> = (_actor, study) =>
  study.isReleased
    ? 'These settings are released. A released study takes no further entries.'
    : null;

const frozen: Rule<StudyFacts> = (_actor, study) =>
  study.isFrozen ? null : 'There are no runs yet: the matrix is not frozen.';

/** Who may do what with a study. The server enforces these; the client explains them. */
export const studyPolicy = {
  open: (actor) => onlyFor(actor, 'Opening a study', 'researcher', 'lead'),
  editBrief: (actor, study) =>
    onlyFor(actor, 'Writing the Brief', 'researcher', 'lead') ?? notFrozen(actor, study),
  freeze: (actor, study) =>
    onlyFor(actor, 'Freezing a matrix', 'researcher', 'lead') ?? notFrozen(actor, study),
  recordRun: (actor, study) =>
    onlyFor(actor, 'Recording runs', 'operator') ??
    frozen(actor, study) ??
    notReleased(actor, study),
  voidRun: (actor, study) =>
    onlyFor(actor, 'Marking a run void', 'operator', 'lead') ??
    frozen(actor, study) ??
    notReleased(actor, study),
  measure: (actor, study) =>
    onlyFor(actor, 'Entering measured responses', 'operator', 'analyst') ??
    frozen(actor, study) ??
    notReleased(actor, study),
  fit: (actor, study) =>
    onlyFor(actor, 'Keeping a model', 'analyst') ??
    frozen(actor, study) ??
    notReleased(actor, study),
  nominate: (actor, study) =>
    onlyFor(actor, 'Taking a candidate', 'analyst', 'lead', 'researcher') ??
    frozen(actor, study) ??
    notReleased(actor, study),
  addRuns: (actor, study) =>
    onlyFor(actor, 'Adding runs', 'lead', 'researcher') ??
    frozen(actor, study) ??
    notReleased(actor, study),
  sign: (actor, study) =>
    onlyFor(actor, 'Signing', 'lead') ?? frozen(actor, study) ?? notReleased(actor, study),
} satisfies Record<string, Rule<StudyFacts>>;

/** Two persons by default: whoever kept a model does not sign what it recommends. */
export const mayRelease: Rule<{ twoPersonRule: boolean; keptBy: readonly number[] }> = (
  actor,
  facts,
) =>
  facts.twoPersonRule && facts.keptBy.includes(actor.id)
    ? 'You kept a model of this study, so somebody else signs it: the lab asks for two persons.'
    : null;

export const mayReadStudies: Rule = (actor) =>
  has(actor, 'researcher', 'operator', 'analyst', 'lead', 'admin')
    ? null
    : 'Studies are open to the people of the lab. Your samples are on your own page.';
