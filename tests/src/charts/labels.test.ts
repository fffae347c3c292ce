import { describe, expect, it } from 'vitest';
import { lengths, pointAt, withGap, type Point } from '@/charts/geometry';
import { placeLabel } from '@/charts/labels';

const everywhere = () => true;
const straight = (from: Point, to: Point, count = 60): Point[] =>
  Array.from({ length: count + 1 }, (_, k): Point => {
    const share = k / count;
    return [from[0] + share * (to[0] - from[0]), from[1] + share * (to[1] - from[1])];
  });
const arc = (radius: number, from: number, to: number): Point[] =>
  Array.from({ length: 61 }, (_, k): Point => {
    const angle = from + ((to - from) * k) / 60;
    return [200 + radius * Math.cos(angle), 200 + radius * Math.sin(angle)];
  });

describe('placeLabel', () => {
  it('sits near the middle of a free straight line', () => {
    const label = placeLabel(straight([0, 50], [300, 50]), {
      text: '82.5',
      isFree: everywhere,
      obstacles: [],
    })!;
    expect(label.at[0]).toBeGreaterThan(140);
    expect(label.at[0]).toBeLessThan(160);
    expect(label.angle).toBeCloseTo(0, 9);
  });

  it('reads from left to right on a line that runs the other way', () => {
    const label = placeLabel(straight([300, 80], [0, 20]), {
      text: '75',
      isFree: everywhere,
      obstacles: [],
    })!;
    expect(Math.abs(label.angle)).toBeLessThanOrEqual(Math.PI / 2);
  });

  it('prefers the straight part to the bend', () => {
    const line = [...arc(30, Math.PI, 2 * Math.PI), ...straight([230, 205], [230, 420])];
    const label = placeLabel(line, { text: '77.5', isFree: everywhere, obstacles: [] })!;
    expect(label.at[1]).toBeGreaterThan(205);
  });

  it('steps off an obstacle', () => {
    const label = placeLabel(straight([0, 50], [300, 50]), {
      text: '80 %',
      isFree: everywhere,
      obstacles: [{ at: [150, 50], radius: 12 }],
    })!;
    expect(Math.abs(label.at[0] - 150)).toBeGreaterThan(12);
  });

  it('finds no place on a short line or where nothing is free', () => {
    const placing = { text: '80 %', isFree: everywhere, obstacles: [] };
    expect(placeLabel(straight([0, 0], [20, 0]), placing)).toBeNull();
    expect(placeLabel(straight([0, 0], [300, 0]), { ...placing, isFree: () => false })).toBeNull();
  });
});

describe('withGap', () => {
  it('leaves the line outside the gap, its length less the gap', () => {
    const line = straight([0, 0], [100, 0], 7);
    const parts = withGap(line, 40, 60);
    expect(parts).toHaveLength(2);
    const left = parts.reduce((sum, part) => sum + lengths(part).at(-1)!, 0);
    expect(left).toBeCloseTo(80, 9);
    expect(parts[0]!.at(-1)).toEqual([40, 0]);
  });

  it('drops an end that is all gap', () => {
    expect(withGap(straight([0, 0], [100, 0]), 0, 60)).toHaveLength(1);
  });

  it('walks along the line', () => {
    const line: Point[] = [
      [0, 0],
      [3, 4],
      [3, 10],
    ];
    expect(lengths(line)).toEqual([0, 5, 11]);
    expect(pointAt(line, lengths(line), 8)).toEqual([3, 7]);
    expect(pointAt(line, lengths(line), 99)).toEqual([3, 10]);
  });
});
