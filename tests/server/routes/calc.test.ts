import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildLab, type BuiltLab } from '@tests/support/buildLab';
import { startTestApp, type TestApp } from '@tests/support/testApp';

let test: TestApp;
let lab: BuiltLab;

beforeAll(async () => {
  test = startTestApp();
  lab = await buildLab(test.app);
});
afterAll(() => test.close());

const factors = [
  { key: 'voltage', unit: 'kV', low: 120, high: 180, min: 90, max: 200, step: 5 },
  { key: 'gap', unit: 'mm', low: 20, high: 30, min: 10, max: 40, step: 1 },
];
const runs = [-1, 0, 1].flatMap((a) =>
  [-1, 0, 1].map((b) => ({
    id: `${a}.${b}`,
    settings: { voltage: 150 + 30 * a, gap: 25 + 5 * b },
    value: 60 + 7 * a + 3 * b - 4 * a * a - 2 * b * b + 0.3 * a * b,
  })),
);
const ask = (route: string, body: object) => lab.as('analyst', 'post', `/calc/${route}`).send(body);

describe('the calculation API', () => {
  it('plans', async () => {
    const { status, body } = await ask('design', {
      factors,
      kind: 'centralComposite',
      options: { alpha: 'faceCentred' },
      seed: 11,
    });
    expect(status).toBe(200);
    expect(body.runs).toHaveLength(14);
    expect(Object.keys(body.runs[0]).sort()).toEqual(
      ['block', 'coded', 'pointType', 'runOrder', 'settings', 'standardOrder'].sort(),
    );
    expect(body.properties).toMatchObject({ alpha: 1, snapLoss: 0 });
    expect(body.evaluation.notEstimable).toEqual([]);
  });

  it('evaluates, with power when effect and spread are given', async () => {
    const { status, body } = await ask('evaluate', {
      factors,
      runs: runs.map(({ settings }) => ({ settings })),
      model: 'quadratic',
      effect: 8,
      sigma: 2.5,
    });
    expect(status).toBe(200);
    expect(body).toMatchObject({ parameters: 6, rank: 6, notEstimable: [] });
    expect(body.terms[1].power).toBeGreaterThan(0.5);
    expect(body.dRelative).toBeLessThanOrEqual(1);
  });

  it('says what to run next, sieves and counts energy', async () => {
    const next = await ask('next', { factors, runs, model: 'linear', purpose: 'ascent', count: 2 });
    expect(next.status).toBe(200);
    expect(next.body.runs).toHaveLength(2);
    const sieve = await ask('sieve', {
      feedMassG: 300.2,
      beforeSievingG: 299.6,
      massBasis: 'dry',
      sieves: [
        { apertureMm: 2, retainedG: 26.1 },
        { apertureMm: 0.125, retainedG: 250 },
      ],
      panG: 23.4,
      passingAt: [2],
      percentiles: [80],
    });
    expect(sieve.body.balance.treatment).toMatchObject({ lossG: 0.6, verdict: 'holds' });
    expect(sieve.body.passing['2']).toBeCloseTo(91.29, 2);
    const energy = await ask('energy', {
      capacitanceNf: 32,
      voltageKv: 150,
      pulses: 40,
      frequencyHz: 5,
      massG: 300,
    });
    expect(energy.body).toMatchObject({ pulseEnergyJ: 360, totalEnergyJ: 14_400, durationS: 8 });
  });

  it('refuses unknown fields and lists every issue, not the first', async () => {
    const { status, body } = await ask('design', {
      factors: [{ ...factors[0], low: 180, high: 120 }, factors[1]],
      kind: 'latin',
      colour: 'red',
    });
    expect(status).toBe(400);
    const paths = body.error.issues.map((issue: { path: string }) => issue.path);
    expect(paths).toEqual(expect.arrayContaining(['kind', 'colour', 'factors.0.low']));
  });

  it.each([
    ['design', { factors, kind: 'centralComposite', options: { alpha: 3 } }, 'outside-envelope'],
    ['design', { factors, kind: 'optimal', options: { runs: 5 } }, 'too-few-runs'],
    ['design', { factors: manyFactors(13), kind: 'plackettBurman' }, 'too-many-factors'],
    ['fit', { factors, runs: runs.slice(0, 4), model: 'quadratic' }, 'too-few-runs'],
    [
      'fit',
      {
        factors,
        runs: runs.filter((_, i) => i % 2 === 0).concat(runs[0]!, runs[2]!),
        model: 'quadratic',
      },
      'aliased',
    ],
    [
      'next',
      {
        factors,
        runs,
        model: 'linear',
        purpose: 'improve',
        constraints: [{ terms: { voltage: 1 }, op: '>=', bound: 999 }],
      },
      'no-feasible-point',
    ],
  ])('%s: what cannot be is a 422 in a sentence', async (route, body, code) => {
    const answer = await ask(route, body);
    expect(answer.status).toBe(422);
    expect(answer.body.error.code).toBe(code);
    expect(answer.body.error.message).toMatch(/^[A-Z0-9‘].*[.?]$/);
  });

  it('answers eleven factors and extreme numbers without a 500', async () => {
    const screening = await ask('design', { factors: manyFactors(11), kind: 'plackettBurman' });
    expect(screening.status).toBe(200);
    expect(screening.body.runs).toHaveLength(12);
    const extreme = runs.map((run, i) => ({ ...run, value: i === 2 ? 1e300 : i }));
    for (const route of ['fit', 'next'])
      expect([200, 422]).toContain(
        (
          await ask(route, {
            factors,
            runs: extreme,
            model: 'linear',
            ...(route === 'next' ? { purpose: 'improve' } : {}),
          })
        ).status,
      );
  });

  it('is not for customers, nor for strangers', async () => {
    const body = { factors, kind: 'factorial' };
    expect((await lab.as('customer', 'post', '/calc/design').send(body)).status).toBe(403);
  });
});

function manyFactors(count: number) {
  return Array.from({ length: count }, (_, i) => ({ key: `x${i}`, low: -1, high: 1 }));
}
