import type { z } from 'zod';
import { StatsError } from '../stats/errors';
import { approximateDesign } from '../stats/design/approximateDesign';
import { arrange, centreOf, type OrderedPoint } from '../stats/design/arrange';
import type { CodedDesign, CodedPoint } from '../stats/design/codedDesign';
import { optimalDesign, type Placed } from '../stats/design/optimalDesign';
import { makeRegion } from '../stats/design/region';
import { regionMoments } from '../stats/design/regionMoments';
import { settableLattice } from '../stats/design/settableLattice';
import { shareOut } from '../stats/design/shareOut';
import { spaceFilling } from '../stats/design/spaceFilling';
import { compileRow } from '../stats/model/compileRow';
import { pointOf } from '../stats/model/modelMatrix';
import { termsOf } from '../stats/model/term';
import { makeRandom } from '../stats/random/generator';
import type { DesignKind, designRequestSchema } from '../schemas/calc/design';
import type { ModelInput } from '../schemas/calc/common';
import { STRUCTURED, type StructuredKind } from './designKinds';

export type ParsedDesign = z.output<typeof designRequestSchema>;

/** Every kind has the model that it is made for. */
const MODELS: Readonly<Record<DesignKind, ModelInput>> = {
  factorial: 'interaction',
  fractional: 'interaction',
  threeLevel: 'quadratic',
  plackettBurman: 'linear',
  centralComposite: 'quadratic',
  boxBehnken: 'quadratic',
  definitiveScreening: 'quadratic',
  optimal: 'quadratic',
  spaceFilling: 'quadratic',
};

const CENTRE_POINTS: Readonly<Partial<Record<DesignKind, number>>> = {
  threeLevel: 0,
  definitiveScreening: 1,
  optimal: 0,
  spaceFilling: 0,
};
const USUAL_CENTRE_POINTS = 6;

export function modelFor({ kind, options }: ParsedDesign): ModelInput {
  return options.model ?? MODELS[kind];
}

/** A design with its points in standard order. */
export interface BuiltDesign extends Omit<CodedDesign, 'points'> {
  readonly points: readonly OrderedPoint[];
}

/** How many blocks one replicate has, when replicates may be blocks of their own. */
function innerBlocks({ kind, blocks, replicates }: ParsedDesign) {
  const whole = { blocks, replicatesAreBlocks: false };
  if (blocks === 1 || replicates === 1 || kind === 'centralComposite') return whole;
  if (blocks % replicates !== 0) return whole;
  return { blocks: blocks / replicates, replicatesAreBlocks: true };
}

function structured(request: ParsedDesign, kind: StructuredKind): BuiltDesign {
  const { factors, options, replicates } = request;
  const { blocks, replicatesAreBlocks } = innerBlocks(request);
  const asked = request.centrePoints ?? CENTRE_POINTS[kind] ?? USUAL_CENTRE_POINTS;
  const design = STRUCTURED[kind]({ factors, options, blocks, centrePoints: asked, replicates });
  // a three-level factorial brings its own centre
  const own = replicates * design.points.filter(({ pointType }) => pointType === 'centre').length;
  const centrePoints = Math.max(0, asked - own);
  return {
    ...design,
    points: arrange(design, { factors, replicates, replicatesAreBlocks, centrePoints }),
  };
}

function runsAsked({ kind, options }: ParsedDesign): number {
  if (options.runs !== undefined) return options.runs;
  throw new StatsError(
    'too-few-runs',
    `Say how many runs the ${kind === 'optimal' ? 'optimal' : 'space-filling'} design has (options.runs).`,
  );
}

const numbered = (points: readonly CodedPoint[]): OrderedPoint[] =>
  points.map((each, i) => ({ ...each, standardOrder: i + 1 }));

function filling(request: ParsedDesign): BuiltDesign {
  const { factors, constraints, region, blocks, seed } = request;
  if (blocks > 1)
    throw new StatsError(
      'not-available',
      'A space-filling design is not parted into blocks. Take an optimal design.',
    );
  const centre = request.centrePoints ?? 0;
  const lattice = settableLattice(makeRegion(factors, constraints, region));
  const design = spaceFilling(lattice, runsAsked(request) - centre, makeRandom(seed));
  const arrangement = {
    factors,
    replicates: request.replicates,
    replicatesAreBlocks: false,
    centrePoints: centre,
  };
  return { ...design, points: arrange(design, arrangement) };
}

/** Runs that stay: included ones, then centre points, each in its block. */
function keptPoints(request: ParsedDesign, sizes: readonly number[]): CodedPoint[] {
  const { factors, options, blocks } = request;
  const included = (options.include ?? []).map(({ settings, block = 1 }): CodedPoint => {
    if (block > blocks)
      throw new StatsError(
        'shape',
        `An included run is in block ${block}; there are ${blocks} blocks.`,
      );
    return { point: pointOf(factors, settings), block, pointType: 'included' };
  });
  const centre = shareOut(request.centrePoints ?? 0, sizes.length).flatMap((count, i) =>
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

function optimal(request: ParsedDesign): BuiltDesign {
  const { factors, constraints, options, blocks, seed, replicates } = request;
  const region = makeRegion(factors, constraints, request.region);
  const terms = termsOf(factors, modelFor(request));
  const rowAt = compileRow(factors, terms);
  const random = makeRandom(seed);
  const sizes = shareOut(runsAsked(request), blocks);
  const kept = keptPoints(request, sizes);
  const best = approximateDesign({ region, rowAt, terms: terms.length }, random);
  const found = optimalDesign(
    {
      lattice: settableLattice(region),
      rowAt,
      terms: terms.length,
      moments: regionMoments(region, terms, rowAt),
      criterion: options.criterion ?? 'D',
      blocks,
      kept,
      free: freeBlocks(sizes, kept),
      support: best?.support ?? [],
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
  return { ...design, points: numbered([...repeated, ...kept]) };
}

/** The points of a design of any kind, in standard order, not yet on the dial. */
export function buildDesign(request: ParsedDesign): BuiltDesign {
  const { kind } = request;
  if (kind === 'optimal') return optimal(request);
  if (kind === 'spaceFilling') return filling(request);
  return structured(request, kind);
}
