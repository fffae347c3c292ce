import { lengths, pointAt, type Point, type Polyline } from './geometry';

const HALF_BASE = 4;

interface TeethOptions {
  readonly every?: number;
  readonly size?: number;
}

/** Path data of triangles along a limit, all on the side that holds. */
export function teeth(
  line: Polyline,
  holds: (point: Point) => boolean,
  { every = 26, size = 5 }: TeethOptions = {},
): string {
  const along = lengths(line);
  const whole = along.at(-1)!;
  const round = (value: number) => Math.round(value * 10) / 10;
  let path = '';
  for (let at = every / 2; at < whole; at += every) {
    const [a, b] = [pointAt(line, along, at - HALF_BASE), pointAt(line, along, at + HALF_BASE)];
    const foot = pointAt(line, along, at);
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
    const normal: Point = [-(b[1] - a[1]) / length, (b[0] - a[0]) / length];
    const side = holds([foot[0] + 4 * normal[0], foot[1] + 4 * normal[1]]) ? 1 : -1;
    const tip = [foot[0] + side * size * normal[0], foot[1] + side * size * normal[1]] as const;
    path += `M${round(a[0])} ${round(a[1])}L${round(tip[0])} ${round(tip[1])}L${round(b[0])} ${round(b[1])}Z`;
  }
  return path;
}
