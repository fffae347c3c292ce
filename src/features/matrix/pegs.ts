import type { EnvelopeJson } from '@shared/schemas/rig';
import type { SetPointKey } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { fullSetting } from '@shared/study/plan';
import type { Peg } from '@/charts/Pegs';

type Brief = NonNullable<StudyJson['brief']>;

export interface LaidOut {
  readonly settings: Readonly<Record<string, number | string>>;
  readonly broken: readonly string[];
}

/** Across, deep and high: gap, voltage and pulses where they vary, else whatever varies. */
export function axesOf(brief: Brief): readonly [SetPointKey, SetPointKey, SetPointKey | null] {
  const varied = brief.factors.map(({ key }) => key);
  const wished = (['gap', 'voltage', 'pulses', 'frequency'] as const).filter((key) =>
    varied.includes(key),
  );
  return [wished[0] ?? 'gap', wished[1] ?? 'voltage', wished[2] ?? null];
}

function shareOf(
  brief: Brief,
  key: SetPointKey | null,
  value: number | string | undefined,
): number {
  const factor = brief.factors.find((each) => each.key === key);
  if (!factor || typeof value !== 'number') return 0.5;
  return Math.max(-0.25, Math.min(1.25, (value - factor.low) / (factor.high - factor.low)));
}

/** Settings as pegs, equal ones together. */
export function pegsOf(brief: Brief, points: readonly LaidOut[]): Peg[] {
  const [x, y, z] = axesOf(brief);
  const groups = new Map<string, { point: LaidOut; count: number }>();
  for (const point of points) {
    const key = [x, y, z]
      .map((each) => (each === null ? '' : String(point.settings[each])))
      .join(' ');
    const group = groups.get(key);
    groups.set(key, { point: group?.point ?? point, count: (group?.count ?? 0) + 1 });
  }
  return [...groups.values()].map(({ point, count }) => ({
    x: shareOf(brief, x, point.settings[x]),
    y: shareOf(brief, y, point.settings[y]),
    z: z === null ? 0.5 : shareOf(brief, z, point.settings[z]),
    count,
    isBroken: point.broken.length > 0,
  }));
}

type Corner = readonly [number, number];

/** Keeps the part of a polygon where `f` is not negative. */
function clip(polygon: readonly Corner[], f: (corner: Corner) => number): Corner[] {
  return polygon.flatMap((a, i): Corner[] => {
    const b = polygon[(i + 1) % polygon.length] ?? a;
    const [fa, fb] = [f(a), f(b)];
    const kept: Corner[] = fa >= 0 ? [a] : [];
    if (fa * fb >= 0) return kept;
    const t = fa / (fa - fb);
    return [...kept, [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])]];
  });
}

/** The floor that the field limits leave, when gap and voltage span it; else all of it. */
export function floorOf(brief: Brief, envelope: EnvelopeJson): Corner[] {
  const whole: Corner[] = [
    [0, 0],
    [1, 0],
    [1, 1],
    [0, 1],
  ];
  const [x, y] = axesOf(brief);
  if (x !== 'gap' || y !== 'voltage') return whole;
  const gap = brief.factors.find(({ key }) => key === 'gap');
  const voltage = brief.factors.find(({ key }) => key === 'voltage');
  if (!gap || !voltage) return whole;
  const field = ([u, v]: Corner) => {
    const setting = fullSetting(brief, {
      ...Object.fromEntries(brief.factors.map(({ key, low }) => [key, low])),
      gap: gap.low + u * (gap.high - gap.low),
      voltage: voltage.low + v * (voltage.high - voltage.low),
    });
    return setting.voltage / setting.gap;
  };
  const below = clip(whole, (corner) => envelope.fieldMaxKvPerMm - field(corner));
  return clip(below, (corner) => field(corner) - envelope.fieldMinKvPerMm);
}
