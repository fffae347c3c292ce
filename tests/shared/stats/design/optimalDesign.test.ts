import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gainOf, oldRowOf, stateOfRows } from '@shared/stats/design/exchangeState';
import { optimalDesign } from '@shared/stats/design/optimalDesign';
import { makeRegion } from '@shared/stats/design/designRegion';
import { regionMoments } from '@shared/stats/design/regionMoments';
import { settableLattice } from '@shared/stats/design/settableLattice';
import { compileRow } from '@shared/stats/model/compileRow';
import { modelMatrix } from '@shared/stats/model/modelMatrix';
import { termsOf } from '@shared/stats/model/term';
import { seeded } from '@shared/stats/random/random';

const factors = [
  { key: 'a', low: 0, high: 10, step: 1 },
  { key: 'b', low: 0, high: 10, step: 2 },
];
const region = makeRegion(factors, [{ terms: { a: 1, b: 1 }, op: '<=', bound: 14 }], 'range');
const terms = termsOf(factors, 'quadratic');
const rowAt = compileRow(factors, terms);
const moments = regionMoments(region, terms, rowAt);
const lattice = settableLattice(region);

describe('exchange', () => {
  it('is never worse than its start, and stays on settable points inside', () => {
    fc.assert(
      fc.property(
        fc.nat(),
        fc.integer({ min: 7, max: 12 }),
        fc.constantFrom('D' as const, 'I' as const),
        (seed, runs, criterion) => {
          const free = new Array<number>(runs).fill(1);
          const design = optimalDesign(
            {
              lattice,
              rowAt,
              terms: 6,
              moments,
              criterion,
              blocks: 1,
              kept: [],
              free,
              support: [],
            },
            seeded(seed, 'test'),
          );
          expect(design.value).toBeGreaterThanOrEqual(design.startValue);
          for (const { point } of design.points) {
            expect(region.isFeasible(point)).toBe(true);
            point.forEach((x, i) => {
              expect(lattice.levels[i]).toContain(x);
            });
          }
        },
      ),
      { seed: 7, numRuns: 15 },
    );
  });

  it.each(['D', 'I'] as const)('knows the gain of a change in %s beforehand', (criterion) => {
    const random = seeded(5, 'test');
    const rows = Array.from({ length: 9 }, () =>
      Float64Array.from({ length: 6 }, () => random.normal()),
    );
    const next = Float64Array.from({ length: 6 }, () => random.normal());
    const before = stateOfRows(rows, criterion, moments)!;
    const gain = gainOf(before, oldRowOf(before, rows[3]!), next);
    const after = stateOfRows(rows.with(3, next), criterion, moments)!;
    expect(gain / (after.value - before.value)).toBeCloseTo(1, 6);
  });
});

describe('model rows', () => {
  it('are the rows of the model matrix', () => {
    const mixed = [...factors, { key: 'tip', levels: ['x', 'y', 'z'] }];
    const own = termsOf(mixed, 'quadratic');
    const at = compileRow(mixed, own);
    const out = new Float64Array(own.length);
    for (const point of [
      [0.3, -0.7, 0],
      [1, 0.2, 1],
      [-0.4, 1, 2],
    ]) {
      at(point, out);
      expect([...out]).toEqual([...modelMatrix(mixed, own, [point]).data]);
    }
  });
});
