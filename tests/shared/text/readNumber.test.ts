import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readNumber } from '@shared/text/readNumber';

const value = (text: string, unit = 'g') => {
  const reading = readNumber(text, unit);
  return reading.kind === 'number' ? reading.value : reading.kind;
};

describe('readNumber', () => {
  it.each([
    ['12,5', 12.5],
    ['12.5', 12.5],
    [' 12,5 ', 12.5],
    ['12,5 g', 12.5],
    ['12.5g', 12.5],
    ['1.234,5', 1234.5],
    ['1,234.5', 1234.5],
    ['1 234,5', 1234.5],
    ["1'234.5", 1234.5],
    ['1\u202F234.5', 1234.5],
    ['1.234.567', 1234567],
    ['0,125', 0.125],
    ['−5', -5],
    ['-0', 0],
    ['.5', 0.5],
    ['5.', 5],
    ['0.5 kg', 500],
    ['250 mg', 0.25],
    ['1e3', 1000],
  ])('B-01, B-02, B-04: reads %s', (text, expected) => {
    expect(value(text)).toBe(expected);
  });

  it.each([
    ['500 µm', 0.5],
    ['500 um', 0.5],
    ['500 μm', 0.5],
    ['0.5 mm', 0.5],
    ['63µm', 0.063],
  ])('B-04: reads the size %s in mm', (text, expected) => {
    expect(value(text, 'mm')).toBe(expected);
  });

  it('B-03: says how it read a number that could mean two', () => {
    expect(readNumber('1,234', 'g')).toEqual({
      kind: 'number',
      value: 1.234,
      note: 'read as 1.234 g',
    });
    expect(readNumber('1,234', 'g', 'point')).toMatchObject({ value: 1234 });
    expect(readNumber('1.234', 'g', 'comma')).toMatchObject({ value: 1234 });
    expect(readNumber('12,5', 'g')).toMatchObject({ note: null });
  });

  it('B-04: repeats what was typed when it converted', () => {
    expect(readNumber('0.5 kg', 'g')).toMatchObject({ note: '500 g (you typed 0.5 kg)' });
  });

  it('B-05: an empty field is empty, not zero', () => {
    expect(readNumber('  ')).toEqual({ kind: 'empty' });
  });

  it.each([
    'NaN',
    'Infinity',
    '1e999',
    '0x1F',
    '-',
    'n/a',
    '<0.1',
    '~12',
    '12±1',
    '1/2',
    '12 gr',
    '35 mesh',
    '1.2.3',
    '1,2,3',
    '12,34.5.6',
    'twelve',
  ])('B-05, B-06: refuses %s with a sentence', (text) => {
    const reading = readNumber(text, 'g');
    expect(reading.kind).toBe('problem');
    const message = reading.kind === 'problem' ? reading.message : '';
    expect(message).toMatch(/^[A-Z‘].*\.$/);
    expect(message).not.toMatch(/invalid|NaN \(|undefined|null/);
  });

  it('gives back every finite number that is written out plainly', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 }),
        (number) => {
          const text = String(number);
          fc.pre(!text.includes('e'));
          expect(value(text)).toBe(number === 0 ? 0 : number);
          expect(value(text.replace('.', ','))).toBe(number === 0 ? 0 : number);
        },
      ),
    );
  });
});
