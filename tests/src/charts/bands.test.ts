import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bandOf, chooseBands, isIndex, roundStep } from '@/charts/bands';

const extents = fc
  .tuple(
    fc.double({ min: -1e4, max: 1e4, noNaN: true }),
    fc.double({ min: 1e-3, max: 1e4, noNaN: true }),
  )
  .map(([low, width]) => ({ low, high: low + width }));

describe('chooseBands', () => {
  it('steps by 1, 2.5 or 5 times a power of ten', () => {
    fc.assert(
      fc.property(extents, (extent) => {
        const { step } = chooseBands(extent);
        const lead = step / 10 ** Math.floor(Math.log10(step) + 1e-9);
        expect([1, 2.5, 5].some((round) => Math.abs(lead - round) < 1e-6)).toBe(true);
      }),
    );
  });

  it('has eight limits on multiples of the step, so that values use the nine bands', () => {
    fc.assert(
      fc.property(extents, (extent) => {
        const bands = chooseBands(extent);
        expect(bands.limits).toHaveLength(8);
        for (const limit of bands.limits)
          expect(Math.abs(limit / bands.step - Math.round(limit / bands.step))).toBeLessThan(1e-6);
        // at most one multiple inside the extent is lost at either end
        expect(extent.low).toBeGreaterThanOrEqual(bands.limits[0]! - 2 * bands.step - 1e-6);
        expect(extent.high).toBeLessThanOrEqual(bands.limits[7]! + 2 * bands.step + 1e-6);
      }),
    );
  });

  it('uses more than a third of the bands', () => {
    fc.assert(
      fc.property(extents, (extent) => {
        const bands = chooseBands(extent);
        expect(bandOf(bands, extent.high) - bandOf(bands, extent.low)).toBeGreaterThanOrEqual(3);
      }),
    );
  });

  it('takes steps of 2.5 with index lines every 5 for the rehearsed slice', () => {
    const bands = chooseBands({ low: 70.4, high: 87.6 });
    expect(bands.step).toBe(2.5);
    expect(bands.limits).toEqual([70, 72.5, 75, 77.5, 80, 82.5, 85, 87.5]);
    expect(bands.limits.filter((limit) => isIndex(bands, limit))).toEqual([70, 75, 80, 85]);
  });

  it('has bands for a slice without any slope', () => {
    expect(chooseBands({ low: 5, high: 5 }).limits).toHaveLength(8);
  });

  it('rounds steps up', () => {
    expect([0.9, 1, 1.1, 2.6, 6].map(roundStep)).toEqual([1, 1, 2.5, 5, 10]);
  });
});
