import type { EnvelopeJson } from '@shared/schemas/rig';
import type { SetPointKey } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import type { Peg } from '@/charts/Pegs';

type Brief = NonNullable<StudyJson['brief']>;

export interface LaidOut {
  readonly settings: Readonly<Record<string, number | string>>;
  readonly isBroken: boolean;
}

/** Across, deep and high: gap, voltage and pulses where they vary, else whatever varies. */
export function axesOf(brief: Brief): readonly [SetPointKey, SetPointKey, SetPointKey | null] {
  const varied = brief.factors.map(({ key }) => key);
  const wished = (['gap', 'voltage', 'pulses', 'frequency'] as const).filter((key) =>
    varied.includes(key),
  );
  return [wished[0] ?? 'gap', wished[1] ?? 'voltage', wished[2] ?? null];
}

type Span = readonly [number, number];

/** The drawn length of an axis: the range of the Brief, widened to the settings that lie beyond it. */
function spanOf(brief: Brief, key: SetPointKey | null, points: readonly LaidOut[]): Span {
  const factor = brief.factors.find((each) => each.key === key);
  if (!factor) return [0, 1];
  const values = points.flatMap(({ settings: { [factor.key]: value } }) =>
    typeof value === 'number' ? [value] : [],
  );
  return [Math.min(factor.low, ...values), Math.max(factor.high, ...values)];
}

export type PegSpans = readonly [x: Span, y: Span, z: Span];

export const spansOf = (brief: Brief, points: readonly LaidOut[]): PegSpans => {
  const [x, y, z] = axesOf(brief);
  return [spanOf(brief, x, points), spanOf(brief, y, points), spanOf(brief, z, points)];
};

const shareOf = ([low, high]: Span, value: number | string | undefined): number =>
  typeof value === 'number' ? (value - low) / (high - low) : 0.5;

/** Settings as pegs, equal ones together. */
export function pegsOf(brief: Brief, points: readonly LaidOut[]): Peg[] {
  const [x, y, z] = axesOf(brief);
  const [spanX, spanY, spanZ] = spansOf(brief, points);
  const groups = new Map<string, { point: LaidOut; count: number }>();
  for (const point of points) {
    const key = [x, y, z]
      .map((each) => (each === null ? '' : String(point.settings[each])))
      .join(' ');
    const group = groups.get(key);
    groups.set(key, { point: group?.point ?? point, count: (group?.count ?? 0) + 1 });
  }
  return [...groups.values()].map(({ point, count }) => ({
    x: shareOf(spanX, point.settings[x]),
    y: shareOf(spanY, point.settings[y]),
    z: z === null ? 0.5 : shareOf(spanZ, point.settings[z]),
    count,
    isBroken: point.isBroken,
  }));
}

type Corner = readonly [number, number];

/** Keeps the part of a polygon where `f` is not negative. */
function clip(polygon: readonly Corner[], f: (corner: Corner) => number): readonly Corner[] {
  return polygon.flatMap((a, i): Corner[] => {
    const b = polygon[(i + 1) % polygon.length] ?? a;
    const [fa, fb] = [f(a), f(b)];
    const kept: Corner[] = fa >= 0 ? [a] : [];
    if (fa * fb >= 0) return kept;
    const t = fa / (fa - fb);
    return [...kept, [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])]];
  });
}

const WHOLE: readonly Corner[] = [
  [0, 0],
  [1, 0],
  [1, 1],
  [0, 1],
];

/** The ranges of the Brief on the floor; null when they are all of it. */
export function rangesOn([spanX, spanY]: PegSpans, brief: Brief): Corner[] | null {
  const [x, y] = axesOf(brief);
  const of = (key: SetPointKey) => brief.factors.find((each) => each.key === key);
  const [across, deep] = [of(x), of(y)];
  if (!across || !deep) return null;
  const [left, right] = [shareOf(spanX, across.low), shareOf(spanX, across.high)];
  const [near, far] = [shareOf(spanY, deep.low), shareOf(spanY, deep.high)];
  if (left === 0 && right === 1 && near === 0 && far === 1) return null;
  return [
    [left, near],
    [right, near],
    [right, far],
    [left, far],
  ];
}

/** The floor that the field limits leave, when gap and voltage span it; else all of it. */
export function floorOf(
  brief: Brief,
  envelope: EnvelopeJson,
  [spanX, spanY]: PegSpans,
): readonly Corner[] {
  const [x, y] = axesOf(brief);
  if (x !== 'gap' || y !== 'voltage') return WHOLE;
  const at = ([low, high]: Span, share: number) => low + share * (high - low);
  const field = ([u, v]: Corner) => at(spanY, v) / at(spanX, u);
  const below = clip(WHOLE, (corner) => envelope.fieldMaxKvPerMm - field(corner));
  return clip(below, (corner) => field(corner) - envelope.fieldMinKvPerMm);
}
