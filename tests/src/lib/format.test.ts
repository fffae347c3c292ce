import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatInterval,
  formatMass,
  formatNumber,
  formatProbability,
  formatQuantity,
  formatSigned,
} from '@/lib/format';
import { formatClock, formatHours } from '@/lib/formatDate';

describe('formatNumber', () => {
  it.each([
    [84.56, 1, '84.6'],
    [-1.21, 2, '−1.21'],
    [-0.001, 1, '0.0'],
    [17093, 0, '17\u202F093'],
    [7093, 0, '7093'],
    [1234567.891, 1, '1\u202F234\u202F567.9'],
    [0.30000000000000004, undefined, '0.3'],
    [null, 1, '—'],
    [NaN, 1, '—'],
    [Infinity, 1, '—'],
  ])('writes %s with %s digits as %s', (value, digits, text) => {
    expect(formatNumber(value, digits)).toBe(text);
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

describe('units and intervals', () => {
  it('keeps figure and unit together and gives a missing value no unit', () => {
    expect(formatQuantity(84.6, '%', 1)).toBe('84.6\u202F%');
    expect(formatQuantity(null, '%', 1)).toBe('—');
  });

  it('writes an interval with “to” and a missing end as missing', () => {
    expect(formatInterval(80.1, 89, 1)).toBe('80.1 to 89.0');
    expect(formatInterval(-0.4, 0.2, 1)).toBe('−0.4 to 0.2');
    expect(formatInterval(null, 89, 1)).toBe('—');
  });

  it('weighs in grams up to a kilogram', () => {
    expect(formatMass(300.2)).toBe('300.20\u202Fg');
    expect(formatMass(900)).toBe('900\u202Fg');
    expect(formatMass(12_400)).toBe('12.40\u202Fkg');
  });

  it('signs effects and floors small probabilities', () => {
    expect(formatSigned(6.93, 1)).toBe('+6.9');
    expect(formatSigned(0.01, 1)).toBe('0.0');
    expect(formatProbability(0.00001)).toBe('<\u202F0.0001');
    expect(formatProbability(0.5725)).toBe('0.5725');
  });

  it('writes seconds as a clock and minutes as hours', () => {
    expect(formatClock(134)).toBe('2:14');
    expect(formatClock(3725)).toBe('1:02:05');
    expect(formatHours(726)).toBe('12\u202Fh\u202F06');
    expect(formatHours(45)).toBe('45\u202Fmin');
  });
});
