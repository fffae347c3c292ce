import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { designAnswer as answerOf } from '@shared/calc/design';
import { designRequestSchema } from '@shared/schemas/calc/design';
import { StatsError } from '@shared/stats/errors';
import { isSettable } from '@shared/stats/coding/snap';
import exact from '../../reference/data/published/optimal_exact.json' with { type: 'json' };

type DesignRequest = z.input<typeof designRequestSchema>;
const designAnswer = (request: DesignRequest) => answerOf(designRequestSchema.parse(request));

const voltage = { key: 'voltage', unit: 'kV', low: 120, high: 180, min: 90, max: 200, step: 5 };
const gap = { key: 'gap', unit: 'mm', low: 20, high: 30, min: 10, max: 40, step: 1 };
const pulses = { key: 'pulses', low: 20, high: 60, min: 1, max: 300, step: 1 };
const frequency = { key: 'frequency', unit: 'Hz', low: 1, high: 5, min: 0.5, max: 5, step: 0.1 };
const rig = [voltage, gap, pulses, frequency];
const field = [
  { terms: { voltage: 1, gap: -8 }, op: '<=' as const, bound: 0 },
  { terms: { voltage: 1, gap: -4.5 }, op: '>=' as const, bound: 0 },
];
const charging = { terms: { 'voltage^2:frequency': 0.016 }, op: '<=' as const, bound: 1500 };
const plain = (k: number) =>
  Array.from({ length: k }, (_, i) => ({ key: `x${i + 1}`, low: -1, high: 1 }));

function errorOf(request: DesignRequest): StatsError {
  try {
    designAnswer(request);
  } catch (error) {
    if (error instanceof StatsError) return error;
    throw error;
  }
  throw new Error('It was not refused.');
}

describe('runs of a design', () => {
  it('come in random order inside blocks, the same for one seed', () => {
    const request: DesignRequest = { factors: rig, kind: 'boxBehnken', blocks: 3, seed: 11 };
    const { runs } = designAnswer(request);
    expect(designAnswer(request).runs).toEqual(runs);
    expect(designAnswer({ ...request, seed: 12 }).runs).not.toEqual(runs);
    expect(runs.map(({ runOrder }) => runOrder)).toEqual(runs.map((_, i) => i + 1));
    expect(runs.map(({ block }) => block)).toEqual(
      runs.map(({ block }) => block).sort((a, b) => a - b),
    );
    expect(runs.map(({ standardOrder }) => standardOrder).sort((a, b) => a - b)).toEqual(
      runs.map((_, i) => i + 1),
    );
    expect(runs.filter(({ pointType }) => pointType === 'centre').map((r) => r.block)).toEqual([
      1, 1, 2, 2, 3, 3,
    ]);
  });

  it('stand in standard order when asked', () => {
    const { runs } = designAnswer({
      factors: plain(3),
      kind: 'factorial',
      randomise: false,
      centrePoints: 0,
    });
    expect(runs.map(({ coded }) => [coded['x1'], coded['x2'], coded['x3']])).toEqual([
      [-1, -1, -1],
      [1, -1, -1],
      [-1, 1, -1],
      [1, 1, -1],
      [-1, -1, 1],
      [1, -1, 1],
      [-1, 1, 1],
      [1, 1, 1],
    ]);
  });

  it('repeat all points but the centre, each replicate a block if the blocks are as many', () => {
    const { runs } = designAnswer({
      factors: plain(2),
      kind: 'factorial',
      replicates: 2,
      blocks: 2,
      centrePoints: 3,
    });
    const sizes = [1, 2].map((block) => runs.filter((run) => run.block === block).length);
    expect(sizes).toEqual([6, 5]);
    for (const block of [1, 2]) {
      const corners = runs.filter((r) => r.block === block && r.pointType === 'factorial');
      expect(new Set(corners.map(({ settings }) => JSON.stringify(settings))).size).toBe(4);
    }
  });

  it('take every level of a categorical factor, its centre points all levels in turn', () => {
    const electrode = { key: 'electrode', levels: ['cone', 'rod', 'ring'] };
    const { runs, evaluation } = designAnswer({
      factors: [voltage, electrode],
      kind: 'factorial',
      centrePoints: 3,
    });
    expect(runs).toHaveLength(9);
    expect(
      runs.filter((r) => r.pointType === 'centre').map((r) => r.settings['electrode']),
    ).toEqual(expect.arrayContaining(['cone', 'rod', 'ring']));
    expect(evaluation.notEstimable).toEqual([]);
  });
});

describe('settable values', () => {
  it('are taken, coded after snapping, and the loss is told', () => {
    const { runs, properties } = designAnswer({
      factors: [{ ...voltage, low: 121, high: 178 }, gap],
      kind: 'centralComposite',
      options: { inscribed: true },
    });
    for (const { settings, coded } of runs) {
      expect(isSettable(voltage, settings['voltage'] as number)).toBe(true);
      const expected = ((settings['voltage'] as number) - 149.5) / 28.5;
      expect(coded['voltage']).toBeCloseTo(expected, 10);
    }
    expect(properties.snapLoss).not.toBeNull();
    // steps move points outward as well as inward: the loss may be a gain
    expect(Math.abs(properties.snapLoss!)).toBeLessThan(0.2);
  });

  it('are left alone without snapping', () => {
    const { runs } = designAnswer({
      factors: [
        { key: 'a', low: 10, high: 20, min: 0, max: 30, step: 5 },
        { key: 'b', low: 10, high: 20, min: 0, max: 30 },
        { key: 'c', low: 10, high: 20, min: 0, max: 30 },
      ],
      kind: 'centralComposite',
      snap: false,
    });
    // NIST/SEMATECH e-Handbook 5.3.3.6.1 (range 10–20, k = 3): axial points at 6.6 and 23.4
    const axial = runs.filter(({ pointType }) => pointType === 'axial').map((r) => r.settings['a']);
    expect(Math.min(...(axial as number[]))).toBeCloseTo(6.591035847462855, 9);
    expect(Math.max(...(axial as number[]))).toBeCloseTo(23.408964152537145, 9);
  });
});

describe('the envelope', () => {
  it('refuses points outside by name, and offers what would fit', () => {
    const error = errorOf({ factors: rig, kind: 'centralComposite' });
    expect(error.code).toBe('outside-envelope');
    expect(error.message).toMatch(/voltage 210 kV.*above 200 kV/);
    expect(error.message).toMatch(/the inscribed form, the face-centred form, an optimal design/);
    // the page draws both: what can be dialled and what cannot
    const { points, inside } = error.details as Record<'points' | 'inside', object[]>;
    expect(points[0]).toMatchObject({ why: expect.stringMatching(/above|below/) as string });
    expect(points.length + inside.length).toBe(25);
    expect(
      designAnswer({ factors: rig, kind: 'centralComposite', options: { inscribed: true } }).runs,
    ).toHaveLength(30);
  });

  it('does not offer forms that would break the limits as well', () => {
    const error = errorOf({
      factors: rig,
      constraints: [...field, charging],
      kind: 'centralComposite',
      options: { alpha: 'faceCentred' },
    });
    expect(error.message).toMatch(/it breaks voltage − 8·gap ≤ 0/);
    expect(error.message).not.toMatch(/face-centred form/);
    expect(error.details['alternatives']).toHaveLength(1);
  });

  it('is low … high when no other is given', () => {
    expect(errorOf({ factors: plain(3), kind: 'centralComposite' }).code).toBe('outside-envelope');
  });
});

describe('optimal designs', () => {
  // best exact designs known (Box & Draper 1971, 1974 and numerical search): lower bounds
  it.each([
    ...exact.square_k2.map(({ k, N, D_efficiency }) => ({ k, N, best: D_efficiency })),
    ...exact.cube_k3.map(({ k, N, D_efficiency }) => ({ k, N, best: D_efficiency })),
  ])('k = $k, N = $N comes within 0.1 % of the best known', ({ k, N, best }) => {
    const { evaluation, runs } = designAnswer({
      factors: plain(k),
      kind: 'optimal',
      options: { runs: N },
    });
    expect(runs).toHaveLength(N);
    expect(evaluation.dRelative! / best).toBeGreaterThan(0.999);
    expect(evaluation.dRelative!).toBeLessThanOrEqual(1);
  });

  it.each(exact.square_k2_constrained_x1_minus_x2_le_0_5)(
    'N = $N on a cut square comes within 1 % of the best known',
    ({ N, D_efficiency }) => {
      const { evaluation } = designAnswer({
        factors: plain(2),
        constraints: [{ terms: { x1: 1, x2: -1 }, op: '<=', bound: 0.5 }],
        kind: 'optimal',
        options: { runs: N },
      });
      expect(evaluation.dRelative! / D_efficiency).toBeGreaterThan(0.99);
    },
  );

  it('stay on settable values inside the limits, and beat a random start by far', () => {
    const { runs, evaluation } = designAnswer({
      factors: rig,
      constraints: [...field, charging],
      kind: 'optimal',
      options: { runs: 20 },
    });
    for (const { settings } of runs) {
      const [v, g, f] = [settings['voltage'], settings['gap'], settings['frequency']] as number[];
      expect(v! / g!).toBeLessThanOrEqual(8 + 1e-9);
      expect(v! / g!).toBeGreaterThanOrEqual(4.5 - 1e-9);
      expect(0.016 * v! ** 2 * f!).toBeLessThanOrEqual(1500 + 1e-6);
      rig.forEach((factor) => {
        expect(isSettable(factor, settings[factor.key] as number)).toBe(true);
      });
    }
    expect(evaluation.dRelative).toBeGreaterThan(0.9);
  });

  it('lower the mean prediction variance when asked for I', () => {
    const of = (criterion: 'D' | 'I') =>
      designAnswer({ factors: plain(2), kind: 'optimal', options: { runs: 10, criterion } })
        .evaluation;
    expect(of('I').iAverage!).toBeLessThan(of('D').iAverage!);
    expect(of('D').dEfficiency!).toBeGreaterThan(of('I').dEfficiency!);
  });

  it('keep included runs as they were made, in their blocks', () => {
    const kept = { voltage: 152.3, gap: 25, pulses: 40, frequency: 2 };
    const { runs } = designAnswer({
      factors: rig,
      kind: 'optimal',
      blocks: 2,
      options: { runs: 20, include: [{ settings: kept, block: 1 }] },
    });
    expect(runs).toHaveLength(20);
    expect(runs.filter(({ pointType }) => pointType === 'included')).toMatchObject([
      { settings: kept, block: 1 },
    ]);
    expect(runs.filter(({ block }) => block === 1)).toHaveLength(10);
  });

  it('refuse too few runs and an empty region', () => {
    expect(errorOf({ factors: rig, kind: 'optimal', options: { runs: 14 } }).code).toBe(
      'too-few-runs',
    );
    const none = [{ terms: { voltage: 1 }, op: '>=' as const, bound: 500 }];
    const request = { factors: rig, kind: 'optimal', options: { runs: 20 } } as const;
    expect(errorOf({ ...request, constraints: none }).code).toBe('no-feasible-point');
  });
});

describe('space filling', () => {
  it('spreads runs over each range, inside the limits', () => {
    const { runs } = designAnswer({
      factors: rig,
      constraints: [...field, charging],
      kind: 'spaceFilling',
      options: { runs: 16 },
    });
    expect(runs).toHaveLength(16);
    expect(new Set(runs.map(({ settings }) => settings['pulses'])).size).toBeGreaterThan(12);
  });
});

describe('requests', () => {
  it.each([
    [{ kind: 'latin' }, /./],
    [{ options: { alpha: -1 } }, /above 0/],
    [{ options: { colour: 3 } }, /./],
    [{ replicates: 0 }, /./],
    [{ seed: 1.5 }, /./],
  ])('refuse %j', (more, message) => {
    const parsed = designRequestSchema.safeParse({ factors: rig, kind: 'factorial', ...more });
    expect(parsed.success).toBe(false);
    expect(parsed.error?.issues[0]?.message).toMatch(message);
  });

  it('refuse more than twelve factors, and more runs than anyone makes', () => {
    expect(errorOf({ factors: plain(13), kind: 'plackettBurman' }).code).toBe('too-many-factors');
    expect(errorOf({ factors: plain(12), kind: 'factorial' }).code).toBe('out-of-bounds');
  });

  it('refuse what a kind cannot do, in a sentence', () => {
    const cases: [Partial<DesignRequest>, string][] = [
      [{ kind: 'factorial', blocks: 3 }, 'not-available'],
      [{ kind: 'fractional' }, 'not-available'],
      [{ kind: 'fractional', options: { fraction: 2 } }, 'not-available'],
      [{ kind: 'fractional', options: { fraction: 1, foldOver: 'water' } }, 'unknown-term'],
      [{ kind: 'plackettBurman', blocks: 2 }, 'not-available'],
      [
        { kind: 'boxBehnken', factors: [voltage, { key: 'e', levels: ['a', 'b'] }, gap] },
        'not-available',
      ],
    ];
    for (const [more, code] of cases) {
      const error = errorOf({ factors: rig, kind: 'factorial', ...more });
      expect(error.code, JSON.stringify(more)).toBe(code);
      expect(error.message).toMatch(/\.$/);
    }
  });
});

describe('any design', () => {
  const kinds = [
    'factorial',
    'threeLevel',
    'centralComposite',
    'boxBehnken',
    'plackettBurman',
  ] as const;

  it('stays on settable values inside the envelope, or is refused', () => {
    const request = fc.record({
      kind: fc.constantFrom(...kinds),
      seed: fc.nat({ max: 1000 }),
      low: fc.integer({ min: 90, max: 140 }),
      span: fc.integer({ min: 10, max: 60 }),
      alpha: fc.constantFrom('rotatable', 'faceCentred', 'spherical', 'orthogonal'),
    });
    fc.assert(
      fc.property(request, ({ kind, seed, low, span, alpha }) => {
        const own = { ...voltage, low, high: low + span };
        try {
          const { runs, evaluation } = designAnswer({
            factors: [own, gap, pulses],
            kind,
            seed,
            options: { alpha: alpha as 'rotatable' },
          });
          for (const { settings } of runs)
            expect(isSettable(own, settings['voltage'] as number)).toBe(true);
          expect(evaluation.leverages).toHaveLength(runs.length);
          expect(JSON.stringify(evaluation)).not.toMatch(/NaN|Infinity/);
        } catch (error) {
          expect((error as StatsError).code).toBe('outside-envelope');
        }
      }),
      { seed: 7, numRuns: 40 },
    );
  });
});
