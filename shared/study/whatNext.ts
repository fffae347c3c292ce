import type { StudyJson } from '../schemas/study';
import type { CandidateJson } from '../schemas/release';
import type { RunJson } from '../schemas/run';
import { SET_POINT_KEYS, type SettingJson } from '../schemas/setPoint';

/** What the evidence calls for now: one claim, why, what it costs, and where it is done. */
export interface NextStep {
  readonly claim: string;
  readonly words: string;
  readonly action: string;
  /** The stage whose page does it. */
  readonly to: 'brief' | 'matrix' | 'bench' | 'fit' | 'map' | 'release';
  readonly cost: { readonly runs: number; readonly massG: number; readonly minutes: number } | null;
}

const same = (a: SettingJson, b: SettingJson) => SET_POINT_KEYS.every((key) => a[key] === b[key]);

const settingWords = ({ voltage, gap, pulses }: SettingJson) =>
  `${voltage} kV, ${gap} mm, ${pulses} pulses`;

interface Facts {
  readonly study: StudyJson;
  readonly runs: readonly RunJson[];
  readonly candidates: readonly CandidateJson[];
}

/** Handling, and the pulses themselves. */
function costOf({ brief }: StudyJson, runs: number): NextStep['cost'] {
  if (!brief) return null;
  return { runs, massG: runs * brief.batchMassG, minutes: runs * brief.handlingMinutes };
}

const CONFIRM_RUNS = 3;

function atRelease({ study, runs, candidates }: Facts): NextStep {
  const [first] = candidates;
  if (study.progress.releasedAt !== null)
    return {
      claim: 'These settings are signed',
      words:
        'The evidence behind them is kept with the signature and cannot be changed. A new question starts a new study.',
      action: 'Read the release',
      to: 'release',
      cost: null,
    };
  const confirmed = first
    ? runs.filter(
        ({ purpose, status, settings }) =>
          purpose === 'confirm' && status === 'recorded' && same(settings, first.settings),
      ).length
    : 0;
  if (first && confirmed === 0)
    return {
      claim: `Confirm ${settingWords(first.settings)} with three fresh bags`,
      words:
        'Every model that a goal needs is kept and a setting is chosen. What a model promises counts once fresh bags have kept it; they go in a block of their own.',
      action: 'Plan three confirmation runs',
      to: 'release',
      cost: costOf(study, CONFIRM_RUNS),
    };
  return {
    claim: first ? 'Sign the settings' : 'Choose a setting',
    words: first
      ? `${confirmed} confirmation runs are in. Whoever kept no model reads the evidence and signs, with the password again.`
      : 'Every settable combination can be looked at; the ranked ones come with their intervals and the chance that all goals hold.',
    action: first ? 'To the signature' : 'See the ranked settings',
    to: 'release',
    cost: null,
  };
}

/** One place says what the evidence calls for now, why, and what it costs. */
export function whatNext(facts: Facts): NextStep {
  const { study } = facts;
  const { progress } = study;
  switch (progress.stage) {
    case 'brief':
      return {
        claim: 'Write the Brief',
        words:
          'Sample, rig, what may vary in which range, and what the product should be: the plan follows from these.',
        action: 'Write the Brief',
        to: 'brief',
        cost: null,
      };
    case 'matrix':
      return {
        claim: 'Pick a matrix',
        words:
          'Several plans stand side by side, with their runs, grams and minutes, and what each can and cannot tell. Freezing one reserves its sample.',
        action: 'Compare the plans',
        to: 'matrix',
        cost: null,
      };
    case 'bench':
      return {
        claim: `Do the next of ${progress.runsPlanned} runs`,
        words:
          'The order was drawn at random on purpose: it keeps a drift of rig or water from posing as an effect.',
        action: 'To the bench',
        to: 'bench',
        cost: costOf(study, progress.runsPlanned),
      };
    case 'fit':
      return {
        claim: 'Fit the models',
        words: `All runs are done. ${progress.modelsNeeded - progress.modelsKept} of ${progress.modelsNeeded} responses with a goal still need a kept model.`,
        action: 'To the fit',
        to: 'fit',
        cost: null,
      };
    case 'map':
      return {
        claim: 'Read the map, then choose a setting',
        words:
          'Every response with a goal has its model. The map shows where they meet; the ranking looks at every setting that can be dialled in.',
        action: 'See the ranked settings',
        to: 'release',
        cost: null,
      };
    case 'release':
      return atRelease(facts);
  }
}
