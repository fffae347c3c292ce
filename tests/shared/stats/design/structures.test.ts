import { describe, expect, it } from 'vitest';
import { axialDistance, type CompositeCounts } from '@shared/stats/design/axialDistance';
import { blockWords, confoundedBy } from '@shared/stats/design/blockTwoLevel';
import { boxBehnken } from '@shared/stats/design/boxBehnken';
import { centralComposite } from '@shared/stats/design/centralComposite';
import { conferenceMatrix, definitiveScreening } from '@shared/stats/design/definitiveScreening';
import {
  aliasChains,
  closureOf,
  letters,
  placesOf,
  resolutionOf,
  wordLengths,
} from '@shared/stats/design/effectWord';
import { bestGenerators, parseGenerators, wordOf } from '@shared/stats/design/fractionGenerators';
import { plackettBurman } from '@shared/stats/design/plackettBurman';
import { threeLevelDesign } from '@shared/stats/design/threeLevel';
import { foldOver, fractionRuns, twoLevelDesign } from '@shared/stats/design/twoLevel';
import { StatsError } from '@shared/stats/errors';
import boxBehnkenReference from '../../../reference/data/published/struct_box_behnken.json' with { type: 'json' };
import blocking from '../../../reference/data/published/struct_factorial_blocking.json' with { type: 'json' };
import composite from '../../../reference/data/published/struct_ccd.json' with { type: 'json' };
import conference from '../../../reference/data/published/struct_conference_dsd.json' with { type: 'json' };
import fractions from '../../../reference/data/published/struct_fractional_factorials.json' with { type: 'json' };
import screening from '../../../reference/data/published/struct_plackett_burman.json' with { type: 'json' };

const ROMAN: Record<string, number> = { III: 3, IV: 4, V: 5, VI: 6, VII: 7 };
const dot = (a: readonly number[], b: readonly number[]) =>
  a.reduce((sum, x, i) => sum + x * b[i]!, 0);
const column = (rows: readonly (readonly number[])[], j: number) => rows.map((row) => row[j]!);

function codeOf(run: () => unknown): string {
  try {
    run();
  } catch (error) {
    if (error instanceof StatsError) return error.code;
    throw error;
  }
  return 'none';
}

describe('fractions', () => {
  // Box, Hunter & Hunter (1978), table 12.15; NIST/SEMATECH e-Handbook 5.3.3.4.7; generators from memory,
  // word lengths computed independently
  it.each(fractions.entries)(
    '$notation has the resolution and word lengths of the tables',
    (entry) => {
      const { k, p, resolution, word_length_pattern } = entry;
      const relation = closureOf(bestGenerators(k, p).map(wordOf));
      expect(resolutionOf(relation)).toBe(ROMAN[resolution]);
      expect(wordLengths(relation)).toEqual(
        Object.fromEntries(
          Object.entries(word_length_pattern).map(([n, count]) => [Number(n), count]),
        ),
      );
      expect(relation).toHaveLength(2 ** p - 1);
    },
  );

  it.each(fractions.entries)(
    '$notation has orthogonal columns in 2^(k−p) runs',
    ({ k, p, runs }) => {
      const rows = fractionRuns(k, bestGenerators(k, p));
      expect(rows).toHaveLength(runs);
      for (let i = 0; i < k; i++)
        for (let j = 0; j < i; j++) expect(dot(column(rows, i), column(rows, j))).toBe(0);
    },
  );

  it('lists what cannot be told apart', () => {
    const relation = closureOf(bestGenerators(4, 1).map(wordOf));
    expect(relation.map(({ mask }) => placesOf(mask, 4))).toEqual([[0, 1, 2, 3]]);
    const chains = aliasChains(relation, 4).map((chain) =>
      chain.map(({ mask }) => placesOf(mask, 4).join('')),
    );
    expect(chains).toEqual([
      ['01', '23'],
      ['02', '13'],
      ['03', '12'],
    ]);
  });

  it('reads generators, signs too', () => {
    const keys = ['voltage', 'gap', 'pulses', 'frequency'];
    expect(parseGenerators(['frequency=-voltage:gap:pulses'], keys)).toEqual([
      { factor: 3, mask: 7, sign: -1 },
    ]);
    const bad = [
      ['frequency'],
      ['frequency=voltage:water'],
      ['frequency=voltage'],
      ['x=voltage:gap'],
    ];
    bad.forEach((texts) => {
      expect(codeOf(() => parseGenerators(texts, keys))).toBe('unknown-term');
    });
    expect(
      codeOf(() => parseGenerators(['frequency=voltage:gap', 'pulses=gap:frequency'], keys)),
    ).toBe('aliased');
  });

  it('keeps, under fold-over, the words that a reversal does not change', () => {
    const design = twoLevelDesign(5, bestGenerators(5, 2), 1);
    // all signs: words of odd length go, resolution III becomes IV
    const whole = foldOver(design, null, 2);
    expect(whole.points).toHaveLength(16);
    expect(resolutionOf(whole.relation!)).toBe(4);
    expect(whole.points.filter(({ block }) => block === 2)).toHaveLength(8);
    // one factor: it and all its products are clear
    const one = foldOver(design, 0, 1);
    expect(one.relation!.every(({ mask }) => (mask & 1) === 0)).toBe(true);
  });
});

describe('blocks of two-level designs', () => {
  // Montgomery, Design and Analysis of Experiments, 8th ed. 2013, table 7.9, from memory; closures verified
  it.each(blocking.entries)('2^$k in $blocks blocks loses no more than the tables', (entry) => {
    const { k, blocks, confounded } = entry;
    const places = Array.from({ length: k }, (_, i) => i);
    const lost = confoundedBy(blockWords(places, Math.log2(blocks), []));
    const lengths = (all: number[]) => [1, 2, 3].map((n) => all.filter((l) => l === n).length);
    const ours = lengths(lost.map(({ mask }) => letters(mask)));
    expect(lost).toHaveLength(blocks - 1);
    expect(ours[0]).toBe(0);
    expect(ours[1]).toBeLessThanOrEqual(lengths(confounded.map((word) => word.length))[1]!);
  });

  it('balances every factor in every block', () => {
    const { points } = twoLevelDesign(5, bestGenerators(5, 1), 2);
    for (const block of [1, 2])
      for (let i = 0; i < 5; i++) {
        const own = points.filter((each) => each.block === block);
        expect(own).toHaveLength(8);
        expect(own.reduce((sum, { point }) => sum + point[i]!, 0)).toBe(0);
      }
  });

  it('refuses numbers that do not part', () => {
    expect(codeOf(() => twoLevelDesign(3, [], 3))).toBe('not-available');
    expect(codeOf(() => twoLevelDesign(3, [], 8))).toBe('not-available');
  });
});

describe('central composite', () => {
  const counts = (more: Partial<CompositeCounts>): CompositeCounts => ({
    factors: 3,
    factorial: 8,
    replicates: 1,
    centre: 6,
    centreFactorial: 4,
    centreAxial: 2,
    ...more,
  });

  // NIST/SEMATECH e-Handbook 5.3.3.6.1, table 3.23
  it.each(composite.alpha_for_rotatability)(
    'is rotatable at $alpha_published with $factorial_portion',
    ({ k, factorial_runs, alpha_published, alpha_computed }) => {
      const alpha = axialDistance('rotatable', counts({ factors: k, factorial: factorial_runs }));
      expect(alpha).toBeCloseTo(alpha_computed, 13);
      expect(Math.abs(alpha - alpha_published)).toBeLessThan(6e-4);
    },
  );

  // Box & Hunter (1957), Ann. Math. Statist. 28: 195–241; Myers, Montgomery & Anderson-Cook, from memory,
  // formula verified
  it.each(composite.orthogonal_blocking)(
    'k = $k, p = $p: blocks are orthogonal at $alpha_orthogonal_blocking_published',
    (entry) => {
      const centreFactorial = entry.cube_blocks * entry.centre_runs_per_cube_block;
      const alpha = axialDistance('orthogonalBlocks', {
        factors: entry.k,
        factorial: entry.cube_runs,
        replicates: 1,
        centre: centreFactorial + entry.axial_centre_runs,
        centreFactorial,
        centreAxial: entry.axial_centre_runs,
      });
      expect(alpha).toBeCloseTo(entry.alpha_computed, 12);
      expect(entry.cube_runs + centreFactorial + entry.axial_runs + entry.axial_centre_runs).toBe(
        entry.N_published,
      );
    },
  );

  it('has squares uncorrelated with each other at the orthogonal distance', () => {
    const alpha = axialDistance('orthogonal', counts({}));
    // {[(F+2k+n0)^½ − F^½]²·F/4}^¼, e-Handbook 5.3.3.6.1
    expect(alpha).toBeCloseTo((((Math.sqrt(20) - Math.sqrt(8)) ** 2 * 8) / 4) ** 0.25, 12);
    const s2 = 8 + 2 * alpha ** 2;
    expect(20 * 8).toBeCloseTo(s2 ** 2, 9);
  });

  it.each([
    ['spherical', Math.sqrt(3)],
    ['faceCentred', 1],
    ['fourthRoot', 3 ** 0.25],
    [1.5, 1.5],
  ] as const)('takes %s', (rule, alpha) => {
    expect(axialDistance(rule, counts({}))).toBeCloseTo(alpha, 14);
  });

  const options = {
    alpha: 'rotatable',
    inscribed: false,
    fraction: 0,
    blocks: 1,
    centrePoints: 6,
    replicates: 1,
  } as const;

  // NIST/SEMATECH e-Handbook 5.3.3.6.3, table 3.28: runs without the centre points
  it.each([
    [2, 0, 8],
    [3, 0, 14],
    [4, 0, 24],
    [5, 1, 26],
    [5, 0, 42],
    [6, 1, 44],
  ])('k = %d, p = %d has %d points off centre', (k, fraction, n) => {
    expect(centralComposite(k, { ...options, fraction }).points).toHaveLength(n);
  });

  it('is scaled to its axial points when inscribed', () => {
    // e-Handbook 5.3.3.6.1: range 10–20, k = 3: corners at 12.03 and 17.97
    const { points } = centralComposite(3, { ...options, inscribed: true });
    const { corner_published } = composite.factor_settings.CCI;
    expect(15 + 5 * points[0]!.point[0]!).toBeCloseTo(
      composite.factor_settings.CCI.corner_computed[0]!,
      9,
    );
    expect(Math.round(15 + 5 * points[0]!.point[0]!)).toBe(corner_published[0]);
    expect(Math.max(...points.flatMap(({ point }) => point))).toBe(1);
  });

  it('parts into factorial blocks and an axial block', () => {
    const { points } = centralComposite(3, { ...options, blocks: 3 });
    const sizes = [1, 2, 3].map((block) => points.filter((each) => each.block === block).length);
    expect(sizes).toEqual([4, 4, 6]);
    expect(points.filter(({ block }) => block === 3).every((p) => p.pointType === 'axial')).toBe(
      true,
    );
  });

  it('refuses a fraction below resolution V, blocks that do not part, too few centre points', () => {
    expect(codeOf(() => centralComposite(4, { ...options, fraction: 1 }))).toBe('aliased');
    expect(codeOf(() => centralComposite(4, { ...options, blocks: 4 }))).toBe('not-available');
    expect(codeOf(() => centralComposite(3, { ...options, blocks: 3, centrePoints: 2 }))).toBe(
      'too-few-runs',
    );
    expect(codeOf(() => centralComposite(2, { ...options, blocks: 3 }))).toBe('aliased');
  });
});

describe('Box–Behnken', () => {
  // Box & Behnken (1960), Technometrics 2: 455–475; run counts e-Handbook 5.3.3.6.2 (k = 7 from memory)
  it.each([
    [3, 12],
    [4, 24],
    [5, 40],
    [6, 48],
    [7, 56],
  ])('k = %d has %d points, balanced', (k, n) => {
    const { points } = boxBehnken(k, 1);
    expect(points).toHaveLength(n);
    const rows = points.map(({ point }) => point);
    const squares = rows.map((row) => row.map((x) => x * x));
    for (let i = 0; i < k; i++) {
      expect(column(rows, i).reduce((a, b) => a + b, 0)).toBe(0);
      for (let j = 0; j < i; j++) expect(dot(column(rows, i), column(rows, j))).toBe(0);
    }
    expect(new Set(squares.map((row) => row.join())).size).toBe(n / (k < 6 ? 4 : 8));
  });

  it.each(boxBehnkenReference.designs)('k = $k has the published moments', (entry) => {
    const { points } = boxBehnken(entry.k, 1);
    const x = (i: number) => points.map(({ point }) => point[i]! ** 2);
    expect(dot(x(0), x(0))).toBe(entry.properties_computed_here.sum_x4);
    const mixed = new Set<number>();
    for (let i = 0; i < entry.k; i++) for (let j = 0; j < i; j++) mixed.add(dot(x(i), x(j)));
    expect([...mixed].sort((a, b) => a - b)).toEqual(
      entry.properties_computed_here.sum_x2x2_values,
    );
  });

  it.each([
    [4, 3],
    [5, 2],
    [6, 2],
    [7, 2],
  ])('k = %d parts into %d orthogonal blocks', (k, blocks) => {
    const { points } = boxBehnken(k, blocks);
    const means = (term: (point: readonly number[]) => number) =>
      Array.from({ length: blocks }, (_, b) => {
        const own = points.filter(({ block }) => block === b + 1);
        return own.reduce((sum, { point }) => sum + term(point), 0) / own.length;
      });
    for (let i = 0; i < k; i++)
      for (let j = 0; j <= i; j++) {
        const each = means((point) => point[i]! * point[j]!);
        expect(new Set(each).size, `${i} ${j}`).toBe(1);
      }
  });

  it('is not given for 2 or 8 factors, nor in blocks that do not part', () => {
    for (const run of [() => boxBehnken(2, 1), () => boxBehnken(8, 1), () => boxBehnken(3, 2)])
      expect(codeOf(run)).toBe('not-available');
  });
});

describe('screening', () => {
  // Plackett & Burman (1946), Biometrika 33: 305–325; rows from memory, orthogonality verified
  it.each(screening.designs)('$runs runs are the published rows', ({ runs, rows }) => {
    expect(plackettBurman(runs - 1, runs).points.map(({ point }) => point)).toEqual(
      expect.arrayContaining(rows),
    );
  });

  it.each([8, 12, 16, 20, 24, 28])('%d runs have orthogonal, balanced columns', (runs) => {
    const factors = Math.min(runs - 1, 27);
    const rows = plackettBurman(factors, runs).points.map(({ point }) => point);
    expect(rows).toHaveLength(runs);
    for (let i = 0; i < factors; i++) {
      expect(column(rows, i).reduce((a, b) => a + b, 0)).toBe(0);
      for (let j = 0; j < i; j++) expect(dot(column(rows, i), column(rows, j))).toBe(0);
    }
  });

  it('takes the smallest that holds the factors, refuses others', () => {
    expect(plackettBurman(11, null).points).toHaveLength(12);
    expect(codeOf(() => plackettBurman(12, 12))).toBe('too-few-runs');
    expect(codeOf(() => plackettBurman(5, 14))).toBe('not-available');
  });

  // Xiao, Lin & Bai (2012), J. Quality Technology 44: 2–8
  it.each([4, 6, 8, 10, 12, 14])('order %d is a conference matrix', (m) => {
    const c = conferenceMatrix(m);
    for (let i = 0; i < m; i++)
      for (let j = 0; j <= i; j++) {
        expect(dot(column(c, i), column(c, j))).toBe(i === j ? m - 1 : 0);
        if (i === j) expect(c[i]![i]).toBe(0);
      }
  });

  it.each(conference.designs)('$m factors: main effects clear of all of second order', (entry) => {
    const { m, runs } = entry;
    const rows = [
      ...definitiveScreening(m).points.map(({ point }) => point),
      new Array<number>(m).fill(0),
    ];
    expect(rows).toHaveLength(runs);
    const x = (i: number) => column(rows, i);
    for (let i = 0; i < m; i++)
      for (let j = 0; j < m; j++)
        for (let k = 0; k <= j; k++)
          expect(
            dot(
              x(i),
              x(j).map((value, r) => value * x(k)[r]!),
            ),
          ).toBe(0);
    const square = (i: number) => {
      const values = x(i).map((value) => value * value);
      const mean = values.reduce((a, b) => a + b, 0) / runs;
      return values.map((value) => value - mean);
    };
    const correlation = dot(square(0), square(1)) / dot(square(0), square(0));
    expect(correlation).toBeCloseTo(entry.quadratic_correlation_computed, 12);
  });

  it('drops a column for an odd number of factors', () => {
    expect(definitiveScreening(5).points).toHaveLength(12);
    expect(codeOf(() => definitiveScreening(2))).toBe('not-available');
  });
});

describe('three levels', () => {
  const factors = [1, 2, 3].map((i) => ({ key: `x${i}`, low: -1, high: 1 }));

  it('lists all combinations in standard order, its centre marked', () => {
    const { points } = threeLevelDesign(factors, 1);
    expect(points).toHaveLength(27);
    expect(points[0]!.point).toEqual([-1, -1, -1]);
    expect(points[1]!.point).toEqual([0, -1, -1]);
    expect(points.filter(({ pointType }) => pointType === 'centre')).toHaveLength(1);
  });

  it.each([3, 9])('parts into %d blocks with balanced factors', (blocks) => {
    const { points } = threeLevelDesign(factors, blocks);
    for (let b = 1; b <= blocks; b++) {
      const own = points.filter(({ block }) => block === b);
      expect(own).toHaveLength(27 / blocks);
      for (let i = 0; i < 3; i++)
        expect(own.reduce((sum, { point }) => sum + point[i]!, 0)).toBe(0);
    }
  });
});
