/** Balances and dials show decimals: 12 digits are kept, the binary dust of 0.1 + 0.2 is not. */
const DIGITS = 12;

/** A number without binary dust, for sums and differences of readings in one unit. */
function withoutDust(value: number): number {
  return Number(value.toPrecision(DIGITS));
}

/**
 * The sum of readings, in their unit, without binary dust. Compensated, so that the order of the
 * readings does not show.
 *
 * @see Neumaier (1974), Rundungsfehleranalyse einiger Verfahren zur Summation, ZAMM 54: 39–51.
 */
export function sumOf(values: readonly number[]): number {
  let sum = 0;
  let lost = 0;
  for (const value of values) {
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return withoutDust(sum + lost);
}

/**
 * The difference of two readings, in their unit, without binary dust: digits beyond the 12th of the
 * larger reading are no reading.
 */
export function differenceOf(a: number, b: number): number {
  const larger = Math.max(Math.abs(a), Math.abs(b));
  const decimals = DIGITS - 1 - Math.floor(Math.log10(larger || 1));
  return withoutDust(Math.round((a - b) * 10 ** decimals) / 10 ** decimals);
}
