import { describe, expect, it } from 'vitest';
import { areaAbove, isolines, lowestOf, sample, type Axes, type Grid } from '@/charts/grid';

const steps = (low: number, high: number, count: number) =>
  Array.from({ length: count }, (_, k) => low + ((high - low) * k) / (count - 1));

const axes: Axes = { x: steps(16, 34, 37), y: steps(130, 180, 51) };
const gridOf = (fn: (x: number, y: number) => number): Grid =>
  axes.y.map((y) => axes.x.map((x) => fn(x, y)));

describe('isolines', () => {
  it('of a plane are straight and exact, from rim to rim', () => {
    const lines = isolines(
      gridOf((x, y) => y - 4.5 * x),
      axes,
      0,
    );
    expect(lines).toHaveLength(1);
    for (const [x, y] of lines[0]!) expect(y - 4.5 * x).toBeCloseTo(0, 6);
    const ends = [lines[0]![0]!, lines[0]!.at(-1)!].sort((a, b) => a[0] - b[0]);
    expect(ends[0]![1]).toBeCloseTo(130, 1);
    expect(ends[1]![0]).toBeCloseTo(34, 1);
  });

  it('close around a summit inside and lie on its level', () => {
    const hill = gridOf((x, y) => 100 - (x - 25) ** 2 - (y - 155) ** 2 / 10);
    const [line, ...more] = isolines(hill, axes, 70);
    expect(more).toEqual([]);
    expect(line![0]).toEqual(line!.at(-1));
    for (const [x, y] of line!)
      expect(100 - (x - 25) ** 2 - (y - 155) ** 2 / 10).toBeCloseTo(70, 0);
  });

  it('are none where the level is nowhere', () => {
    expect(
      isolines(
        gridOf(() => 1),
        axes,
        2,
      ),
    ).toEqual([]);
  });

  it('follow axes whose steps differ', () => {
    const uneven: Axes = { x: [1, 2, 4, 8], y: [0, 1, 2, 3] };
    const [line] = isolines(
      uneven.y.map(() => [...uneven.x]),
      uneven,
      3,
    );
    for (const [x] of line!) expect(x).toBeCloseTo(3, 6);
  });
});

describe('areaAbove', () => {
  it('covers the whole rectangle when all is above', () => {
    const rings = areaAbove(
      gridOf(() => 5),
      axes,
      0,
    );
    const xs = rings.flat().map(([x]) => x);
    expect(Math.min(...xs)).toBe(16);
    expect(Math.max(...xs)).toBe(34);
  });
});

describe('sample and lowestOf', () => {
  it('interpolates a plane exactly and clamps outside', () => {
    const plane = gridOf((x, y) => 2 * x + y);
    expect(sample(plane, axes, [20.3, 151.7])).toBeCloseTo(192.3, 9);
    expect(sample(plane, axes, [99, 999])).toBeCloseTo(248, 9);
  });

  it('is positive only where every grid is', () => {
    expect(lowestOf([[[1, -1]], [[2, 3]]])).toEqual([[1, -1]]);
    expect(lowestOf([])).toBeNull();
  });
});
