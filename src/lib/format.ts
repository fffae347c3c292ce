/** Narrow no-break space between figure and unit, and between groups of three. */
export const NARROW = '\u202F';
export const MINUS = '\u2212';
/** What stands where a value is missing. */
export const MISSING = '—';

type Value = number | null | undefined;

const isNumber = (value: Value): value is number => typeof value === 'number' && isFinite(value);

/** Groups of three from five digits on: 7093 stays whole, 12 400 does not. */
function grouped(digits: string): string {
  return digits.length < 5 ? digits : digits.replace(/\B(?=(\d{3})+$)/g, NARROW);
}

/**
 * A figure as the screen shows it: fixed digits, true minus, an em dash when there is none. Without
 * `digits` the shortest form with at most six significant digits. The stored number is never touched.
 */
export function formatNumber(value: Value, digits?: number): string {
  if (!isNumber(value)) return MISSING;
  const text = digits === undefined ? shortest(Math.abs(value)) : Math.abs(value).toFixed(digits);
  const [whole = '', fraction] = text.split('.');
  const figure = grouped(whole) + (fraction === undefined ? '' : `.${fraction}`);
  return value < 0 && /[1-9]/.test(text) ? MINUS + figure : figure;
}

function shortest(value: number): string {
  const rounded = Number(value.toPrecision(6));
  return rounded !== 0 && (rounded < 1e-6 || rounded >= 1e15)
    ? rounded.toExponential()
    : String(rounded);
}

/** With its sign always: +6.9, −1.2, 0.0. */
export function formatSigned(value: Value, digits?: number): string {
  const figure = formatNumber(value, digits);
  return isNumber(value) && value > 0 && /[1-9]/.test(figure) ? `+${figure}` : figure;
}

/** “84.6 %” with a narrow no-break space; no unit after a missing value. */
export function formatQuantity(value: Value, unit: string, digits?: number): string {
  const figure = formatNumber(value, digits);
  return unit === '' || !isNumber(value) ? figure : figure + NARROW + unit;
}

/** “80.1 to 89.0”, an em dash when an end is missing. */
export function formatInterval(low: Value, high: Value, digits?: number): string {
  if (!isNumber(low) || !isNumber(high)) return MISSING;
  return `${formatNumber(low, digits)} to ${formatNumber(high, digits)}`;
}

/** Grams below a kilogram, kilograms from there on. */
export function formatMass(massG: Value): string {
  if (!isNumber(massG)) return MISSING;
  return Math.abs(massG) < 1000
    ? formatQuantity(massG, 'g', Number.isInteger(massG) ? 0 : 2)
    : formatQuantity(massG / 1000, 'kg', 2);
}

/** Tail probabilities: four decimals, and “< 0.0001” below that. */
export function formatProbability(value: Value): string {
  if (isNumber(value) && value < 0.0001) return `<${NARROW}0.0001`;
  return formatNumber(value, 4);
}

/** A share between 0 and 1 as per cent. */
export function formatPercent(share: Value, digits = 0): string {
  return formatQuantity(isNumber(share) ? share * 100 : share, '%', digits);
}
