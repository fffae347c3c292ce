import type { DesignKind, DesignRequest } from '../schemas/calc/design';
import { isCategorical } from '../stats/coding/factor';
import { boxBehnken } from '../stats/design/boxBehnken';
import { centralComposite } from '../stats/design/centralComposite';
import { centrePoints, type DesignPoint } from '../stats/design/designPoint';
import { factorial } from '../stats/design/factorial';
import { fractional, type FractionProperties } from '../stats/design/fractional';
import { optimalDesign } from '../stats/design/optimal';
import { regionOf } from '../stats/design/region';
import { definitiveScreening, plackettBurman } from '../stats/design/screening';
import { spaceFilling } from '../stats/design/spaceFilling';
import { StatsError } from '../stats/errors';
import { pointOf } from '../stats/model/modelMatrix';
import { termsOf } from '../stats/model/term';

export interface DesignProperties {
  readonly alpha?: number;
  readonly resolution?: number;
  readonly generators?: readonly string[];
  readonly definingRelation?: readonly (readonly string[])[];
  readonly aliases?: readonly (readonly string[])[];
}

export interface BuiltPoints {
  readonly points: readonly DesignPoint[];
  readonly properties: DesignProperties;
}

const EXTRA_OPTIMAL_RUNS = 5;
const DEFAULT_SPACE_RUNS = 12;

function describeFraction(properties: FractionProperties | null): DesignProperties {
  if (!properties) return {};
  const { resolution, ...rest } = properties;
  return { ...(resolution === null ? {} : { resolution }), ...rest };
}

/** Blocks of `count` runs, as even as can be: 1, 2, 3, 1, 2, 3, … */
const evenBlocks = (count: number, blocks: number) =>
  Array.from({ length: count }, (_, i) => (i % blocks) + 1);

function withCentre(request: DesignRequest, points: readonly DesignPoint[]): DesignPoint[] {
  const { factors, blocks } = request;
  const count = centreCount(request);
  if (count > 0 && factors.some(isCategorical))
    throw new StatsError(
      'not-available',
      'A factor with names for levels has no centre: set the centre points to 0.',
    );
  return [...points, ...centrePoints(factors.length, count, blocks)];
}

/** Centre points asked for, or what the kind usually takes. */
function centreCount({ kind, centrePoints: wanted, factors }: DesignRequest): number {
  if (wanted !== undefined) return wanted;
  const usual: readonly DesignKind[] = [
    'factorial',
    'fractional',
    'centralComposite',
    'boxBehnken',
  ];
  return usual.includes(kind) && !factors.some(isCategorical) ? 6 : 0;
}

function optimalPoints(request: DesignRequest): BuiltPoints {
  const { factors, constraints, region, options, blocks, seed } = request;
  const terms = termsOf(factors, options.model ?? 'quadratic');
  const include = options.include ?? [];
  const kept = include.map(({ settings, block }) => ({ coded: pointOf(factors, settings), block }));
  const centres = withCentre(request, []);
  const runs = options.runs ?? terms.length + EXTRA_OPTIMAL_RUNS;
  const count = runs - kept.length;
  if (count < 1)
    throw new StatsError(
      'too-few-runs',
      `${runs} runs in all leave none to choose beside the ${kept.length} that stay.`,
    );
  const place = regionOf(factors, constraints, region);
  const blockOf = evenBlocks(count, blocks);
  const { points } = optimalDesign(place, {
    terms,
    count,
    criterion: options.criterion ?? 'D',
    kept: [...kept, ...centres],
    blocks: blockOf,
    seed,
  });
  return {
    points: [
      ...kept.map((point): DesignPoint => ({ ...point, type: 'included' })),
      ...points.map((coded, i): DesignPoint => ({ coded, type: 'optimal', block: blockOf[i]! })),
      ...centres,
    ],
    properties: {},
  };
}

/** The points of a design in standard order, coded, before they are snapped and put in random order. */
export function designPoints(request: DesignRequest): BuiltPoints {
  const { factors, constraints, region, kind, options, blocks, seed } = request;
  const keys = factors.map(({ key }) => key);
  const k = keys.length;
  if (blocks > 1 && ['fractional', 'plackettBurman', 'definitiveScreening'].includes(kind))
    throw new StatsError(
      'not-available',
      'This kind of design is not split into blocks here. Take a factorial, a central composite or an optimal design.',
    );
  switch (kind) {
    case 'factorial':
      return { points: withCentre(request, factorial(factors, 2, blocks)), properties: {} };
    case 'threeLevel':
      return { points: withCentre(request, factorial(factors, 3, blocks)), properties: {} };
    case 'fractional': {
      const { points, properties } = fractional(keys, options);
      return { points: withCentre(request, points), properties: describeFraction(properties) };
    }
    case 'plackettBurman': {
      const { points, properties } = plackettBurman(keys, options.runs);
      return { points: withCentre(request, points), properties: describeFraction(properties) };
    }
    case 'definitiveScreening':
      return { points: withCentre(request, definitiveScreening(k)), properties: {} };
    case 'centralComposite': {
      const built = centralComposite(keys, {
        alpha: options.alpha ?? 'rotatable',
        inscribed: options.inscribed ?? false,
        fraction: options.fraction ?? 0,
        centrePoints: centreCount(request),
        blocks,
      });
      return {
        points: built.points,
        properties: { alpha: built.alpha, ...describeFraction(built.properties) },
      };
    }
    case 'boxBehnken':
      return { points: boxBehnken(k, centreCount(request), blocks), properties: {} };
    case 'optimal':
      return optimalPoints(request);
    case 'spaceFilling': {
      const count = options.runs ?? DEFAULT_SPACE_RUNS;
      const points = spaceFilling(regionOf(factors, constraints, region), count, seed);
      const blockOf = evenBlocks(count, blocks);
      return {
        points: withCentre(
          request,
          points.map((coded, i): DesignPoint => ({
            coded,
            type: 'spaceFilling',
            block: blockOf[i]!,
          })),
        ),
        properties: {},
      };
    }
  }
}
