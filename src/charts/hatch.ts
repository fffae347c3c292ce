/** A rectangle in pixels. */
export interface Rect {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Path data of 45° lines that fill a rectangle, each cut at its edges. */
export function hatchPath({ left, top, width, height }: Rect, pitch = 7): string {
  let path = '';
  const stride = pitch * Math.SQRT2;
  // the line x + y = s, from where it enters at the left or bottom to where it leaves at the top or right
  for (let s = stride / 2; s < width + height; s += stride) {
    const from = s <= height ? [0, s] : [s - height, height];
    const to = s <= width ? [s, 0] : [width, s - width];
    path += `M${(left + from[0]!).toFixed(1)} ${(top + from[1]!).toFixed(1)}L${(left + to[0]!).toFixed(1)} ${(top + to[1]!).toFixed(1)}`;
  }
  return path;
}

/** Path data of a lattice of dots inside a rectangle, where `isInside` says so. Drawn with round caps. */
export function dotPath(
  { left, top, width, height }: Rect,
  isInside: (x: number, y: number) => boolean,
  pitch = 6,
): string {
  let path = '';
  for (let row = 0, y = top + pitch / 4; y < top + height; row++, y += pitch / 2)
    for (let x = left + (row % 2 === 0 ? pitch / 4 : (3 * pitch) / 4); x < left + width; x += pitch)
      if (isInside(x, y)) path += `M${x.toFixed(1)} ${y.toFixed(1)}h.01`;
  return path;
}
