import type { Domain } from './frame';
import { tickStep } from './ticks';

/** The round domain that holds all values: from the tick at or below the lowest to the one at or above the highest. */
export function valueDomain(values: readonly number[], most = 4): Domain & { ticks: number[] } {
  const finite = values.filter((value) => Number.isFinite(value));
  const low = finite.length > 0 ? Math.min(...finite) : 0;
  const high = finite.length > 0 ? Math.max(...finite) : 1;
  const spread = high - low || Math.abs(high) || 1;
  const step = tickStep(spread, most);
  const from = Math.floor(low / step + 1e-9) * step;
  const to = Math.ceil((low + spread) / step - 1e-9) * step;
  const count = Math.round((to - from) / step);
  const ticks = Array.from({ length: count + 1 }, (_, k) =>
    Number((from + k * step).toPrecision(12)),
  );
  return { low: ticks[0]!, high: ticks.at(-1)!, ticks };
}
