import type { GoalInput } from '../schemas/calc/common';
import type { FitInput } from '../schemas/fit';
import type { PlanInput } from '../schemas/matrix';
import { boundsOf, type ResponseJson } from '../schemas/response';
import { erectedCapacitanceNf, type EnvelopeJson } from '../schemas/rig';
import type { RunJson } from '../schemas/run';
import type { BriefJson } from '../schemas/study';
import { constraintsOf, factorsOf, variedSettings, type PlanBasis } from './plan';
import { deliveredSetting } from './results';

/** A plan as /api/calc/design takes it: factors and limits from Brief and rig, always snapped to steps. */
export function designRequestOf(brief: PlanBasis, envelope: EnvelopeJson, plan: PlanInput) {
  return {
    factors: factorsOf(brief, envelope),
    constraints: constraintsOf(brief, envelope),
    region: 'range' as const,
    ...plan,
    randomise: true,
    snap: true,
  };
}

/** The part of a run that a model sees. */
export type ModelledRun = Pick<
  RunJson,
  'id' | 'number' | 'block' | 'status' | 'settings' | 'actual' | 'results'
>;

/** A model to compute: the part of a kept fit that decides its numbers. */
export type ModelChoice = Pick<FitInput, 'terms' | 'transform' | 'settingsUsed'> & {
  readonly exclusions: readonly { readonly runId: number }[];
};

/** What is known of a study: enough to fit and to choose. */
export interface Evidence {
  readonly brief: BriefJson;
  readonly envelope: EnvelopeJson;
  readonly runs: readonly ModelledRun[];
}

/** The recorded runs that have a value of this response, in run order, as a calculation takes them. */
export function fitRunsOf(
  brief: PlanBasis,
  runs: readonly ModelledRun[],
  responseKey: string,
  choice: Pick<ModelChoice, 'settingsUsed' | 'exclusions'>,
) {
  return [...runs]
    .filter(({ status }) => status === 'recorded')
    .sort((a, b) => a.number - b.number)
    .flatMap((run) => {
      const value = run.results[responseKey] ?? null;
      if (value === null) return [];
      const setting =
        choice.settingsUsed === 'actual'
          ? deliveredSetting(run.settings, run.actual)
          : run.settings;
      return [
        {
          id: String(run.number),
          settings: variedSettings(brief, setting),
          block: run.block,
          value,
          excluded: choice.exclusions.some(({ runId }) => runId === run.id),
        },
      ];
    });
}

/** One response's model as /api/calc/fit takes it. Blocks are fitted when the runs have more than one. */
export function fitRequestOf(
  { brief, envelope, runs }: Evidence,
  response: Pick<ResponseJson, 'key' | 'kind' | 'unit'>,
  choice: ModelChoice,
) {
  const used = fitRunsOf(brief, runs, response.key, choice);
  const blocks =
    new Set(used.filter(({ excluded }) => !excluded).map(({ block }) => block)).size > 1;
  const bounds = boundsOf(response);
  return {
    factors: factorsOf(brief, envelope),
    runs: used,
    model: [...choice.terms],
    blocks,
    transform: choice.transform,
    ...(choice.transform === 'logit' && bounds ? { transformParameters: bounds } : {}),
  };
}

/** A response's goal, or null when it is only observed. */
export function goalOf(response: ResponseJson): GoalInput | null {
  const { key, aim, low, high, target, priority } = response;
  if (aim === 'observe' || low === null || high === null) return null;
  return {
    response: key,
    aim,
    low,
    high,
    ...(target === null ? {} : { target }),
    weight: 1,
    priority,
  };
}

/** The models that a choice stands on, one for each modelled response. */
export type ModelChoices = Readonly<Record<string, ModelChoice | undefined>>;

/**
 * The choice of settings as /api/calc/choose takes it: modelled responses, exact ones (energy,
 * duration), and the goals of the Brief for both. Held set-points go in as fixed values.
 */
export function chooseRequestOf(evidence: Evidence, choices: ModelChoices) {
  const { brief, envelope } = evidence;
  const modelled = brief.responses.flatMap((response) => {
    const choice = choices[response.key];
    if (!choice) return [];
    const { factors: _factors, ...fit } = fitRequestOf(evidence, response, choice);
    return [{ key: response.key, ...fit }];
  });
  const computed = brief.responses.flatMap(({ key, kind }) =>
    kind === 'specificEnergy' || kind === 'duration'
      ? [
          {
            key,
            kind,
            capacitanceNf: erectedCapacitanceNf(envelope),
            massG: brief.batchMassG,
            chargingPowerW: envelope.chargingPowerW,
          },
        ]
      : [],
  );
  const known = new Set([...modelled, ...computed].map(({ key }) => key));
  const goals = brief.responses
    .map(goalOf)
    .filter((goal): goal is GoalInput => goal !== null && known.has(goal.response));
  const held = Object.entries(brief.fixed).filter(
    (entry): entry is [string, number] => entry[1] !== null,
  );
  return {
    factors: factorsOf(brief, envelope),
    constraints: constraintsOf(brief, envelope),
    region: 'range' as const,
    responses: modelled,
    computed,
    goals,
    fixed: Object.fromEntries(held),
  };
}
