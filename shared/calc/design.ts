import { StatsError } from '../stats/errors';
import { inRunOrder } from '../stats/design/arrange';
import { informationOf } from '../stats/design/designMatrix';
import { aliasChains, placesOf, resolutionOf, type EffectWord } from '../stats/design/effectWord';
import { outsidePoints, refuseOutside, settle, type Settled } from '../stats/design/settle';
import { cholesky, logDeterminant } from '../stats/linalg/cholesky';
import { modelMatrix, type Point } from '../stats/model/modelMatrix';
import { termsOf } from '../stats/model/term';
import { GENERATOR, makeRandom } from '../stats/random/generator';
import { designRequestSchema, type DesignAnswer, type DesignRequest } from '../schemas/calc/design';
import { buildDesign, modelFor, type BuiltDesign, type ParsedDesign } from './designPoints';
import { checkRunCount } from './designKinds';
import { evaluateAnswer } from './evaluate';
import { checkFactorCount } from './limits';

const OPTIMAL = 'an optimal design, which stays inside the limits';

/** Whether a variant of the design could be run everywhere. */
function fits(request: ParsedDesign): boolean {
  try {
    const settled = settledPoints(request, buildDesign(request));
    return outsidePoints(request.factors, request.constraints, settled).length === 0;
  } catch (error) {
    if (error instanceof StatsError) return false;
    throw error;
  }
}

/** What to take instead of a design that leaves the envelope, only what would itself stay inside. */
function alternativesTo(request: ParsedDesign): string[] {
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

function settledPoints({ factors, snap }: ParsedDesign, { points }: BuiltDesign): Settled[] {
  // runs that stay were made as they are
  return points.map(({ point, pointType }) =>
    settle(factors, point, snap && pointType !== 'included'),
  );
}

function logDetOf(request: ParsedDesign, points: readonly Point[]): number | null {
  const x = modelMatrix(request.factors, termsOf(request.factors, modelFor(request)), points);
  const l = cholesky(informationOf(x), x.cols);
  return l ? logDeterminant(l, x.cols) / x.cols : null;
}

/** Share of |M|^(1/p) that snapping costs. */
function snapLossOf(
  request: ParsedDesign,
  built: BuiltDesign,
  settled: readonly Settled[],
): number | null {
  if (!request.snap) return 0;
  const wished = logDetOf(
    request,
    built.points.map(({ point }) => point),
  );
  const got = logDetOf(
    request,
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

function notesOf(request: ParsedDesign, settled: readonly Settled[]): string[] {
  const collapsed = request.factors.filter(
    ({ key }) => new Set(settled.map(({ settings }) => settings[key])).size < 2,
  );
  return collapsed.map(
    ({ key }) => `All runs have one setting of ${key}: its steps are too wide for its range.`,
  );
}

function propertiesOf(
  request: ParsedDesign,
  built: BuiltDesign,
  settled: readonly Settled[],
): DesignAnswer['properties'] {
  const keys = request.factors.map(({ key }) => key);
  const relation = built.relation ?? [];
  return {
    alpha: built.alpha ?? null,
    resolution: resolutionOf(relation),
    generators: [...(built.generators ?? [])],
    definingRelation: relation.map(({ mask }) => placesOf(mask, keys.length).map((i) => keys[i]!)),
    aliases: aliasChains(relation, keys.length).map((chain) =>
      chain.map((effect) => effectName(keys, effect)),
    ),
    confounded: (built.confounded ?? []).map((effect) => effectName(keys, effect)),
    snapLoss: snapLossOf(request, built, settled),
    random: GENERATOR,
    notes: notesOf(request, settled),
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
export function designAnswer(input: DesignRequest): DesignAnswer {
  const request = designRequestSchema.parse(input);
  const { factors, constraints, region, seed, randomise } = request;
  checkFactorCount(factors);
  const built = buildDesign(request);
  checkRunCount(built.points.length);
  const settled = settledPoints(request, built);
  const planned = settled.filter((_, i) => built.points[i]!.pointType !== 'included');
  const outside = outsidePoints(factors, constraints, planned);
  if (outside.length > 0) refuseOutside(factors, outside, alternativesTo(request));
  const placed = built.points.map(({ block, standardOrder, pointType }, i) => ({
    block,
    standardOrder,
    pointType,
    coded: settled[i]!.coded,
    settings: settled[i]!.settings,
  }));
  const runs = inRunOrder(placed, randomise ? makeRandom(seed) : null).map((run, i) => ({
    runOrder: i + 1,
    ...run,
  }));
  const evaluation = evaluateAnswer({
    factors,
    constraints,
    region,
    runs: runs.map(({ settings, block }) => ({ settings, block })),
    model: modelFor(request),
  });
  return { runs, properties: propertiesOf(request, built, settled), evaluation };
}
