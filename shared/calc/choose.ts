import type { ChooseAnswer, ChooseRequest, ChosenSetting } from '../schemas/calc/choose';
import { holds } from '../stats/choice/desirability';
import { jointDraws, type JointDraws } from '../stats/choice/joint';
import { constraintWords } from '../stats/coding/constraint';
import { StatsError } from '../stats/errors';
import { predictPoint } from '../stats/fit/predict';
import {
  coarse,
  codedOf,
  heldRegion,
  MAX_EXHAUSTIVE,
  placeGoals,
  settingsOf,
  type Choice,
  type Found,
} from './choice';
import { choiceModels, exactResponses, jointResponseOf } from './choiceModels';
import { probabilityAt, rankByProbability } from './choiceProbability';
import { MAX_JOINT, MAX_TRADE_OFF_POINTS, walk, type LongWork, type Walked } from './choiceWalk';

const MAX_TRADE_OFF = 2000;

function present(choice: Choice, joint: JointDraws | null, found: Found): ChosenSetting {
  const { request, models, exact, goals } = choice;
  const { factors } = request;
  const coded = codedOf(factors, found.values);
  const holdsAll = (key: string, y: number) => {
    const own = goals.filter(({ response }) => response === key);
    return own.length === 0 ? null : own.every((goal) => holds(goal, y));
  };
  const modelled = models.map(({ key, model }) => {
    const { predicted, piLow, piHigh } = predictPoint(model.predictor, coded, {
      confidence: 0.95,
      meanOf: 1,
      blockSd: 0,
    });
    return [key, { predicted, piLow, piHigh, holds: holdsAll(key, predicted) }] as const;
  });
  const computed = exact.map(({ key, valueAt }) => {
    const predicted = valueAt(found.values);
    return [
      key,
      { predicted, piLow: null, piHigh: null, holds: holdsAll(key, predicted) },
    ] as const;
  });
  const chance = probabilityAt(choice, joint, found.values);
  return {
    settings: settingsOf(factors, found.values),
    desirability: found.desirability,
    probabilityAllGoals: chance?.probability ?? null,
    probabilityError: chance?.error ?? null,
    responses: Object.fromEntries([...modelled, ...computed]),
  };
}

function reasonsOf(
  choice: Choice,
  walked: Walked,
  facts: { isThinned: boolean; isProven: boolean; kind: ChooseAnswer['joint'] },
): string[] {
  const { request, goals } = choice;
  const reasons: string[] = [];
  if (facts.isThinned)
    reasons.push(
      `The lattice has ${choice.region.size.toExponential(1)} combinations or more, so every second value was looked at on its long axes.`,
    );
  if (
    request.support === 'data' &&
    walked.supported < walked.evaluated &&
    choice.region.size <= MAX_TRADE_OFF_POINTS
  )
    reasons.push(
      `${walked.evaluated - walked.supported} of ${walked.evaluated} settings were left out: a model is less certain there than at any run.`,
    );
  if (walked.byDesirability.length === 0) {
    goals.forEach((goal, g) => {
      if (walked.bestOfGoal[g]! > 0)
        reasons.push(`No setting is predicted to meet the goal for ${goal.response}, even alone.`);
    });
    reasons.push(
      'No setting is predicted to meet all goals with room to spare; those that come nearest are shown.',
    );
  }
  if (!facts.isProven)
    reasons.push(
      `Ranked among the ${MAX_JOINT} settings with the highest possible chance; one beyond them could still do as well.`,
    );
  if (facts.kind === 'independent')
    reasons.push(
      'The responses were taken as independent: the runs do not suffice to estimate how they vary together.',
    );
  return reasons;
}

/**
 * Looks at every settable setting and ranks them: `POST /api/calc/choose`.
 *
 * @throws StatsError `no-feasible-point` when the limits leave nothing, and what `fitModel` throws, with
 *   the response named.
 */
export function chooseAnswer(request: ChooseRequest, work: LongWork = {}): ChooseAnswer {
  const models = choiceModels(request);
  const exact = exactResponses(request);
  const goals = placeGoals(request, models, exact);
  const full = heldRegion(request);
  const isThinned = full.size > MAX_EXHAUSTIVE;
  const choice: Choice = {
    request,
    region: isThinned ? coarse(full) : full,
    models,
    exact,
    goals,
  };
  const walked = walk(choice, work);
  if (walked.evaluated === 0)
    throw new StatsError(
      'no-feasible-point',
      `No settable combination keeps all limits (${request.constraints.map(constraintWords).join('; ') || 'the ranges'}). Widen a range or check the limits.`,
    );
  const judgeable =
    models.length > 0 && models.every(({ model }) => model.summary.residualSd !== null);
  const joint = judgeable
    ? jointDraws(models.map(jointResponseOf), request.draws, request.seed)
    : null;
  const { ranked, isProven } =
    request.rankBy === 'probability'
      ? rankByProbability(choice, joint, walked)
      : { ranked: walked.byDesirability, isProven: true };
  const shown = ranked.length > 0 ? ranked : walked.nearest;
  const kind = joint?.kind ?? 'none';
  return {
    latticeSize: full.size,
    evaluated: walked.evaluated,
    exhaustive: !isThinned,
    best: shown.map((found) => present(choice, joint, found)),
    tradeOff: {
      count: walked.front.size,
      settings: walked.front.take(MAX_TRADE_OFF).map(({ values, goals: at }) => ({
        settings: settingsOf(request.factors, values),
        responses: Object.fromEntries(goals.map(({ response }, g) => [response, at[g]!])),
      })),
    },
    joint: kind,
    reasons: reasonsOf(choice, walked, { isThinned, isProven, kind }),
  };
}
