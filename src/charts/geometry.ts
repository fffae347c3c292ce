/** Points in pixels: x to the right, y down. */
export type Point = readonly [number, number];
export type Polyline = readonly Point[];

export const distance = (a: Point, b: Point): number => Math.hypot(b[0] - a[0], b[1] - a[1]);

/** Length along the line up to each of its points; the last is its whole length. */
export function lengths(line: Polyline): number[] {
  const along = [0];
  for (let i = 1; i < line.length; i++)
    along.push(along[i - 1]! + distance(line[i - 1]!, line[i]!));
  return along;
}

/** The point so far along the line; its ends for what lies beyond them. `along` is lengths(line). */
export function pointAt(line: Polyline, along: readonly number[], at: number): Point {
  const wanted = Math.max(0, Math.min(along.at(-1)!, at));
  let i = 1;
  while (i < along.length - 1 && along[i]! < wanted) i++;
  const [a, b] = [line[i - 1]!, line[i]!];
  const share = (wanted - along[i - 1]!) / (along[i]! - along[i - 1]! || 1);
  return [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])];
}

/** The stretch of the line between two lengths, ends interpolated. */
function stretch(line: Polyline, along: readonly number[], from: number, to: number): Polyline {
  const inner = line.filter((_, i) => along[i]! > from && along[i]! < to);
  return [pointAt(line, along, from), ...inner, pointAt(line, along, to)];
}

/** What is left of the line when the stretch between two lengths is taken out: none, one or two lines. */
export function withGap(line: Polyline, from: number, to: number): Polyline[] {
  const along = lengths(line);
  const whole = along.at(-1)!;
  const parts: Polyline[] = [];
  if (from > 1) parts.push(stretch(line, along, 0, from));
  if (to < whole - 1) parts.push(stretch(line, along, to, whole));
  return parts;
}

const round = (value: number) => Math.round(value * 10) / 10;

/** SVG path data of an open line, to a tenth of a pixel. */
export function pathOf(line: Polyline): string {
  return line.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${round(x)} ${round(y)}`).join('');
}

/** SVG path data of closed rings; holes wind the other way. */
export function areaPathOf(rings: readonly Polyline[]): string {
  return rings.map((ring) => `${pathOf(ring)}Z`).join('');
}
