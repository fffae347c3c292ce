import type { Grid, Px } from './contourGeometry';

export interface MapAxis {
  readonly name: string;
  readonly unit: string;
  readonly values: readonly number[];
}

export interface MapRun {
  readonly id: string;
  readonly x: number;
  readonly y: number;
  /** Residual over two spreads, −1…1; null: not fitted. */
  readonly residual: number | null;
  /** Whether the run lies on the slice shown. */
  readonly isOnSlice: boolean;
}

export interface GoalLine {
  readonly words: string;
  /** Rows along y; the line runs where it is `level`. */
  readonly values: readonly (readonly number[])[];
  readonly level: number;
  readonly holdsAbove: boolean;
}

export const WIDTH = 720;
export const HEIGHT = 500;
const MARGIN = { left: 50, right: 14, top: 12, bottom: 42 };
const PAD = 0.03;

const flat = (rows: readonly (readonly number[])[]) => rows.flat();

/** Pixel scales of both axes, with 3 % left around so that rings on the edge are whole. */
export function scalesOf(x: MapAxis, y: MapAxis) {
  const span = (values: readonly number[]) => {
    const [low, high] = [values[0] ?? 0, values.at(-1) ?? 1];
    const pad = PAD * (high - low);
    return { low, high, from: low - pad, to: high + pad };
  };
  const [sx, sy] = [span(x.values), span(y.values)];
  const inner = {
    x0: MARGIN.left,
    x1: WIDTH - MARGIN.right,
    y0: HEIGHT - MARGIN.bottom,
    y1: MARGIN.top,
  };
  const px = (value: number) =>
    inner.x0 + ((inner.x1 - inner.x0) * (value - sx.from)) / (sx.to - sx.from);
  const py = (value: number) =>
    inner.y0 + ((inner.y1 - inner.y0) * (value - sy.from)) / (sy.to - sy.from);
  const ux = (at: number) =>
    sx.from + ((at - inner.x0) / (inner.x1 - inner.x0)) * (sx.to - sx.from);
  const uy = (at: number) =>
    sy.from + ((at - inner.y0) / (inner.y1 - inner.y0)) * (sy.to - sy.from);
  const box = { x0: px(sx.low), x1: px(sx.high), y0: py(sy.low), y1: py(sy.high) };
  return { px, py, ux, uy, box, inner, sx, sy };
}

export type Scales = ReturnType<typeof scalesOf>;

export const gridOf = (rows: readonly (readonly number[])[], box: Scales['box']): Grid => ({
  columns: rows[0]?.length ?? 0,
  rows: rows.length,
  values: flat(rows),
  box,
});

/** Value of a field at a pixel, by its nearest grid point: enough to say on which side of a line it lies. */
export function nearest(
  rows: readonly (readonly number[])[],
  box: Scales['box'],
  [x, y]: Px,
): number {
  const at = (share: number, n: number) =>
    Math.max(0, Math.min(n - 1, Math.round(share * (n - 1))));
  const row = rows[at((y - box.y0) / (box.y1 - box.y0), rows.length)] ?? [];
  return row[at((x - box.x0) / (box.x1 - box.x0), row.length)] ?? NaN;
}

export function ticks(low: number, high: number): number[] {
  const raw = (high - low) / 6;
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = ([1, 2, 5, 10].find((each) => each * power >= raw) ?? 10) * power;
  const out: number[] = [];
  for (let v = Math.ceil(low / step) * step; v <= high + 1e-9; v += step)
    out.push(Number(v.toPrecision(10)));
  return out;
}
