const FACTORS = [1, 2, 2.5, 5, 10];

/** The round step that divides a range into at most so many gaps. */
export function tickStep(range: number, mostGaps: number): number {
  const least = range / mostGaps;
  const power = 10 ** Math.floor(Math.log10(least));
  return (FACTORS.find((factor) => factor * power >= least * (1 - 1e-9)) ?? 10) * power;
}

/** The round values inside a range, with at most so many gaps between them. */
export function roundTicks(low: number, high: number, mostGaps: number): number[] {
  if (!(high > low)) return [low];
  const step = tickStep(high - low, mostGaps);
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, k) =>
    Number(((first + k) * step).toPrecision(12)),
  );
}

/** Every second of the labels, from the first, where they would touch. */
export function thinned<Value>(values: readonly Value[], isNarrow: boolean): Value[] {
  return values.filter((_, index) => !isNarrow || index % 2 === 0);
}
