import { StatsError } from '../stats/errors';
import { isCategorical } from '../stats/coding/factor';
import { bestOn, boundFrom } from '../stats/design/criteria';
import { modelOf } from '../stats/design/designMatrix';
import { arrange, centreOf, type OrderedPoint } from '../stats/design/arrange';
import type { CodedDesign, CodedPoint } from '../stats/design/codedDesign';
import { optimalDesign, type Placed } from '../stats/design/optimalDesign';
import { makeRegion } from '../stats/design/designRegion';
import { regionMoments } from '../stats/design/regionMoments';
import { resolutionOf } from '../stats/design/effectWord';
import { settableLattice } from '../stats/design/settableLattice';
import { shareOut } from '../stats/design/shareOut';
import { spaceFilling } from '../stats/design/spaceFilling';
import { compileRow } from '../stats/model/compileRow';
import { pointOf } from '../stats/model/modelMatrix';
import { termsOf, type Term } from '../stats/model/term';
import { seeded } from '../stats/random/random';
import type { DesignKind, DesignRequest } from '../schemas/calc/design';
import type { ModelInput } from '../schemas/calc/common';
import { STRUCTURED, type StructuredKind } from './designKinds';

/** Every kind has the model that it is made for. */
const MODELS: Readonly<Record<DesignKind, ModelInput>> = {
  factorial: 'interaction',
  fractional: 'linear',
  threeLevel: 'quadratic',
  plackettBurman: 'linear',
  centralComposite: 'quadratic',
  boxBehnken: 'quadratic',
  definitiveScreening: 'linear',
  optimal: 'quadratic',
  spaceFilling: 'quadratic',
};
/** From here up a fraction tells two-factor products apart. */
const CLEAR_PRODUCTS = 5;

const WITH_CENTRE: readonly DesignKind[] = [
  'factorial',
  'fractional',
  'centralComposite',
  'boxBehnken',
];
const USUAL_CENTRE_POINTS = 6;
const EXTRA_OPTIMAL_RUNS = 5;
const DEFAULT_SPACE_RUNS = 12;

/** The model that a design is evaluated for: the one asked for, or the largest that its kind is meant for. */
export function modelFor(
  { kind, options }: DesignRequest,
  built: Pick<BuiltDesign, 'relation'>,
): ModelInput {
  if (options.model !== undefined) return options.model;
  const resolution = resolutionOf(built.relation ?? []);
  const isClear = resolution === null || resolution >= CLEAR_PRODUCTS;
  return kind === 'fractional' && isClear ? 'interaction' : MODELS[kind];
}

/** Centre points asked for, or what the kind usually takes. */
function centreCount({ kind, centrePoints, factors }: DesignRequest): number {
  if (centrePoints !== undefined) return centrePoints;
  if (kind === 'definitiveScreening') return 1;
  return WITH_CENTRE.includes(kind) && !factors.some(isCategorical) ? USUAL_CENTRE_POINTS : 0;
}

/** A design with its points in standard order. */
export interface BuiltDesign extends Omit<CodedDesign, 'points'> {
  readonly points: readonly OrderedPoint[];
  /** Upper bound on |M|^(1/p), when the search for the design gave it. */
  readonly dBound?: number;
}

/** How many blocks one replicate has, when replicates may be blocks of their own. */
function innerBlocks({ kind, blocks, replicates }: DesignRequest) {
  const whole = { blocks, replicatesAreBlocks: false };
  if (blocks === 1 || replicates === 1 || kind === 'centralComposite') return whole;
  if (blocks % replicates !== 0) return whole;
  return { blocks: blocks / replicates, replicatesAreBlocks: true };
}

function structured(request: DesignRequest, kind: StructuredKind): BuiltDesign {
  const { factors, options, replicates } = request;
  const { blocks, replicatesAreBlocks } = innerBlocks(request);
  const asked = centreCount(request);
  const design = STRUCTURED[kind]({ factors, options, blocks, centrePoints: asked, replicates });
  // a three-level factorial brings its own centre
  const own = replicates * design.points.filter(({ pointType }) => pointType === 'centre').length;
  const centrePoints = Math.max(0, asked - own);
  return {
    ...design,
    points: arrange(design, { factors, replicates, replicatesAreBlocks, centrePoints }),
  };
}

const numbered = (points: readonly CodedPoint[]): OrderedPoint[] =>
  points.map((each, i) => ({ ...each, standardOrder: i + 1 }));

function filling(request: DesignRequest): BuiltDesign {
  const { factors, constraints, region, blocks, seed } = request;
  if (blocks > 1)
    throw new StatsError(
      'not-available',
      'A space-filling design is not parted into blocks. Take an optimal design.',
    );
  const lattice = settableLattice(makeRegion(factors, constraints, region));
  const design = spaceFilling(
    lattice,
    request.options.runs ?? DEFAULT_SPACE_RUNS,
    seeded(seed, 'design'),
  );
  const arrangement = {
    factors,
    replicates: request.replicates,
    replicatesAreBlocks: false,
    centrePoints: centreCount(request),
  };
  return { ...design, points: arrange(design, arrangement) };
}

/** Runs that stay: included ones, then centre points, each in its block. */
function keptPoints(request: DesignRequest): CodedPoint[] {
  const { factors, options, blocks } = request;
  const included = (options.include ?? []).map(({ settings, block }): CodedPoint => {
    if (block > blocks)
      throw new StatsError(
        'shape',
        `An included run is in block ${block}; there are ${blocks} blocks.`,
      );
    return { point: pointOf(factors, settings), block, pointType: 'included' };
  });
  const centre = shareOut(centreCount(request), blocks).flatMap((count, i) =>
    Array.from({ length: count }, (_, turn): CodedPoint => ({
      point: centreOf(factors, turn),
      block: i + 1,
      pointType: 'centre',
    })),
  );
  return [...included, ...centre];
}

/** Blocks of the runs to be found, so that blocks come out as even as can be. */
function freeBlocks(sizes: readonly number[], kept: readonly CodedPoint[]): number[] {
  return sizes.flatMap((size, i) => {
    const there = kept.filter(({ block }) => block === i + 1).length;
    return new Array<number>(Math.max(0, size - there)).fill(i + 1);
  });
}

/** @throws StatsError `aliased` when the runs found leave terms that cannot be told apart. */
function refuseAliased(
  { factors }: DesignRequest,
  terms: readonly Term[],
  runs: readonly CodedPoint[],
): void {
  const points = runs.map(({ point }) => point);
  const blocks = runs.map(({ block }) => block);
  const { names, split } = modelOf(factors, terms, points, blocks);
  const lost = names.filter((_, j) => !split.estimable[j]);
  if (lost.length > 0) throw aliased(lost);
}

function aliased(names: readonly string[]): StatsError {
  return new StatsError(
    'aliased',
    `No settable runs inside the limits tell these terms apart: ${names.join(', ')}. Take a smaller model, finer steps or wider ranges.`,
    { terms: names },
  );
}

function optimal(request: DesignRequest): BuiltDesign {
  const { factors, constraints, options, blocks, seed, replicates } = request;
  const region = makeRegion(factors, constraints, request.region);
  const terms = termsOf(factors, options.model ?? MODELS.optimal);
  const rowAt = compileRow(factors, terms);
  const random = seeded(seed, 'design');
  // centre points come beside the runs asked for, included runs count among them
  const runs = (options.runs ?? terms.length + EXTRA_OPTIMAL_RUNS) + centreCount(request);
  const kept = keptPoints(request);
  const best = bestOn(region, terms);
  if (!best) throw aliased(terms.map(({ name }) => name));
  const found = optimalDesign(
    {
      lattice: settableLattice(region),
      rowAt,
      terms: terms.length,
      moments: regionMoments(region, terms, rowAt),
      criterion: options.criterion ?? 'D',
      blocks,
      kept,
      free: freeBlocks(shareOut(runs, blocks), kept),
      support: best.support,
    },
    random,
  );
  const made = found.points.map((each: Placed): CodedPoint => ({ ...each, pointType: 'optimal' }));
  const design: CodedDesign = { points: made, blocks };
  const repeated = arrange(design, {
    factors,
    replicates,
    replicatesAreBlocks: false,
    centrePoints: 0,
  });
  const points = numbered([...repeated, ...kept]);
  refuseAliased(request, terms, points);
  return { ...design, points, dBound: boundFrom(best, terms.length) };
}

/** The points of a design of any kind, in standard order, not yet on the dial. */
export function buildDesign(request: DesignRequest): BuiltDesign {
  const { kind } = request;
  if (kind === 'optimal') return optimal(request);
  if (kind === 'spaceFilling') return filling(request);
  return structured(request, kind);
}
