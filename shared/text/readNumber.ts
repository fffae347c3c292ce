import { knownUnits, unitFactor } from './units';

export type DecimalSign = 'auto' | 'point' | 'comma';

/** A reading, an empty field, or what is wrong with the text in one sentence. */
export type Reading =
  | { readonly kind: 'number'; readonly value: number; readonly note: string | null }
  | { readonly kind: 'empty' }
  | { readonly kind: 'problem'; readonly message: string };

const SPACES = /[\s\u00A0\u2007\u2009\u202F'’]/g;
const SHAPE =
  /^([+-]?)([\d.,\s\u00A0\u2007\u2009\u202F'’]*\d|\d*[.,]\d+)[.,]?(?:[eE]([+-]?\d{1,3}))?\s*(.*)$/u;
const MAX_DIGITS = 15;

const problem = (message: string): Reading => ({ kind: 'problem', message });

/** Things that are written where a number should be, and what to do about each. */
const NOT_A_NUMBER: readonly { pattern: RegExp; say: (text: string) => string }[] = [
  {
    pattern: /^[<>≤≥]/,
    say: (t) => `‘${t}’ is a limit, not a reading. Enter the number that the instrument showed.`,
  },
  {
    pattern: /^[~≈]/,
    say: (t) => `‘${t}’ is an estimate. Enter the number that the instrument showed.`,
  },
  { pattern: /±|\+\/-/, say: (t) => `‘${t}’ holds two numbers. Enter the reading alone.` },
  {
    pattern: /^[+-]?\d+\s*\/\s*\d/,
    say: (t) => `‘${t}’ is a fraction. Enter it as a decimal, like 0.5.`,
  },
  { pattern: /^0x/i, say: (t) => `‘${t}’ is not a number like 12.5.` },
  {
    pattern: /mesh$/i,
    say: (t) => `‘${t}’ depends on the sieve standard. Enter the opening in mm.`,
  },
  { pattern: /^[-–—]$|^n\/?a$/i, say: () => 'Leave the field empty when nothing was measured.' },
];

interface Decimal {
  readonly whole: string;
  readonly fraction: string;
  readonly isAmbiguous: boolean;
}

/** Groups of three behind a first group of one to three. */
const isGrouped = (text: string, sign: string) => {
  const [first = '', ...rest] = text.split(sign);
  return /^\d{1,3}$/.test(first) && rest.length > 0 && rest.every((group) => /^\d{3}$/.test(group));
};

function splitAt(text: string, sign: string, group: string): Decimal | null {
  const parts = text.split(sign);
  if (parts.length > 2) return null;
  const [whole = '', fraction = ''] = parts;
  const isWhole = !whole.includes(group) || isGrouped(whole, group);
  if (!isWhole || !/^\d*$/.test(fraction)) return null;
  return { whole: whole.replaceAll(group, ''), fraction, isAmbiguous: false };
}

/** Only commas or only points: one of them is a decimal sign, several separate thousands. */
function splitAtOnly(text: string, sign: ',' | '.'): Decimal | null {
  if (text.split(sign).length > 2)
    return isGrouped(text, sign)
      ? { whole: text.replaceAll(sign, ''), fraction: '', isAmbiguous: false }
      : null;
  const split = splitAt(text, sign, sign === ',' ? '.' : ',');
  // 1,234 could mean twelve hundred; a leading zero or any other count of digits could not
  const isAmbiguous = sign === ',' && isGrouped(text, sign) && !text.startsWith('0');
  return split && { ...split, isAmbiguous };
}

/** Which sign is the decimal one: the last when both occur, else the only one. */
function splitDecimal(text: string, decimal: DecimalSign): Decimal | null {
  if (decimal === 'comma') return splitAt(text, ',', '.');
  if (decimal === 'point') return splitAt(text, '.', ',');
  const point = text.lastIndexOf('.');
  const comma = text.lastIndexOf(',');
  if (point < 0 && comma < 0) return { whole: text, fraction: '', isAmbiguous: false };
  if (point < 0 || comma < 0) return splitAtOnly(text, point < 0 ? ',' : '.');
  return comma > point ? splitAt(text, ',', '.') : splitAt(text, '.', ',');
}

const trimmed = (value: number) => String(Number(value.toPrecision(MAX_DIGITS)));

interface Shape {
  readonly sign: string;
  readonly digits: Decimal;
  readonly exponent: string;
  readonly unit: string;
}

function readShape(text: string, decimal: DecimalSign): Shape | null {
  const [, sign = '', body = '', exponent = '', unit = ''] = SHAPE.exec(text) ?? [];
  const digits = body === '' ? null : splitDecimal(body.replace(SPACES, ''), decimal);
  return digits && { sign, digits, exponent, unit: unit.trim() };
}

function noteOf(text: string, shape: Shape, value: number, kept: string): string | null {
  const shown = `${trimmed(value)}${kept && ` ${kept}`}`;
  if (shape.unit !== '' && unitFactor(kept, shape.unit) !== 1)
    return `${shown} (you typed ${text})`;
  if (shape.digits.isAmbiguous || shape.exponent !== '') return `read as ${shown}`;
  return null;
}

/** In the kept unit; a conversion keeps 15 digits, so that 0.3 cm is 3 mm. Never −0. */
function scaledValue({ sign, digits, exponent }: Shape, factor: number): number {
  const { whole, fraction } = digits;
  const value = Number(`${sign}${whole || '0'}.${fraction || '0'}e${exponent || '0'}`);
  return (factor === 1 ? value : Number((value * factor).toPrecision(MAX_DIGITS))) + 0;
}

/**
 * Reads a number as people type it: decimal comma or point, thin spaces and apostrophes between
 * thousands, a unit behind it. A number is never changed silently: whatever could be meant otherwise
 * comes back with a note, and what cannot be read with a sentence.
 *
 * @param text what was typed.
 * @param unit the unit that the field keeps ('' for a bare number); others of its family are converted.
 * @param decimal the decimal sign when the source has said which; `auto` reads either.
 */
export function readNumber(text: string, unit = '', decimal: DecimalSign = 'auto'): Reading {
  const typed = text.trim();
  if (typed === '') return { kind: 'empty' };
  const known = NOT_A_NUMBER.find(({ pattern }) => pattern.test(typed));
  if (known) return problem(known.say(typed));
  const shape = readShape(typed.replace(/^[−–]/, '-'), decimal);
  if (!shape) return problem(`‘${typed}’ is not a number like 12.5.`);
  const factor = shape.unit === '' ? 1 : unitFactor(unit, shape.unit);
  if (factor === null)
    return problem(
      `The unit ‘${shape.unit}’ is not known here. Use ${knownUnits(unit).join(', ') || 'a bare number'}.`,
    );
  const value = scaledValue(shape, factor);
  if (!Number.isFinite(value)) return problem(`‘${typed}’ is too large to be a reading.`);
  return { kind: 'number', value, note: noteOf(typed, shape, value, unit) };
}
