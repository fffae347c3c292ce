const FACTORS = [1, 2, 2.5, 5, 10];

/** Round values inside the range, about as many as asked for: never more than one above it. */
export function roundTicks(low: number, high: number, most: number): number[] {
  if (!(high > low) || most < 1) return [low];
  const least = (high - low) / most;
  const power = 10 ** Math.floor(Math.log10(least));
  const step = (FACTORS.find((factor) => factor * power >= least * (1 - 1e-9)) ?? 10) * power;
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
