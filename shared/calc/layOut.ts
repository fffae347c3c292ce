import type { DesignRequest } from '../schemas/calc/design';
import { fromCoded, toCoded } from '../stats/coding/code';
import { constraintWords, keeps, readConstraint, valuesOf } from '../stats/coding/constraint';
import { envelopeOf, isCategorical, type Factor, type Setting } from '../stats/coding/factor';
import { snap } from '../stats/coding/snap';
import type { DesignPoint, DesignPointType } from '../stats/design/designPoint';
import { StatsError } from '../stats/errors';

/** A point with the settings that a person dials in. */
export interface LaidOutPoint {
  readonly type: DesignPointType;
  readonly block: number;
  readonly settings: Readonly<Record<string, Setting>>;
  /** As the design asked for, before snapping. */
  readonly idealSettings: Readonly<Record<string, Setting>>;
  /** After snapping. */
  readonly coded: Readonly<Record<string, Setting>>;
  readonly isReplicate: boolean;
}

/** Coded values carry the rounding of √2 and the like; 12 digits are more than any dial has. */
const clean = (value: number) => Number(value.toPrecision(12)) + 0;

function layOutOne(factors: readonly Factor[], point: DesignPoint, doSnap: boolean): LaidOutPoint {
  const settings: Record<string, Setting> = {};
  const idealSettings: Record<string, Setting> = {};
  const coded: Record<string, Setting> = {};
  factors.forEach((factor, i) => {
    const x = point.coded[i]!;
    if (isCategorical(factor)) {
      const level = factor.levels[x]!;
      settings[factor.key] = level;
      idealSettings[factor.key] = level;
      coded[factor.key] = level;
      return;
    }
    const ideal = clean(fromCoded(factor, x));
    const value = doSnap ? snap(factor, ideal) : ideal;
    idealSettings[factor.key] = ideal;
    settings[factor.key] = value;
    coded[factor.key] = clean(toCoded(factor, value));
  });
  const { type, block } = point;
  return { type, block, settings, idealSettings, coded, isReplicate: false };
}

/** Turns coded points into settings, snapped when asked for, and repeats the non-centre points. */
export function layOut(
  factors: readonly Factor[],
  points: readonly DesignPoint[],
  { snap: doSnap, replicates }: Pick<DesignRequest, 'snap' | 'replicates'>,
): LaidOutPoint[] {
  const once = points.map((point) =>
    layOutOne(factors, point, doSnap && point.type !== 'included'),
  );
  const repeated = Array.from({ length: replicates - 1 }, () =>
    once
      .filter(({ type }) => type !== 'centre' && type !== 'included')
      .map((point) => ({ ...point, isReplicate: true })),
  );
  return [...once, ...repeated.flat()];
}

const SLACK = 1e-9;
const MOST_NAMED = 4;

const settingWords = (factors: readonly Factor[], { settings }: LaidOutPoint) =>
  factors
    .map((factor) => {
      const unit = isCategorical(factor) || !factor.unit ? '' : ` ${factor.unit}`;
      return `${factor.name ?? factor.key} ${settings[factor.key] ?? ''}${unit}`;
    })
    .join(', ');

function brokenBy(request: DesignRequest, point: LaidOutPoint): string[] {
  const { factors, constraints } = request;
  const values = valuesOf(factors, point.settings);
  const outside = factors.flatMap((factor, i) => {
    if (isCategorical(factor)) return [];
    const { min, max } = envelopeOf(factor);
    const slack = SLACK * Math.max(Math.abs(min), Math.abs(max));
    const unit = factor.unit ? ` ${factor.unit}` : '';
    if (values[i]! < min - slack) return [`${factor.key} below ${min}${unit}`];
    return values[i]! > max + slack ? [`${factor.key} above ${max}${unit}`] : [];
  });
  const limits = constraints
    .filter((constraint) => !keeps(readConstraint(factors, constraint), values))
    .map(constraintWords);
  return [...outside, ...limits];
}

/** Designs whose points can be drawn in, and what is offered instead of each. */
function alternativesTo({ kind, options }: DesignRequest): string {
  if (kind === 'centralComposite' && options.alpha !== 'faceCentred' && options.inscribed !== true)
    return 'Take it inscribed or face-centred, narrow the ranges, or take a design fitted to the limits (optimal).';
  return 'Narrow the ranges, or take a design fitted to the limits (optimal).';
}

/**
 * A design with points that cannot be dialled in is refused, never clipped: every such point is named
 * with the limit that it breaks.
 *
 * @throws StatsError `outside-envelope`; `details.points` has all runs with the limits they break.
 */
export function refuseOutside(request: DesignRequest, points: readonly LaidOutPoint[]): void {
  const judged = points.map((point) => ({ point, broken: brokenBy(request, point) }));
  const outside = judged.filter(({ broken }) => broken.length > 0);
  if (outside.length === 0) return;
  const distinct = [
    ...new Set(
      outside.map(
        ({ point, broken }) => `${settingWords(request.factors, point)} (${broken.join('; ')})`,
      ),
    ),
  ];
  const named = distinct.slice(0, MOST_NAMED).join(' · ');
  const more = distinct.length > MOST_NAMED ? ` and ${distinct.length - MOST_NAMED} more` : '';
  throw new StatsError(
    'outside-envelope',
    `${outside.length} of ${points.length} runs cannot be dialled in: ${named}${more}. ${alternativesTo(request)}`,
    {
      points: judged.map(({ point, broken }) => ({
        settings: point.settings,
        pointType: point.type,
        broken,
      })),
    },
  );
}
