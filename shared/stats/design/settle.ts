import { fromCoded, toCoded } from '../coding/code';
import { envelopeOf, isCategorical, type Factor, type Setting } from '../coding/factor';
import { snap } from '../coding/snap';
import { StatsError } from '../errors';
import {
  constraintWords,
  keeps,
  readConstraint,
  valuesOf,
  type Constraint,
} from '../coding/constraint';

export interface Settled {
  readonly settings: Record<string, Setting>;
  /** After snapping; a level’s name for a categorical factor. */
  readonly coded: Record<string, Setting>;
  /** After snapping, in the order of the factors; a level’s place for a categorical factor. */
  readonly point: readonly number[];
}

/** Coded values are shown without the dust of coding there and back. */
const cleanCoded = (coded: number) => Number(coded.toFixed(12)) + 0;
/** Limits count as met within this share of the range. */
const SLACK = 1e-9;

/** A coded point as settings of the rig: nearest settable values when `isSnapped`. */
export function settle(
  factors: readonly Factor[],
  point: readonly number[],
  isSnapped: boolean,
): Settled {
  const settings: Record<string, Setting> = {};
  const coded: Record<string, Setting> = {};
  const settled = factors.map((factor, i) => {
    if (isCategorical(factor)) {
      settings[factor.key] = factor.levels[point[i]!]!;
      coded[factor.key] = factor.levels[point[i]!]!;
      return point[i]!;
    }
    const exact = Number(fromCoded(factor, point[i]!).toPrecision(14));
    const value = isSnapped ? snap(factor, exact) : exact;
    settings[factor.key] = value;
    const code = cleanCoded(toCoded(factor, value));
    coded[factor.key] = code;
    return code;
  });
  return { settings, coded, point: settled };
}

const unitOf = (factor: Factor) => (!isCategorical(factor) && factor.unit ? ` ${factor.unit}` : '');
const figure = (value: Setting) =>
  typeof value === 'number' ? String(Number(value.toPrecision(5))) : value;

/** Settings in words: `voltage 213 kV, gap 25 mm`. */
function describeSettings(
  factors: readonly Factor[],
  settings: Readonly<Record<string, Setting>>,
): string {
  return factors
    .map((factor) => `${factor.key} ${figure(settings[factor.key]!)}${unitOf(factor)}`)
    .join(', ');
}

/** Why settings cannot be run, or null. */
function brokenBy(
  factors: readonly Factor[],
  constraints: readonly Constraint[],
  settings: Readonly<Record<string, Setting>>,
): string | null {
  for (const factor of factors) {
    const value = settings[factor.key];
    if (isCategorical(factor) || typeof value !== 'number') continue;
    const { min, max } = envelopeOf(factor);
    const slack = SLACK * (max - min);
    if (!Number.isFinite(value)) return `${factor.key} has no setting there`;
    if (value < min - slack) return `${factor.key} is below ${figure(min)}${unitOf(factor)}`;
    if (value > max + slack) return `${factor.key} is above ${figure(max)}${unitOf(factor)}`;
  }
  const values = valuesOf(factors, settings);
  const broken = constraints.find(
    (constraint) => !keeps(readConstraint(factors, constraint), values),
  );
  return broken ? `it breaks ${constraintWords(broken)}` : null;
}

export interface OutsidePoint {
  readonly settings: Readonly<Record<string, Setting>>;
  readonly why: string;
}

/** The settings that can be run and those that leave the hard envelope or break a limit, doubles removed. */
export function splitByLimits(
  factors: readonly Factor[],
  constraints: readonly Constraint[],
  all: readonly { readonly settings: Readonly<Record<string, Setting>> }[],
): { inside: OutsidePoint['settings'][]; outside: OutsidePoint[] } {
  const inside: OutsidePoint['settings'][] = [];
  const outside: OutsidePoint[] = [];
  const distinct = new Map(all.map(({ settings }) => [JSON.stringify(settings), settings]));
  for (const settings of distinct.values()) {
    const why = brokenBy(factors, constraints, settings);
    if (why === null) inside.push(settings);
    else outside.push({ settings, why });
  }
  return { inside, outside };
}

const NAMED = 4;

/**
 * Refuses a design with points that cannot be run, naming them and what to choose instead.
 *
 * @throws StatsError `outside-envelope`, in its details the `points` with their reasons, what lies `inside`
 *   and the `alternatives`.
 */
export function refuseOutside(
  factors: readonly Factor[],
  { inside, outside }: ReturnType<typeof splitByLimits>,
  alternatives: readonly string[],
): never {
  const named = outside
    .slice(0, NAMED)
    .map(({ settings, why }) => `${describeSettings(factors, settings)} (${why})`);
  const more = outside.length > NAMED ? `; and ${outside.length - NAMED} more` : '';
  const count = outside.length === 1 ? '1 point' : `${outside.length} points`;
  throw new StatsError(
    'outside-envelope',
    `${count} of this design cannot be run: ${named.join('; ')}${more}. Choose ${alternatives.join(', ')}, or narrower ranges.`,
    { points: outside, inside, alternatives },
  );
}
