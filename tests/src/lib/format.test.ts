import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatAperture,
  formatDuration,
  formatInterval,
  formatMass,
  formatNumber,
  formatP,
  formatPlain,
  formatSignificant,
  withUnit,
} from '@/lib/format';

describe('formatNumber', () => {
  it.each([
    [84.56, 1, '84.6'],
    [-1.21, 2, '−1.21'],
    [-0.001, 1, '0.0'],
    [17093, 0, '17\u202F093'],
    [7093, 0, '7093'],
    [1234567.891, 1, '1\u202F234\u202F567.9'],
    [null, 1, '—'],
    [NaN, 1, '—'],
    [Infinity, 1, '—'],
  ])('writes %s with %s decimals as %s', (value, decimals, text) => {
    expect(formatNumber(value, decimals)).toBe(text);
  });

  it('never writes a hyphen for a minus nor a sign before zero', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, min: -1e6, max: 1e6 }), fc.nat(4), (value, digits) => {
        const text = formatNumber(value, digits);
        expect(text).not.toContain('-');
        if (!/[1-9]/.test(text)) expect(text).not.toContain('−');
      }),
    );
  });
});

describe('units, intervals and times', () => {
  it('keep figure and unit together and give a missing value no unit', () => {
    expect(withUnit('84.6', '%')).toBe('84.6\u202F%');
    expect(withUnit('40', '')).toBe('40');
    expect(withUnit('—', '%')).toBe('—');
  });

  it('write an interval with “to”, and a missing end as missing', () => {
    expect(formatInterval(80.1, 89, 1)).toBe('80.1 to 89.0');
    expect(formatInterval(-0.4, 0.2, 1)).toBe('−0.4 to 0.2');
    expect(formatInterval(null, 89, 1)).toBe('—');
  });

  it('weigh in grams up to a kilogram', () => {
    expect(formatMass(300.2)).toBe('300.2\u202Fg');
    expect(formatMass(12_400)).toBe('12.40\u202Fkg');
  });

  it('give no more digits than a value has or deserves', () => {
    expect(formatPlain(0.1 + 0.2)).toBe('0.3');
    expect(formatPlain(-5)).toBe('−5');
    expect(formatSignificant(0.056_78)).toBe('0.0568');
    expect(formatSignificant(0)).toBe('0');
    expect(formatP(0.000_01)).toBe('< 0.0001');
    expect(formatP(0.0123)).toBe('0.012');
  });

  it('write times and sieves as the lab says them', () => {
    expect(formatDuration(35)).toBe('35\u202Fs');
    expect(formatDuration(43_560)).toBe('12\u202Fh 06\u202Fmin');
    expect(formatAperture(0.063)).toBe('63\u202Fµm');
    expect(formatAperture(2)).toBe('2\u202Fmm');
    expect(formatAperture(0)).toBe('pan');
  });
});
