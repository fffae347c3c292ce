import { StatsError } from '../stats/errors';
import { isCategorical, type Factor } from '../stats/coding/factor';
import { boxBehnken } from '../stats/design/boxBehnken';
import { centralComposite } from '../stats/design/centralComposite';
import { levelGrid, pointsOf, type CodedDesign } from '../stats/design/codedDesign';
import { definitiveScreening } from '../stats/design/definitiveScreening';
import {
  bestGenerators,
  parseGenerators,
  type Generator,
} from '../stats/design/fractionGenerators';
import { plackettBurman } from '../stats/design/plackettBurman';
import { threeLevelDesign } from '../stats/design/threeLevel';
import { foldOver, twoLevelDesign } from '../stats/design/twoLevel';
import type { DesignOptions } from '../schemas/calc/design';
import { MAX_RUNS } from './limits';

/** What a structured design is built from. */
export interface KindRequest {
  readonly factors: readonly Factor[];
  readonly options: DesignOptions;
  /** Blocks inside one replicate. */
  readonly blocks: number;
  readonly centrePoints: number;
  readonly replicates: number;
}

export function checkRunCount(runs: number): void {
  if (runs > MAX_RUNS)
    throw new StatsError(
      'out-of-bounds',
      `That would be ${runs} runs; at most ${MAX_RUNS} are planned at once. Take a fraction or an optimal design.`,
    );
}

function onlyNumeric(factors: readonly Factor[], what: string): void {
  const categorical = factors.find(isCategorical);
  if (categorical)
    throw new StatsError(
      'not-available',
      `${what} varies numbers; ${categorical.key} has named levels. Take a factorial or an optimal design.`,
    );
}

function oneBlock(blocks: number, what: string): void {
  if (blocks > 1)
    throw new StatsError(
      'not-available',
      `${what} is not parted into blocks. Repeat it once in each block (as many replicates as blocks), or take an optimal design.`,
    );
}

/** ±1 as the places of two levels, for categorical factors of two-level designs. */
function withLevels(factors: readonly Factor[], design: CodedDesign): CodedDesign {
  const wide = factors.find((factor) => isCategorical(factor) && factor.levels.length > 2);
  if (wide)
    throw new StatsError(
      'not-available',
      `A two-level design takes two levels of ${wide.key}; it has more. Take a full factorial or an optimal design.`,
    );
  if (!factors.some(isCategorical)) return design;
  const points = design.points.map((each) => ({
    ...each,
    point: each.point.map((sign, i) => (isCategorical(factors[i]!) ? (sign + 1) / 2 : sign)),
  }));
  return { ...design, points };
}

function factorial({ factors, blocks, replicates }: KindRequest): CodedDesign {
  const sizes = factors.map((factor) => (isCategorical(factor) ? factor.levels.length : 2));
  checkRunCount(replicates * sizes.reduce((product, size) => product * size, 1));
  if (sizes.every((size) => size === 2))
    return withLevels(factors, twoLevelDesign(factors.length, [], blocks));
  oneBlock(blocks, 'A factorial with more than two levels');
  const grid = levelGrid(
    factors.map((factor) =>
      isCategorical(factor) ? factor.levels.map((_, level) => level) : [-1, 1],
    ),
  );
  return { points: pointsOf(grid, 'factorial'), blocks };
}

function generatorsOf({ factors, options }: KindRequest): Generator[] {
  const { generators, fraction } = options;
  if (generators && generators.length > 0)
    return parseGenerators(
      generators,
      factors.map(({ key }) => key),
    );
  if (fraction === undefined)
    throw new StatsError(
      'not-available',
      'A fraction needs `fraction` (p of 2^(k−p)) or `generators`, like frequency=voltage:gap:pulses.',
    );
  return fraction === 0 ? [] : bestGenerators(factors.length, fraction);
}

function foldedFactor({ factors, options }: KindRequest): number | null {
  if (typeof options.foldOver !== 'string') return null;
  const place = factors.findIndex(({ key }) => key === options.foldOver);
  if (place >= 0) return place;
  throw new StatsError('unknown-term', `There is no factor ‘${options.foldOver}’ to fold over.`);
}

function generatorText(factors: readonly Factor[], { factor, mask, sign }: Generator): string {
  const product = factors.filter((_, i) => (mask >> i) & 1).map(({ key }) => key);
  return `${factors[factor]!.key}=${sign < 0 ? '-' : ''}${product.join(':')}`;
}

function fractional(request: KindRequest): CodedDesign {
  const { factors, options, blocks, replicates } = request;
  const generators = generatorsOf(request);
  checkRunCount(replicates * 2 ** (factors.length - generators.length));
  const isFolded = options.foldOver !== undefined && options.foldOver !== false;
  const fraction = twoLevelDesign(factors.length, generators, isFolded ? 1 : blocks);
  const design = isFolded ? foldOver(fraction, foldedFactor(request), blocks) : fraction;
  return {
    ...withLevels(factors, design),
    generators: generators.map((generator) => generatorText(factors, generator)),
  };
}

function threeLevel({ factors, blocks, replicates }: KindRequest): CodedDesign {
  const sizes = factors.map((factor) => (isCategorical(factor) ? factor.levels.length : 3));
  checkRunCount(replicates * sizes.reduce((product, size) => product * size, 1));
  return threeLevelDesign(factors, blocks);
}

function composite(request: KindRequest): CodedDesign {
  const { factors, options, blocks, centrePoints, replicates } = request;
  onlyNumeric(factors, 'A central composite design');
  const { alpha = 'rotatable', inscribed = false, fraction = 0 } = options;
  checkRunCount(replicates * 2 ** (factors.length - fraction));
  return centralComposite(factors.length, {
    alpha,
    inscribed,
    fraction,
    blocks,
    centrePoints,
    replicates,
  });
}

/** Builds the designs that follow from a rule, in standard order, without replicates or centre points. */
export const STRUCTURED = {
  factorial,
  fractional,
  threeLevel,
  centralComposite: composite,
  boxBehnken: ({ factors, blocks }: KindRequest) => {
    onlyNumeric(factors, 'A Box–Behnken design');
    return boxBehnken(factors.length, blocks);
  },
  plackettBurman: ({ factors, options, blocks }: KindRequest) => {
    oneBlock(blocks, 'A Plackett–Burman design');
    return withLevels(factors, plackettBurman(factors.length, options.runs ?? null));
  },
  definitiveScreening: ({ factors, blocks }: KindRequest) => {
    onlyNumeric(factors, 'A definitive screening design');
    oneBlock(blocks, 'A definitive screening design');
    return definitiveScreening(factors.length);
  },
} satisfies Record<string, (request: KindRequest) => CodedDesign>;
export type StructuredKind = keyof typeof STRUCTURED;
