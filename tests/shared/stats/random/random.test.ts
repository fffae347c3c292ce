import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { makeRandom, randomFrom } from '@shared/stats/random/generator';
import { normal } from '@shared/stats/random/normal';
import { shuffle } from '@shared/stats/random/shuffle';

const draws = <T>(n: number, draw: () => T): T[] => Array.from({ length: n }, draw);

describe('random numbers', () => {
  it('follow the published generator from the state 1, 2, 3, 4', () => {
    // xoshiro128**, reference implementation of Blackman & Vigna; values from memory
    const random = randomFrom([1, 2, 3, 4]);
    expect(draws(6, random.bits)).toEqual([
      11_520, 0, 5_927_040, 70_819_200, 2_031_721_883, 1_637_235_492,
    ]);
  });

  it('are the same for one seed and others for the next', () => {
    fc.assert(
      fc.property(fc.nat({ max: 4_294_967_295 }), (seed) => {
        const first = draws(5, makeRandom(seed).bits);
        expect(draws(5, makeRandom(seed).bits)).toEqual(first);
        expect(draws(5, makeRandom((seed + 1) % 4_294_967_296).bits)).not.toEqual(first);
      }),
      { seed: 7, numRuns: 100 },
    );
  });

  it('keep their first draws for ever: plans are drawn again from the seed', () => {
    expect(shuffle([1, 2, 3, 4, 5, 6, 7, 8, 9, 10], makeRandom(7))).toEqual([
      4, 10, 7, 6, 5, 8, 3, 2, 9, 1,
    ]);
  });

  it('fill 0 … n−1 evenly', () => {
    const random = makeRandom(3);
    const counts = new Array<number>(6).fill(0);
    for (let i = 0; i < 60_000; i++) counts[random.below(6)]! += 1;
    const chiSquared = counts.reduce((sum, count) => sum + (count - 10_000) ** 2 / 10_000, 0);
    expect(chiSquared).toBeLessThan(20.5); // 99.9 % of χ² with 5 degrees of freedom
  });

  it('give normal deviates of mean 0 and SD 1, uniform ones below 1', () => {
    const random = makeRandom(11);
    const sample = draws(40_000, () => normal(random));
    const mean = sample.reduce((a, b) => a + b, 0) / sample.length;
    const variance = sample.reduce((a, b) => a + (b - mean) ** 2, 0) / (sample.length - 1);
    expect(Math.abs(mean)).toBeLessThan(0.016);
    expect(Math.abs(variance - 1)).toBeLessThan(0.025);
    expect(sample.filter((z) => Math.abs(z) > 1.96).length / sample.length).toBeCloseTo(0.05, 2);
    expect(Math.max(...draws(1000, random.uniform))).toBeLessThan(1);
  });

  it('shuffle keeps every item', () => {
    fc.assert(
      fc.property(fc.array(fc.integer()), fc.nat(), (items, seed) => {
        const out = shuffle(items, makeRandom(seed));
        expect([...out].sort((a, b) => a - b)).toEqual([...items].sort((a, b) => a - b));
      }),
      { seed: 7, numRuns: 100 },
    );
  });
});
