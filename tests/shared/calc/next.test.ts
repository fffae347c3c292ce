import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { designAnswer } from '@shared/calc/design';
import { nextAnswer as answerOf } from '@shared/calc/next';
import { designRequestSchema } from '@shared/schemas/calc/design';
import { nextRequestSchema } from '@shared/schemas/calc/next';
import { isSettable } from '@shared/stats/coding/snap';
import { StatsError } from '@shared/stats/errors';
import ascent from '../../reference/data/published/data_nist_5_5_3_1_1_steepest_ascent.json' with { type: 'json' };

type NextRequest = z.input<typeof nextRequestSchema>;
const nextAnswer = (request: NextRequest) => answerOf(nextRequestSchema.parse(request));

const voltage = { key: 'voltage', low: 120, high: 180, min: 90, max: 200, step: 5 };
const gap = { key: 'gap', low: 20, high: 30, min: 10, max: 40, step: 1 };
const pulses = { key: 'pulses', low: 20, high: 60, min: 1, max: 300, step: 1 };
const factors = [voltage, gap, pulses];
const field = { terms: { voltage: 1, gap: -7 }, op: '<=' as const, bound: 0 };

/** A known hill: best at coded (0.5, 0.2, 0.4), 80 high, with a little repeatable scatter. */
const hill = ([v, g, n]: readonly number[]) =>
  80 - 12 * (v! - 0.5) ** 2 - 8 * (g! - 0.2) ** 2 - 15 * (n! - 0.4) ** 2;
const coded = (s: Readonly<Record<string, number | string>>) =>
  factors.map(({ key, low, high }) => (2 * (s[key] as number) - low - high) / (high - low));

function study(more: Partial<NextRequest>): NextRequest {
  const { runs } = designAnswer(
    designRequestSchema.parse({ factors, kind: 'boxBehnken', centrePoints: 3 }),
  );
  return {
    factors,
    runs: runs.map(({ settings }, i) => ({
      id: i + 1,
      settings,
      value: hill(coded(settings)) + 0.4 * Math.sin(7 * i),
    })),
    model: 'quadratic',
    purpose: 'replicate',
    ...more,
  };
}

function codeOf(run: () => unknown): string {
  try {
    run();
  } catch (error) {
    if (error instanceof StatsError) return error.code;
    throw error;
  }
  return 'none';
}

describe('steepest ascent', () => {
  // NIST/SEMATECH e-Handbook 5.5.3.1.1: temperature 170–230 °C, time 150–250 min
  const nist: NextRequest = {
    factors: [
      { key: 'temperature', low: 170, high: 230, min: 100, max: 300 },
      { key: 'time', low: 150, high: 250, min: 100, max: 500 },
    ],
    runs: ascent.data.rows.map((row, i) => ({
      id: i + 1,
      settings: { temperature: row[2]!, time: row[3]! },
      value: row[4]!,
    })),
    model: 'linear',
    purpose: 'ascent',
    count: 3,
    step: 1,
  };

  it('goes where the handbook goes: 189.56 °C at 350 min', () => {
    const { runs } = nextAnswer(nist);
    const ratio = -1.2925 / 11.1425;
    expect(runs.map(({ settings }) => settings['time'])).toEqual([250, 300, 350]);
    runs.forEach(({ settings }, i) => {
      expect(settings['temperature']).toBeCloseTo(200 + 30 * ratio * (i + 1), 8);
    });
    expect(runs[2]!.settings['temperature']).toBeCloseTo(189.56, 2);
    // 40.644 + 11.1425·3 + 1.2925·0.34799, from the recomputed coefficients
    expect(runs[2]!.predicted).toBeCloseTo(40.6444444444 + 3 * 11.1425 + 3 * ratio * -1.2925, 8);
  });

  it('ends at the envelope and says so', () => {
    const { runs, warnings } = nextAnswer({ ...nist, count: 20 });
    expect(Math.max(...runs.map(({ settings }) => settings['time'] as number))).toBe(500);
    expect(warnings[0]?.code).toBe('path-ends');
  });

  it('takes settable values, none twice, and goes down for a minimum', () => {
    const up = nextAnswer(study({ purpose: 'ascent', count: 3, step: 0.2 }));
    const down = nextAnswer(study({ purpose: 'ascent', count: 3, step: 0.2, aim: 'minimise' }));
    for (const { settings } of up.runs)
      factors.forEach((factor) => {
        expect(isSettable(factor, settings[factor.key] as number)).toBe(true);
      });
    expect(new Set(up.runs.map(({ settings }) => JSON.stringify(settings))).size).toBe(3);
    expect(up.runs[2]!.predicted).toBeGreaterThan(up.runs[0]!.predicted!);
    expect(down.runs[2]!.predicted).toBeLessThan(down.runs[0]!.predicted!);
  });
});

describe('next runs', () => {
  it('replicate what was run once, where single runs weigh most', () => {
    const request = study({ purpose: 'replicate', count: 3 });
    const { runs, gain } = nextAnswer(request);
    const done = request.runs.map(({ settings }) => JSON.stringify(settings));
    for (const { settings } of runs) {
      const sorted = factors.map(({ key }) => [key, settings[key]]);
      expect(done).toContain(JSON.stringify(Object.fromEntries(sorted)));
    }
    expect(gain.pureErrorDfAfter! - gain.pureErrorDfBefore!).toBe(3);
  });

  it.each(['D', 'I'] as const)(
    'augment by %s inside the limits, and lower the variance',
    (criterion) => {
      const { runs, gain } = nextAnswer(
        study({ purpose: 'augment', count: 5, criterion, constraints: [field] }),
      );
      expect(runs).toHaveLength(5);
      expect(gain.averageVarianceAfter!).toBeLessThan(gain.averageVarianceBefore!);
      for (const { settings } of runs) {
        expect((settings['voltage'] as number) / (settings['gap'] as number)).toBeLessThanOrEqual(
          7 + 1e-9,
        );
        factors.forEach((factor) => {
          expect(isSettable(factor, settings[factor.key] as number)).toBe(true);
        });
      }
    },
  );

  it('improve near the top of the hill, apart from each other', () => {
    const { runs, gain } = nextAnswer(study({ purpose: 'improve', count: 3 }));
    expect(hill(coded(runs[0]!.settings))).toBeGreaterThan(78);
    expect(gain.expectedImprovement).toBeGreaterThan(0);
    const [a, b] = runs.map(({ settings }) => coded(settings));
    expect(Math.hypot(...a!.map((x, i) => x - b![i]!))).toBeGreaterThanOrEqual(0.35);
  });

  it('confirm the best settable setting, with the interval written down beforehand', () => {
    const { runs, gain, why } = nextAnswer(study({ purpose: 'confirm', count: 3 }));
    expect(new Set(runs.map(({ settings }) => JSON.stringify(settings))).size).toBe(1);
    expect(hill(coded(runs[0]!.settings))).toBeGreaterThan(79.5);
    expect(gain.meanLow!).toBeLessThan(80.5);
    expect(gain.meanHigh!).toBeGreaterThan(79.5);
    expect(why).toMatch(/95 % prediction interval/);
    const at = { voltage: 150, gap: 25, pulses: 40 };
    expect(nextAnswer(study({ purpose: 'confirm', at })).runs[0]!.settings).toEqual(at);
  });

  it('find the best of a lattice that is too large to list, in a moment', () => {
    const many = Array.from({ length: 7 }, (_, i) => ({ key: `x${i}`, low: -1, high: 1 }));
    const design = designAnswer(
      designRequestSchema.parse({ factors: many, kind: 'boxBehnken', centrePoints: 3 }),
    );
    const top = (point: Readonly<Record<string, number | string>>) =>
      many.reduce((sum, { key }, i) => sum - ((point[key] as number) - 0.1 * (i - 3)) ** 2, 50);
    const { runs } = nextAnswer({
      factors: many,
      runs: design.runs.map(({ settings }, i) => ({
        id: i,
        settings,
        value: top(settings) + 0.01 * Math.sin(i),
      })),
      model: 'quadratic',
      purpose: 'confirm',
    });
    many.forEach(({ key }, i) => {
      expect(runs[0]!.settings[key]).toBeCloseTo(0.1 * (i - 3), 1);
    });
  });

  it('refuse in sentences what cannot be', () => {
    const none = [{ terms: { voltage: 1 }, op: '>=' as const, bound: 500 }];
    const linear = study({ purpose: 'ascent' });
    expect(codeOf(() => nextAnswer(study({ purpose: 'improve', constraints: none })))).toBe(
      'no-feasible-point',
    );
    expect(codeOf(() => nextAnswer({ ...linear, runs: linear.runs.slice(0, 5) }))).toBe(
      'too-few-runs',
    );
    expect(
      codeOf(() =>
        nextAnswer({ ...linear, runs: linear.runs.map((run) => ({ ...run, value: 5 })) }),
      ),
    ).not.toBe('none');
  });
});
