import { StatsError } from '../stats/errors';
import { inRunOrder } from '../stats/design/arrange';
import { informationOf } from '../stats/design/designMatrix';
import { aliasChains, placesOf, resolutionOf, type EffectWord } from '../stats/design/effectWord';
import { refuseOutside, settle, splitByLimits, type Settled } from '../stats/design/settle';
import { cholesky, lnDeterminant } from '../stats/linalg/cholesky';
import { modelMatrix, type Point } from '../stats/model/modelMatrix';
import { termsOf, type Term } from '../stats/model/term';
import { seeded } from '../stats/random/random';
import type { DesignAnswer, DesignRequest } from '../schemas/calc/design';
import { buildDesign, modelFor, type BuiltDesign } from './designPoints';
import { checkRunCount } from './designKinds';
import { evaluateAnswer } from './evaluate';
import { checkFactorCount } from './limits';

const OPTIMAL = 'an optimal design, which stays inside the limits';

/** Whether a variant of the design could be run everywhere. */
function fits(request: DesignRequest): boolean {
  try {
    const settled = settledPoints(request, buildDesign(request));
    return splitByLimits(request.factors, request.constraints, settled).outside.length === 0;
  } catch (error) {
    if (error instanceof StatsError) return false;
    throw error;
  }
}

/** What to take instead of a design that leaves the envelope, only what would itself stay inside. */
function alternativesTo(request: DesignRequest): string[] {
  if (request.kind !== 'centralComposite') return [OPTIMAL];
  const { options } = request;
  const inscribed = fits({ ...request, options: { ...options, inscribed: true } });
  const faceCentred = fits({
    ...request,
    options: { ...options, alpha: 'faceCentred', inscribed: false },
  });
  return [
    ...(inscribed ? ['the inscribed form'] : []),
    ...(faceCentred ? ['the face-centred form'] : []),
    OPTIMAL,
  ];
}

function settledPoints({ factors, snap }: DesignRequest, { points }: BuiltDesign): Settled[] {
  // runs that stay were made as they are
  return points.map(({ point, pointType }) =>
    settle(factors, point, snap && pointType !== 'included'),
  );
}

function logDetOf(
  { factors }: DesignRequest,
  terms: readonly Term[],
  points: readonly Point[],
): number | null {
  const x = modelMatrix(factors, terms, points);
  const l = cholesky(informationOf(x), x.cols);
  return l ? lnDeterminant(l, x.cols) / x.cols : null;
}

/** Share of |M|^(1/p) that snapping costs. */
function snapLossOf(
  request: DesignRequest,
  built: BuiltDesign,
  settled: readonly Settled[],
): number | null {
  if (!request.snap) return null;
  const terms = termsOf(request.factors, modelFor(request, built));
  const wished = logDetOf(
    request,
    terms,
    built.points.map(({ point }) => point),
  );
  const got = logDetOf(
    request,
    terms,
    settled.map(({ point }) => point),
  );
  if (wished === null || got === null) return null;
  const loss = 1 - Math.exp(got - wished);
  return Math.abs(loss) < 1e-10 ? 0 : loss;
}

function effectName(keys: readonly string[], { mask, sign }: EffectWord): string {
  const name = placesOf(mask, keys.length)
    .map((i) => keys[i]!)
    .join(':');
  return sign < 0 ? `-${name}` : name;
}

/** Points that snapping made equal, and factors that it left without a change. */
function warningsOf(
  { factors, snap }: DesignRequest,
  built: BuiltDesign,
  settled: readonly Settled[],
): DesignAnswer['warnings'] {
  if (!snap) return [];
  const distinct = (points: readonly Point[]) => new Set(points.map((each) => each.join())).size;
  const lost =
    distinct(built.points.map(({ point }) => point)) - distinct(settled.map(({ point }) => point));
  const still = factors.filter(
    ({ key }) => new Set(settled.map(({ settings }) => settings[key])).size < 2,
  );
  const warnings = still.map(({ key }) => ({
    code: 'steps-too-coarse',
    message: `All runs have one setting of ${key}: its steps are too wide for its range.`,
  }));
  if (lost > 0)
    warnings.unshift({
      code: 'steps-too-coarse',
      message: `Snapping to the steps made ${lost} point${lost > 1 ? 's' : ''} fall on another one: the ranges are narrow for these steps.`,
    });
  return warnings;
}

function propertiesOf(
  request: DesignRequest,
  built: BuiltDesign,
  settled: readonly Settled[],
): DesignAnswer['properties'] {
  const keys = request.factors.map(({ key }) => key);
  const { alpha, generators, relation, confounded } = built;
  const resolution = resolutionOf(relation ?? []);
  return {
    ...(alpha === undefined ? {} : { alpha }),
    ...(resolution === null ? {} : { resolution }),
    ...(generators && { generators }),
    ...(relation && {
      definingRelation: relation.map(({ mask }) =>
        placesOf(mask, keys.length).map((i) => keys[i]!),
      ),
      aliases: aliasChains(relation, keys.length).map((chain) =>
        chain.map((effect) => effectName(keys, effect)),
      ),
    }),
    ...(confounded && { confounded: confounded.map((effect) => effectName(keys, effect)) }),
    snapLoss: snapLossOf(request, built, settled),
  };
}

/**
 * An experiment matrix of any kind: its runs in random order inside blocks, on settable values, with
 * what can be estimated. One seed, one order, on every machine.
 *
 * @throws StatsError `outside-envelope` when points leave the envelope or break a limit, naming them and
 *   what to take instead; `too-many-factors`, `too-few-runs`, `not-available`, `aliased`,
 *   `no-feasible-point`, `unknown-term`, `out-of-bounds`.
 */
export function designAnswer(request: DesignRequest): DesignAnswer {
  const { factors, constraints, region, seed, randomise } = request;
  checkFactorCount(factors);
  const built = buildDesign(request);
  checkRunCount(built.points.length);
  const settled = settledPoints(request, built);
  const planned = settled.filter((_, i) => built.points[i]!.pointType !== 'included');
  const split = splitByLimits(factors, constraints, planned);
  if (split.outside.length > 0) refuseOutside(factors, split, alternativesTo(request));
  const placed = built.points.map(({ block, standardOrder, pointType }, i) => ({
    block,
    standardOrder,
    pointType,
    coded: settled[i]!.coded,
    settings: settled[i]!.settings,
  }));
  const runs = inRunOrder(placed, randomise ? seeded(seed, 'run order') : null).map((run, i) => ({
    runOrder: i + 1,
    ...run,
  }));
  const asked = {
    factors,
    constraints,
    region,
    runs: runs.map(({ settings, block }) => ({ settings, block })),
    model: modelFor(request, built),
    significance: 0.05,
  };
  const evaluation = evaluateAnswer(asked, built.dBound);
  return {
    runs,
    properties: propertiesOf(request, built, settled),
    evaluation,
    warnings: warningsOf(request, built, settled),
  };
}
