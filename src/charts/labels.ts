import { distance, lengths, pointAt, type Point, type Polyline } from './geometry';

/** What a label keeps away from: a centre, how far, and whether it matters less. */
export interface Obstacle {
  readonly at: Point;
  readonly radius: number;
  readonly isSoft?: boolean;
}

export interface PlacedLabel {
  readonly at: Point;
  /** Clockwise in radians, so that it reads from left to right. */
  readonly angle: number;
  /** The gap in the line, as lengths along it. */
  readonly from: number;
  readonly to: number;
}

interface Placing {
  readonly text: string;
  /** Whether a point is free: inside the map, off its edges. */
  readonly isFree: (point: Point) => boolean;
  readonly obstacles: readonly Obstacle[];
  readonly pixelsPerSign?: number;
}

const STRIDE = 5;
const WORST = 60;

const upright = (angle: number) => {
  if (angle > Math.PI / 2) return angle - Math.PI;
  return angle < -Math.PI / 2 ? angle + Math.PI : angle;
};

function crowding(at: Point, half: number, obstacles: readonly Obstacle[]): number {
  let cost = 0;
  for (const { at: other, radius, isSoft } of obstacles) {
    const reach = radius + half;
    const gap = distance(at, other);
    if (gap < reach) cost += (reach - gap) * (isSoft ? 0.5 : 1.4);
  }
  return cost;
}

/**
 * Where a label sits best in its line: where the line is straightest, off rings, section and other
 * labels, and rather near the middle. Null when the line is too short or nowhere is free.
 */
export function placeLabel(line: Polyline, placing: Placing): PlacedLabel | null {
  const { text, isFree, obstacles, pixelsPerSign = 6.6 } = placing;
  const along = lengths(line);
  const whole = along.at(-1)!;
  const half = (text.length * pixelsPerSign) / 2 + 3;
  if (whole < 2 * half + 16) return null;
  let best: { cost: number; label: PlacedLabel } | null = null;
  for (let at = half + 4; at < whole - half - 4; at += STRIDE) {
    const [a, middle, b] = [at - half, at, at + half].map((s) => pointAt(line, along, s)) as [
      Point,
      Point,
      Point,
    ];
    if (!isFree(a) || !isFree(middle) || !isFree(b)) continue;
    const sag = distance([(a[0] + b[0]) / 2, (a[1] + b[1]) / 2], middle);
    const bend = 2 * half - distance(a, b) + 1.5 * sag;
    const offCentre = (3 * Math.abs(at - whole / 2)) / whole;
    const cost = bend + crowding(middle, half, obstacles) + offCentre;
    if (best && best.cost <= cost) continue;
    const angle = upright(Math.atan2(b[1] - a[1], b[0] - a[0]));
    best = { cost, label: { at: middle, angle, from: at - half, to: at + half } };
  }
  return best && best.cost <= WORST ? best.label : null;
}
