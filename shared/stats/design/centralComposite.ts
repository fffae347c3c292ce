import { StatsError } from '../errors';
import { combinations, type DesignPoint } from './designPoint';
import { inBlocks } from './factorial';
import { fractional, type FractionProperties } from './fractional';

export type AlphaRule =
  | 'rotatable'
  | 'faceCentred'
  | 'spherical'
  | 'orthogonal'
  | 'orthogonalBlocks'
  | 'fourthRoot'
  | number;

export interface CentralCompositeOptions {
  readonly alpha: AlphaRule;
  readonly inscribed: boolean;
  /** p of the factorial part 2^(k−p); resolution V or more. */
  readonly fraction: number;
  readonly centrePoints: number;
  /** 1: none; 2: factorial and axial; 3, 5, …: the factorial part split as well. */
  readonly blocks: number;
}

export interface CentralComposite {
  readonly points: readonly DesignPoint[];
  readonly alpha: number;
  readonly properties: FractionProperties | null;
}

const LEAST_RESOLUTION = 5;

/** Centre points by block, the axial block last; as even as can be. */
function centresByBlock(count: number, blocks: number): number[] {
  return Array.from(
    { length: blocks },
    (_, i) => Math.floor(count / blocks) + (i < count % blocks ? 1 : 0),
  );
}

/**
 * The axial distance in coded units.
 *
 * @param f runs of the factorial part; @param k factors; @param centres by block, the axial block last.
 * @see Box & Wilson (1951); Box & Hunter (1957), Ann. Math. Statist. 28: 195–241; NIST e-Handbook 5.3.3.6.1.
 */
export function axialDistance(
  rule: AlphaRule,
  f: number,
  k: number,
  centres: readonly number[],
): number {
  const n0 = centres.reduce((sum, count) => sum + count, 0);
  switch (rule) {
    case 'rotatable':
      return f ** 0.25;
    case 'faceCentred':
      return 1;
    case 'spherical':
      return Math.sqrt(k);
    case 'fourthRoot':
      return k ** 0.25;
    case 'orthogonal':
      return (((Math.sqrt(f + 2 * k + n0) - Math.sqrt(f)) ** 2 * f) / 4) ** 0.25;
    case 'orthogonalBlocks': {
      const axial = centres.at(-1) ?? 0;
      const factorialCentres = n0 - axial;
      return Math.sqrt((k * (1 + axial / (2 * k))) / (1 + factorialCentres / f));
    }
    default:
      return rule;
  }
}

function factorialPart(
  keys: readonly string[],
  { fraction, blocks }: CentralCompositeOptions,
): { points: DesignPoint[]; properties: FractionProperties | null } {
  const k = keys.length;
  const factorialBlocks = Math.max(1, blocks - 1);
  if (fraction === 0) {
    const points = combinations(keys.map(() => [-1, 1])).map((coded): DesignPoint => ({
      coded,
      type: 'factorial',
      block: 1,
    }));
    return { points: inBlocks(points, k, factorialBlocks), properties: null };
  }
  const { points, properties } = fractional(keys, { fraction });
  if ((properties.resolution ?? Infinity) < LEAST_RESOLUTION)
    throw new StatsError(
      'not-available',
      `A central composite needs a factorial part of resolution V: 2^(${k}−${fraction}) has resolution ${properties.resolution ?? ''}, so two-factor interactions would be confounded with each other. Take a smaller fraction.`,
    );
  if (factorialBlocks > 1)
    throw new StatsError(
      'not-available',
      'A fractional central composite takes one or two blocks: factorial and axial.',
    );
  return { points: [...points], properties };
}

/**
 * A central composite design: a two-level factorial (or a fraction of resolution V), 2k axial points, and
 * centre points.
 *
 * @throws StatsError `not-available` for a fraction below resolution V, or blocks that do not fit.
 */
export function centralComposite(
  keys: readonly string[],
  options: CentralCompositeOptions,
): CentralComposite {
  const k = keys.length;
  const { blocks } = options;
  if (k < 2)
    throw new StatsError('not-available', 'A central composite needs at least two factors.');
  if (blocks > 1 && options.centrePoints < blocks)
    throw new StatsError(
      'not-available',
      `With ${blocks} blocks there are at least ${blocks} centre points, one in each.`,
    );
  const { points, properties } = factorialPart(keys, options);
  const centres = centresByBlock(options.centrePoints, blocks);
  const alpha = axialDistance(options.alpha, points.length, k, centres);
  const axial = keys.flatMap((_, i) =>
    [-alpha, alpha].map((x): DesignPoint => ({
      coded: new Array<number>(k).fill(0).with(i, x),
      type: 'axial',
      block: blocks,
    })),
  );
  const centre = centres.flatMap((count, b) =>
    Array.from({ length: count }, (): DesignPoint => ({
      coded: new Array<number>(k).fill(0),
      type: 'centre',
      block: b + 1,
    })),
  );
  const scale = options.inscribed ? 1 / Math.max(1, alpha) : 1;
  const all = [...points, ...axial, ...centre].map((point) => ({
    ...point,
    coded: point.coded.map((x) => x * scale),
  }));
  return { points: all, alpha, properties };
}
