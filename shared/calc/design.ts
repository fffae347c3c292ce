import type { DesignAnswer, DesignRequest, DesignRun } from '../schemas/calc/design';
import { isCategorical, type Factor } from '../stats/coding/factor';
import { StatsError } from '../stats/errors';
import { seeded, shuffled } from '../stats/random/random';
import { designPoints, type DesignProperties } from './designPoints';
import { evaluateAnswer } from './evaluate';
import { layOut, refuseOutside, type LaidOutPoint } from './layOut';

const MAX_FACTORS = 12;

/** The model that a kind of design is meant for, for evaluating it. */
function modelFor({
  kind,
  options,
}: DesignRequest): 'linear' | 'interaction' | 'quadratic' | string[] {
  switch (kind) {
    case 'factorial':
      return 'interaction';
    case 'fractional':
    case 'plackettBurman':
    case 'definitiveScreening':
      return 'linear';
    case 'optimal':
      return options.model ?? 'quadratic';
    default:
      return 'quadratic';
  }
}

/** Random order inside each block, from the seed; without it the standard order. */
function inRunOrder(points: readonly LaidOutPoint[], request: DesignRequest): DesignRun[] {
  const random = seeded(request.seed, 'run order');
  const numbered = points.map((point, i) => ({ ...point, standardOrder: i + 1 }));
  const blocks = [...new Set(points.map(({ block }) => block))].sort((a, b) => a - b);
  const ordered = blocks.flatMap((block) => {
    const own = numbered.filter((point) => point.block === block);
    return request.randomise ? shuffled(own, random) : own;
  });
  return ordered.map(({ settings, coded, block, type, standardOrder }, i) => ({
    runOrder: i + 1,
    standardOrder,
    block,
    pointType: type,
    coded,
    settings,
  }));
}

/** D-efficiency lost by snapping; null without steps or where either cannot carry the model. */
function snapLossOf(
  request: DesignRequest,
  snapped: readonly LaidOutPoint[],
  dSnapped: number | null,
): number | null {
  if (!request.snap || dSnapped === null) return null;
  const ideal = snapped.map(({ idealSettings, block }) => ({ settings: idealSettings, block }));
  const { dEfficiency } = evaluateAnswer({
    factors: request.factors,
    constraints: [],
    region: request.region,
    runs: ideal,
    model: modelFor(request),
    significance: 0.05,
  });
  return dEfficiency === null || dEfficiency === 0 ? null : 1 - dSnapped / dEfficiency;
}

function checkFactors(factors: readonly Factor[], { kind }: DesignRequest): void {
  if (factors.length > MAX_FACTORS)
    throw new StatsError(
      'too-many-factors',
      `${factors.length} factors are more than the ${MAX_FACTORS} offered here.`,
    );
  const categorical = factors.filter(isCategorical);
  if (categorical.length > 0 && !['factorial', 'optimal', 'spaceFilling'].includes(kind))
    throw new StatsError(
      'not-available',
      `${categorical.map(({ key }) => key).join(', ')} has names for levels; this kind of design needs numbers. Take a factorial or an optimal design.`,
    );
}

function warningsOf(points: readonly LaidOutPoint[]): DesignAnswer['warnings'] {
  const keys = points.map(({ settings, block }) => JSON.stringify([settings, block]));
  const merged = points.filter(
    (point, i) => point.type !== 'centre' && keys.indexOf(keys[i]!) < i && !point.isReplicate,
  );
  if (merged.length === 0) return [];
  return [
    {
      code: 'steps-too-coarse',
      message: `Snapping to the steps made ${merged.length} point${merged.length > 1 ? 's' : ''} fall on another one: the ranges are narrow for these steps.`,
    },
  ];
}

const propertiesOf = (properties: DesignProperties) =>
  Object.fromEntries(
    Object.entries(properties).filter(([, value]) => value !== undefined),
  ) as DesignProperties;

/**
 * Builds a design: `POST /api/calc/design`.
 *
 * @throws StatsError `outside-envelope` with every point and limit that cannot be had, `not-available`,
 *   `too-many-factors`, `too-few-runs`, `aliased`, `no-feasible-point`.
 */
export function designAnswer(request: DesignRequest): DesignAnswer {
  const { factors, constraints, region } = request;
  checkFactors(factors, request);
  const { points, properties } = designPoints(request);
  const laidOut = layOut(factors, points, request);
  refuseOutside(request, laidOut);
  const evaluation = evaluateAnswer({
    factors,
    constraints,
    region,
    runs: laidOut.map(({ settings, block }) => ({ settings, block })),
    model: modelFor(request),
    significance: 0.05,
  });
  return {
    runs: inRunOrder(laidOut, request),
    properties: {
      ...propertiesOf(properties),
      snapLoss: snapLossOf(request, laidOut, evaluation.dEfficiency),
    },
    evaluation,
    warnings: warningsOf(laidOut),
  };
}
