import { describe, expect, it } from 'vitest';
import { noncentralFUpper } from '@shared/stats/distributions/noncentralF';
import { fQuantile, normalQuantile, tQuantile } from '@shared/stats/distributions/quantiles';
import { chiSquareTails, fTails, normalTails, tTails } from '@shared/stats/distributions/tails';
import reference from './data/distributions.json' with { type: 'json' };

/** Source: 25-digit values from arbitrary-precision arithmetic (see the file's own `source`). */

const error = (value: number, text: string) => {
  const exact = Number(text);
  return exact === 0 ? Math.abs(value) : Math.abs(value - exact) / Math.abs(exact);
};

/** The largest relative error over a table, with the row that has it. */
function worst<T>(rows: readonly T[], errorOf: (row: T) => number) {
  let largest = { value: -1, row: '' };
  for (const row of rows) {
    const value = errorOf(row);
    if (!(value <= largest.value)) largest = { value, row: JSON.stringify(row) };
  }
  return largest;
}

describe('distribution tails to 25 digits', () => {
  it('F: both tails to 1e-10, down to 1e-30', () => {
    const found = worst(reference.fTail, ({ d1, d2, x, sf, cdf }) => {
      const { upper, lower } = fTails(x, d1, d2);
      return Math.max(error(upper, sf), error(lower, cdf));
    });
    expect(found.value, found.row).toBeLessThan(1e-10);
  });

  it('t', () => {
    const found = worst(reference.tTail, ({ v, x, sf, cdf }) => {
      const { upper, lower } = tTails(x, v);
      return Math.max(error(upper, sf), error(lower, cdf));
    });
    expect(found.value, found.row).toBeLessThan(1e-10);
  });

  it('χ²', () => {
    const found = worst(reference.chiSquareTail, ({ v, x, sf, cdf }) => {
      const { upper, lower } = chiSquareTails(x, v);
      return Math.max(error(upper, sf), error(lower, cdf));
    });
    expect(found.value, found.row).toBeLessThan(1e-10);
  });

  it('normal, down to 1e-316', () => {
    const found = worst(reference.normalTail, ({ x, cdf }) => error(normalTails(x).lower, cdf));
    expect(found.value, found.row).toBeLessThan(1e-10);
  });

  it('quantiles of F, t and the normal', () => {
    const f = worst(reference.fQuantile, ({ d1, d2, p, q }) => error(fQuantile(p, d1, d2), q));
    expect(f.value, f.row).toBeLessThan(1e-9);
    const t = worst(reference.tQuantile, ({ v, p, q }) =>
      Number(q) === 0 ? Math.abs(tQuantile(p, v)) : error(tQuantile(p, v), q),
    );
    expect(t.value, t.row).toBeLessThan(1e-9);
    const z = worst(reference.normalQuantile, ({ p, q }) =>
      Number(q) === 0 ? Math.abs(normalQuantile(p)) : error(normalQuantile(p), q),
    );
    expect(z.value, z.row).toBeLessThan(1e-9);
  });

  it('power of the noncentral F', () => {
    const found = worst(reference.noncentralF, ({ d1, d2, ncp, x, power }) =>
      error(noncentralFUpper(x, d1, d2, ncp), power),
    );
    expect(found.value, found.row).toBeLessThan(1e-9);
  });
});
