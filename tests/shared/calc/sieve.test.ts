import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sieveAnswer as answerOf } from '@shared/calc/sieve';
import type { z } from 'zod';
import { balanceOf } from '@shared/comminution/sieve/balance';
import { passingAt, passingCurve, sizeAt } from '@shared/comminution/sieve/curve';
import { gaudinSchuhmann, rosinRammler } from '@shared/comminution/sieve/sizeLaw';
import { sieveRequestSchema } from '@shared/schemas/calc/sieve';
import psd from '../../reference/data/published/psd_examples.json' with { type: 'json' };
import sieveSizes from '../../reference/data/published/sieve_sizes.json' with { type: 'json' };

type SieveRequest = z.input<typeof sieveRequestSchema>;
const sieveAnswer = (input: SieveRequest) => answerOf(sieveRequestSchema.parse(input));

const handout = psd.examples[0]!;
const doll = psd.examples[1]!;

function request(more: Partial<SieveRequest> = {}): SieveRequest {
  const sieves = [8, 4, 2, 1, 0.5, 0.25, 0.125].map((apertureMm, i) => ({
    apertureMm,
    retainedG: [0, 20.1, 59.9, 80, 60, 40, 20][i]!,
  }));
  return { feedMassG: 300.2, beforeSievingG: 299.6, sieves, panG: 19.2, ...more };
}

describe('sieve curve', () => {
  // Wills & Napier-Munn (2006), Wills' Mineral Processing Technology, 7th ed., ch. 4; course handout CM2200
  const sieves = handout.sieve_um.map((um, i) => ({
    apertureMm: um / 1000,
    retainedG: handout.mass_g![i]!,
  }));
  const curve = passingCurve(sieves, handout.mass_g!.at(-1)!);

  it('gives the retained and passing shares of the 44 g textbook sieving', () => {
    curve.forEach((point, i) => {
      expect(point.passingPercent).toBeCloseTo(handout.cum_passing_computed![i]!, 9);
      // as printed, two decimals
      expect(Math.abs(point.passingPercent - handout.cum_passing_published![i]!)).toBeLessThan(
        0.007,
      );
    });
  });

  it.each(['P80', 'P50', 'P20'] as const)('finds its %s both ways', (name) => {
    const { semilog, loglog } = handout.interpolated_computed_here![name];
    const percent = Number(name.slice(1));
    expect(sizeAt(curve, percent, 'logSize')! * 1000).toBeCloseTo(semilog, 8);
    expect(sizeAt(curve, percent, 'logLog')! * 1000).toBeCloseTo(loglog, 8);
  });

  it('fits Rosin–Rammler and Gaudin–Schuhmann to it', () => {
    const points = curve;
    const rr = handout.rosin_rammler_fit_computed_here!;
    expect(rosinRammler(points)!.slope).toBeCloseTo(rr.n, 9);
    expect(rosinRammler(points)!.sizeMm * 1000).toBeCloseTo(rr.size_modulus_d632, 7);
    expect(rosinRammler(points)!.rSquared).toBeCloseTo(rr.r ** 2, 9);
    const gs = handout.gaudin_schuhmann_fit_computed_here!;
    const used = points.filter(({ sizeMm }) => gs.sieves_used.includes(Math.round(sizeMm * 1000)));
    expect(gaudinSchuhmann(used)!.slope).toBeCloseTo(gs.m, 9);
    expect(gaudinSchuhmann(used)!.sizeMm * 1000).toBeCloseTo(gs.k, 7);
  });

  it('fits Rosin–Rammler to the published regression', () => {
    // Doll (2012), Fitting Rosin–Rammler parameters to a sieve analysis, calc no. 1
    const points = doll.sieve_um.map((um, i) => ({
      sizeMm: um / 1000,
      passingPercent: 100 * (1 - doll.cum_retained_fraction![i]!),
    }));
    const model = rosinRammler(points)!;
    expect(model.slope).toBeCloseTo(doll.published!.n, 6);
    expect(model.sizeMm * 1000).toBeCloseTo(1 / doll.published!.DN_per_um, 2);
    expect(model.rSquared).toBeCloseTo(doll.published!.printed_R, 4);
  });

  it('reads the handbook example of log–log, log–linear between 2.0 and 2.8 mm', () => {
    const points = passingCurve(
      [
        { apertureMm: 2.8, retainedG: 10 },
        { apertureMm: 2, retainedG: 30 },
      ],
      60,
    );
    // common practice, no source
    expect(sizeAt(points, 80, 'logLog')).toBeCloseTo(2.539, 3);
    expect(sizeAt(points, 80, 'logSize')).toBeCloseTo(2.503, 2);
  });

  it('takes the apertures of ISO 565 R20/3 in any order', () => {
    const apertures = sieveSizes.iso_R20_3_principal_mm.values;
    const shuffled = [...apertures].reverse().map((apertureMm) => ({ apertureMm, retainedG: 1 }));
    expect(passingCurve(shuffled, 1).map(({ sizeMm }) => sizeMm)).toEqual(apertures);
  });

  it('is the same in kilograms and does not depend on the order of rows', () => {
    const masses = fc.array(fc.integer({ min: 0, max: 50_000 }), { minLength: 6, maxLength: 6 });
    fc.assert(
      fc.property(masses, fc.integer({ min: 1, max: 5000 }), (hundredths, pan) => {
        const sieves = hundredths.map((mass, i) => ({
          apertureMm: 2 ** (3 - i),
          retainedG: mass / 100,
        }));
        const a = passingCurve(sieves, pan / 100);
        const heavy = sieves.map((s) => ({ ...s, retainedG: s.retainedG * 1000 })).reverse();
        const b = passingCurve(heavy, pan * 10);
        a.forEach((point, i) => {
          expect(point.passingPercent).toBeCloseTo(b[i]!.passingPercent, 9);
          expect(point.passingPercent).toBeGreaterThanOrEqual(a[i + 1]?.passingPercent ?? 0);
        });
        const size = sizeAt(a, 50, 'logSize');
        if (size !== null) expect(passingAt(a, size, 'logSize')).toBeCloseTo(50, 6);
      }),
      { seed: 7, numRuns: 100 },
    );
  });
});

describe('mass balance', () => {
  // ASTM C136/C136M-14 §8.7: “more than 0.3 %” fails
  it.each(psd.mass_loss_rule.worked_checks_computed_here)(
    'judges $original_g g against $sum_after_g g',
    ({ original_g, sum_after_g, difference_percent, accept }) => {
      const balance = balanceOf(original_g, sum_after_g, { warn: 0.3, repeat: 1 });
      expect(balance.lossPercent).toBeCloseTo(-difference_percent, 9);
      expect(balance.verdict === 'holds').toBe(accept);
    },
  );

  it.each([
    [299.103, 'holds'],
    [299.1, 'holds'],
    [299.097, 'warn'],
    [297, 'warn'],
    [296.9, 'repeat'],
  ] as const)('300 g before, %d g after: %s', (after, verdict) => {
    expect(balanceOf(300, after, { warn: 0.3, repeat: 1 }).verdict).toBe(verdict);
  });

  it('adds in decimals', () => {
    expect(balanceOf(0.3, 0.1 + 0.2, { warn: 0, repeat: 1 })).toEqual({
      lossG: 0,
      lossPercent: 0,
      verdict: 'holds',
    });
  });
});

describe('sieve answer', () => {
  it('keeps the two balances apart', () => {
    const { balance } = sieveAnswer(request());
    expect(balance.treatment).toEqual({
      lossG: 0.6,
      lossPercent: expect.closeTo(0.199866755496, 9),
      verdict: 'holds',
    });
    expect(balance.sieving).toMatchObject({ lossG: 0.4, verdict: 'holds' });
  });

  it('gives only the overall balance when the product was not weighed before sieving', () => {
    const { balance } = sieveAnswer(request({ beforeSievingG: undefined }));
    expect(balance).toMatchObject({ treatment: null, sieving: null, overall: { lossG: 1 } });
  });

  it('never extrapolates: no number outside the stack, but a reason', () => {
    const answer = sieveAnswer(
      request({ passingAt: [2, 0.063, 16], percentiles: [80, 5], interpolation: 'logLog' }),
    );
    expect(answer.passing['2']).toBeCloseTo(73.26, 2);
    expect(answer.passing['0.063']).toBeNull();
    expect(answer.passing['16']).toBeNull();
    expect(answer.percentiles['80']).toBeGreaterThan(2);
    expect(answer.percentiles['5']).toBeNull();
    expect(answer.warnings.map(({ code }) => code)).toEqual(Array(3).fill('outside-stack'));
  });

  it('says so when more came out than went in', () => {
    const { balance, warnings } = sieveAnswer(request({ panG: 60 }));
    expect(balance.sieving?.verdict).toBe('repeat');
    expect(warnings[0]?.message).toMatch(/outweigh the product before sieving by 40.4 g/);
  });

  it('has no shares of nothing', () => {
    const empty = request().sieves.map((sieve) => ({ ...sieve, retainedG: 0 }));
    const answer = sieveAnswer(request({ sieves: empty, panG: 0, passingAt: [2] }));
    expect(answer.passing['2']).toBeNull();
    expect(answer.table[0]).toEqual({
      apertureMm: 8,
      retainedPercent: 0,
      cumulativePassingPercent: 0,
    });
    expect(answer.warnings[0]?.code).toBe('nothing-recovered');
  });

  it.each([
    [
      'a sieve twice',
      {
        sieves: [
          { apertureMm: 2, retainedG: 1 },
          { apertureMm: 2, retainedG: 2 },
        ],
      },
      /twice/,
    ],
    ['a negative mass', { panG: -1 }, /below 0 g/],
    ['a mass that is no number', { panG: 'NaN' as unknown as number }, /Enter the mass/],
    ['no sieve', { sieves: [] }, /at least one/],
    ['a feed of nothing', { feedMassG: 0 }, /above 0/],
  ])('refuses %s with a sentence', (_what, more, message) => {
    const parsed = sieveRequestSchema.safeParse(request(more));
    expect(parsed.success).toBe(false);
    expect(parsed.error?.issues[0]?.message).toMatch(message);
  });

  it('hints at a blinded sieve and at exchanged rows, which no balance sees', () => {
    const masses = [2, 8, 20, 38, 60, 75, 70, 55, 40, 28, 20];
    const sieves = [8, 5.6, 4, 2.8, 2, 1.4, 1, 0.71, 0.5, 0.355, 0.25].map((apertureMm, i) => ({
      apertureMm,
      retainedG: masses[i]!,
    }));
    const shapeOf = (change: (m: number[]) => void) => {
      const changed = [...masses];
      change(changed);
      return sieveAnswer(
        request({ sieves: sieves.map((s, i) => ({ ...s, retainedG: changed[i]! })), panG: 40 }),
      ).shape;
    };
    expect(shapeOf(() => undefined)).toEqual([]);
    expect(
      shapeOf((m) => {
        m[4]! += 0.45 * m[5]!;
        m[5]! *= 0.55;
      })[0],
    ).toMatchObject({ apertureMm: 2, message: expect.stringMatching(/blinded/) });
    expect(
      shapeOf((m) => {
        [m[3], m[6]] = [m[6]!, m[3]!];
      }).map(({ apertureMm }) => apertureMm),
    ).toEqual([2.8, 1]);
  });
});
