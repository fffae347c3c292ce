import { StatsError } from '../errors';
import { axialDistance, type AlphaRule } from './axialDistance';
import { pointsOf, type CodedDesign } from './codedDesign';
import { resolutionOf } from './effectWord';
import { bestGenerators } from './fractionGenerators';
import { shareOut } from './shareOut';
import { twoLevelDesign } from './twoLevel';

export interface CompositeOptions {
  readonly alpha: AlphaRule | number;
  /** Scaled so that the points furthest out are at ±1. */
  readonly inscribed: boolean;
  /** p of the 2^(k−p) factorial part. */
  readonly fraction: number;
  readonly blocks: number;
  readonly centrePoints: number;
  readonly replicates: number;
}

/** A smaller resolution aliases two-factor products with each other. */
const MIN_RESOLUTION = 5;

function factorialPart(factors: number, { fraction, blocks }: CompositeOptions): CodedDesign {
  const cubeBlocks = blocks === 1 ? 1 : blocks - 1;
  if (!Number.isInteger(Math.log2(cubeBlocks)))
    throw new StatsError(
      'not-available',
      `A central composite design parts into 2, 3, 5 or 9 blocks (factorial blocks and one axial block), not ${blocks}.`,
    );
  const generators = fraction === 0 ? [] : bestGenerators(factors, fraction);
  const cube = twoLevelDesign(factors, generators, cubeBlocks);
  const resolution = resolutionOf(cube.relation ?? []);
  if (resolution !== null && resolution < MIN_RESOLUTION)
    throw new StatsError(
      'aliased',
      `The 2^(${factors}−${fraction}) fraction has resolution ${resolution}: two-factor products alias each other, so a quadratic model cannot be fitted. Take a smaller fraction (resolution V or more).`,
    );
  const lost = cube.confounded?.find(({ mask }) => (mask & (mask - 1)) !== 0 && isPair(mask));
  if (lost)
    throw new StatsError(
      'aliased',
      `In ${blocks} blocks the factorial part loses a two-factor product. Take fewer blocks.`,
    );
  return cube;
}

const isPair = (mask: number) => {
  const rest = mask & (mask - 1);
  return (rest & (rest - 1)) === 0;
};

function checkCentres({ blocks, centrePoints }: CompositeOptions): void {
  if (blocks > 1 && centrePoints < blocks)
    throw new StatsError(
      'too-few-runs',
      `${blocks} blocks of a central composite design need ${blocks} centre points or more, one in each; there are ${centrePoints}.`,
    );
}

/**
 * A central composite design: two-level points, axial points, in the order factorial then axial. With
 * blocks, the factorial part is in all but the last, the axial part in the last.
 *
 * @throws StatsError `aliased` when the factorial part has a resolution below V; `not-available` for
 *   blocks that it does not part into; `too-few-runs` with fewer centre points than blocks.
 * @see Box & Wilson (1951), J. R. Statist. Soc. B 13: 1–45; NIST/SEMATECH e-Handbook 5.3.3.6.1.
 */
export function centralComposite(factors: number, options: CompositeOptions): CodedDesign {
  if (factors < 2)
    throw new StatsError('too-few-runs', 'A central composite design needs two factors or more.');
  checkCentres(options);
  const { blocks, centrePoints, replicates } = options;
  const cube = factorialPart(factors, options);
  const centres = shareOut(centrePoints, blocks);
  const centreAxial = blocks === 1 ? 0 : centres.at(-1)!;
  const alpha = axialDistance(options.alpha, {
    factors,
    factorial: cube.points.length,
    replicates,
    centre: centrePoints,
    centreFactorial: centrePoints - centreAxial,
    centreAxial,
  });
  const scale = options.inscribed ? 1 / Math.max(1, alpha) : 1;
  const stars = Array.from({ length: 2 * factors }, (_, i) =>
    Array.from({ length: factors }, (_each, j) =>
      j === i >> 1 ? (i % 2 === 0 ? -alpha : alpha) * scale : 0,
    ),
  );
  const corners = cube.points.map((each) => ({
    ...each,
    point: each.point.map((sign) => sign * scale),
  }));
  return {
    points: [...corners, ...pointsOf(stars, 'axial', () => blocks)],
    blocks,
    alpha,
    relation: cube.relation ?? [],
  };
}
