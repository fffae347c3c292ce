import { describe, expect, it } from 'vitest';
import type { Point } from '@/charts/geometry';
import { dotPath, hatchPath } from '@/charts/hatch';
import { ringFill, rosette } from '@/charts/ring';
import { onSlab, stacksOf } from '@/charts/slab';
import { stepAside } from '@/charts/stepAside';
import { teeth } from '@/charts/teeth';
import { roundTicks } from '@/charts/ticks';
import { valueDomain } from '@/charts/valueDomain';

/** Every number pair of a path that uses absolute commands only. */
const pointsOf = (path: string): Point[] =>
  [...path.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map(([, x, y]): Point => [Number(x), Number(y)]);

describe('teeth', () => {
  const level: Point[] = [
    [0, 100],
    [300, 100],
  ];

  it('point to the side that holds, whichever way the line runs', () => {
    for (const line of [level, [...level].reverse()]) {
      const up = pointsOf(teeth(line, ([, y]) => y < 100));
      const down = pointsOf(teeth(line, ([, y]) => y > 100));
      expect(Math.min(...up.map(([, y]) => y))).toBe(95);
      expect(Math.max(...up.map(([, y]) => y))).toBe(100);
      expect(Math.max(...down.map(([, y]) => y))).toBe(105);
    }
  });

  it('stand at even distances', () => {
    expect(teeth(level, () => true, { every: 30 }).match(/Z/g)).toHaveLength(10);
  });
});

describe('ringFill', () => {
  it('rises for a run above the model and hangs for one below', () => {
    const above = pointsOf(ringFill([50, 50], 10, 1));
    const below = pointsOf(ringFill([50, 50], 10, -1));
    expect(above.some(([, y]) => y === 45)).toBe(true);
    expect(below.some(([, y]) => y === 55)).toBe(true);
  });

  it('is empty on the model and full from two spreads on', () => {
    expect(ringFill([50, 50], 10, 0)).toBe('');
    expect(ringFill([50, 50], 10, 2)).toBe(ringFill([50, 50], 10, 5));
  });
});

describe('rosette', () => {
  it('stands around its centre, the first at the top', () => {
    const spots = rosette([100, 100], 6);
    expect(spots[0]![0]).toBeCloseTo(100, 9);
    expect(spots[0]![1]).toBeCloseTo(85, 9);
    for (const [x, y] of spots) expect(Math.hypot(x - 100, y - 100)).toBeCloseTo(15, 9);
  });
});

describe('hatch', () => {
  it('stays in its rectangle, at 45°', () => {
    const points = pointsOf(hatchPath({ left: 10, top: 20, width: 80, height: 40 }));
    for (const [x, y] of points) {
      expect(x).toBeGreaterThanOrEqual(10);
      expect(x).toBeLessThanOrEqual(90);
      expect(y).toBeGreaterThanOrEqual(20);
      expect(y).toBeLessThanOrEqual(60);
    }
    for (let k = 0; k < points.length; k += 2) {
      const [a, b] = [points[k]!, points[k + 1]!];
      expect(Math.abs(b[0] - a[0] + (b[1] - a[1]))).toBeLessThan(0.25);
    }
  });

  it('dots only what is inside', () => {
    const path = dotPath({ left: 0, top: 0, width: 60, height: 60 }, (x) => x < 30);
    expect(Math.max(...pointsOf(path).map(([x]) => x))).toBeLessThan(30);
  });
});

describe('stepAside', () => {
  it('keeps every square off the others and says which moved', () => {
    const placed = stepAside([
      [100, 100],
      [104, 101],
      [98, 103],
      [200, 200],
    ]);
    expect(placed.map(({ hasMoved }) => hasMoved)).toEqual([false, true, true, false]);
    for (const [i, one] of placed.entries())
      for (const other of placed.slice(i + 1)) {
        const apart = [0, 1].map((axis) => Math.abs(one.at[axis]! - other.at[axis]!));
        expect(Math.max(...apart)).toBeGreaterThanOrEqual(20);
      }
  });
});

describe('ticks', () => {
  it('are round, inside, and at most so many gaps', () => {
    expect(roundTicks(16, 34, 10)).toEqual([16, 18, 20, 22, 24, 26, 28, 30, 32, 34]);
    expect(roundTicks(130, 180, 6)).toEqual([130, 140, 150, 160, 170, 180]);
    expect(roundTicks(5, 5, 4)).toEqual([5]);
  });

  it('frame values by round ends', () => {
    expect(valueDomain([73.2, 91.1], 3)).toEqual({ low: 70, high: 100, ticks: [70, 80, 90, 100] });
    expect(valueDomain([]).ticks.length).toBeGreaterThan(1);
  });
});

describe('pegs', () => {
  const peg = (x: number, y: number, z: number, count = 1) => ({ x, y, z, count, isBroken: false });

  it('share a stick above one place, the far ones first', () => {
    const [far, near] = stacksOf([peg(0.5, 0.2, 1), peg(0.5, 0.2, 0, 2), peg(0, 1, 0.5)]);
    expect(far).toMatchObject({ x: 0, y: 1 });
    expect(near!.heads.map(({ z, count }) => [z, count])).toEqual([
      [0, 2],
      [1, 1],
    ]);
  });

  it('stand higher for more pulses, and what lies deep lies higher on the page', () => {
    expect(onSlab(0.5, 0.5, 1)[1]).toBeLessThan(onSlab(0.5, 0.5, 0)[1]);
    expect(onSlab(0.5, 0.5, 0)[1]).toBeLessThan(onSlab(0.5, 0.5)[1]);
    expect(onSlab(0.5, 1)[1]).toBeLessThan(onSlab(0.5, 0)[1]);
  });
});
