/** U+202F, between a figure and its unit and between thousands. */
const THIN = '\u202F';
export const MISSING = '—';

/** A number for people: fixed decimals, true minus, thin spaces between thousands; an em dash for none. */
export function formatNumber(value: number | null | undefined, decimals = 1): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return MISSING;
  const fixed = Math.abs(value).toFixed(decimals);
  const [whole = '', fraction] = fixed.split('.');
  const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, THIN) : whole;
  const sign = value < 0 && Number(fixed) !== 0 ? '\u2212' : '';
  return `${sign}${grouped}${fraction === undefined ? '' : `.${fraction}`}`;
}

/** With as many digits as a spread supports: 3 significant ones unless told. */
export function formatSignificant(value: number | null | undefined, digits = 3): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return MISSING;
  if (value === 0) return '0';
  const magnitude = Math.floor(Math.log10(Math.abs(value)));
  if (magnitude >= 6 || magnitude < -4)
    return value.toExponential(digits - 1).replace('-', '\u2212');
  return formatNumber(value, Math.max(0, digits - 1 - magnitude));
}

/** A setting or limit as it was entered: no more digits than it has. */
export function formatPlain(value: number | null | undefined): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return MISSING;
  return String(Number(value.toPrecision(12))).replace('-', '\u2212');
}

export function withUnit(figure: string, unit: string): string {
  return unit === '' || figure === MISSING ? figure : `${figure}${THIN}${unit}`;
}

/** "80.1 to 89.0". */
export function formatInterval(
  low: number | null | undefined,
  high: number | null | undefined,
  decimals = 1,
): string {
  if (low === null || low === undefined || high === null || high === undefined) return MISSING;
  return `${formatNumber(low, decimals)} to ${formatNumber(high, decimals)}`;
}

export function formatP(p: number | null | undefined): string {
  if (p === null || p === undefined) return MISSING;
  if (p < 0.0001) return '< 0.0001';
  return p < 0.01 ? p.toFixed(4) : p.toFixed(3);
}

/** Grams below a kilogram, kilograms above. */
export function formatMass(massG: number): string {
  return massG >= 1000
    ? withUnit(formatNumber(massG / 1000, 2), 'kg')
    : withUnit(formatPlain(Math.round(massG * 100) / 100), 'g');
}

/** "12 h 06 min" or "35 s". */
export function formatDuration(seconds: number): string {
  if (seconds < 90) return withUnit(formatNumber(seconds, 0), 's');
  const minutes = Math.round(seconds / 60);
  if (minutes < 60) return withUnit(String(minutes), 'min');
  const rest = String(minutes % 60).padStart(2, '0');
  return `${withUnit(String(Math.floor(minutes / 60)), 'h')} ${withUnit(rest, 'min')}`;
}

/** Sieve sizes: mm, and µm under 0.1 mm; 0 is the pan. */
export function formatAperture(apertureMm: number): string {
  if (apertureMm === 0) return 'pan';
  return apertureMm < 0.1
    ? withUnit(formatPlain(Math.round(apertureMm * 1e6) / 1000), 'µm')
    : withUnit(formatPlain(apertureMm), 'mm');
}

const DAY = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });
const MOMENT = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  hour: '2-digit',
  minute: '2-digit',
});
export const formatDay = (iso: string) => DAY.format(new Date(iso));
export const formatMoment = (iso: string) => MOMENT.format(new Date(iso));

/** Decimals that a response's unit and size ask for. */
export function decimalsFor(value: number | null): number {
  if (value === null) return 1;
  const size = Math.abs(value);
  return size >= 100 ? 0 : size >= 10 ? 1 : 2;
}
