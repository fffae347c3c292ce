import { chooseAnswer } from '@shared/calc/choose';
import { fitAnswer } from '@shared/calc/fit';
import { chooseRequestSchema } from '@shared/schemas/calc/choose';
import { fitRequestSchema } from '@shared/schemas/calc/fit';
import type { ReleaseContent } from '@shared/schemas/release';
import type { ResponseJson } from '@shared/schemas/response';
import { SET_POINT_KEYS, type SettingJson } from '@shared/schemas/setPoint';
import { goalSentence } from '@shared/study/goalSentence';
import { variedSettings } from '@shared/study/plan';
import {
  chooseRequestOf,
  fitRequestOf,
  type Evidence,
  type ModelChoice,
} from '@shared/study/requests';

const isSame = (a: SettingJson, b: SettingJson) =>
  SET_POINT_KEYS.every((key) => Math.abs(a[key] - b[key]) <= 1e-9 * Math.abs(b[key]));

/** Predictions and the chance of all goals at one setting, computed anew when it is signed. */
export function expectationsAt(
  evidence: Evidence,
  choices: Readonly<Record<string, ModelChoice>>,
  setting: SettingJson,
): Pick<ReleaseContent, 'expectations' | 'chanceAllGoals' | 'chanceError'> {
  const request = chooseRequestOf(evidence, choices);
  const answer = chooseAnswer(
    chooseRequestSchema.parse({
      ...request,
      fixed: { ...request.fixed, ...variedSettings(evidence.brief, setting) },
      support: 'region',
      top: 1,
    }),
  );
  const [best] = answer.best;
  const expectations = evidence.brief.responses.flatMap((response) => {
    const at = best?.responses[response.key];
    if (!at) return [];
    const { key, name, unit } = response;
    const { predicted, piLow, piHigh, holds } = at;
    return [{ key, name, unit, goal: goalSentence(response), predicted, piLow, piHigh, holds }];
  });
  return {
    expectations,
    chanceAllGoals: best?.probabilityAllGoals ?? null,
    chanceError: best?.probabilityError ?? null,
  };
}

/** One response's confirmation: its mean against the interval of a model that has not seen these runs. */
function confirms(
  evidence: Evidence,
  response: ResponseJson,
  choice: ModelChoice,
  at: { setting: SettingJson; runIds: readonly number[] },
): boolean | null {
  const values = evidence.runs
    .filter(({ id }) => at.runIds.includes(id))
    .flatMap(({ results }) => results[response.key] ?? []);
  if (values.length === 0) return null;
  const unseen = [...choice.exclusions, ...at.runIds.map((runId) => ({ runId }))];
  const request = fitRequestOf(evidence, response, { ...choice, exclusions: unseen });
  const { predictions } = fitAnswer(
    fitRequestSchema.parse({
      ...request,
      predictAt: [variedSettings(evidence.brief, at.setting)],
      meanOf: values.length,
    }),
  );
  const [prediction] = predictions;
  if (!prediction || prediction.piLow === null || prediction.piHigh === null) return null;
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return mean >= prediction.piLow && mean <= prediction.piHigh;
}

/** What the confirmation runs at this very setting say. */
export function confirmationAt(
  evidence: Evidence,
  choices: Readonly<Record<string, ModelChoice>>,
  setting: SettingJson,
  confirmRunIds: readonly number[],
): ReleaseContent['confirmation'] {
  const runIds = evidence.runs
    .filter(
      ({ id, settings, status }) =>
        confirmRunIds.includes(id) && status === 'recorded' && isSame(settings, setting),
    )
    .map(({ id }) => id);
  if (runIds.length === 0)
    return { runs: 0, passed: null, words: 'No confirmation run was made at these settings.' };
  const judged = evidence.brief.responses.flatMap((response) => {
    const choice = choices[response.key];
    const passed = choice ? confirms(evidence, response, choice, { setting, runIds }) : null;
    return passed === null ? [] : [{ name: response.name, passed }];
  });
  const missed = judged.filter(({ passed }) => !passed).map(({ name }) => name);
  const count = `${runIds.length} confirmation run${runIds.length > 1 ? 's' : ''}`;
  if (judged.length === 0)
    return { runs: runIds.length, passed: null, words: `${count}, but no model to compare with.` };
  return {
    runs: runIds.length,
    passed: missed.length === 0,
    words:
      missed.length === 0
        ? `The mean of ${count} lies inside the 95 % prediction interval of every model.`
        : `The mean of ${count} lies outside the 95 % prediction interval: ${missed.join(', ')}.`,
  };
}
