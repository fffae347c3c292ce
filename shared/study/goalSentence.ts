import type { ResponseJson } from '../schemas/response';

/** A goal in words, with its limits in the response's unit: "at least 80 %, best from 95 %". */
export function goalSentence(
  response: Pick<ResponseJson, 'aim' | 'low' | 'high' | 'target' | 'unit'>,
): string {
  const { aim, low, high, target, unit } = response;
  const figure = (value: number | null) => `${value ?? '—'}${unit && `\u202F${unit}`}`;
  switch (aim) {
    case 'maximise':
      return `at least ${figure(low)}, best from ${figure(high)}`;
    case 'minimise':
      return `at most ${figure(high)}, best below ${figure(low)}`;
    case 'target':
      return `${figure(target)}, between ${figure(low)} and ${figure(high)}`;
    case 'within':
      return `between ${figure(low)} and ${figure(high)}`;
    case 'observe':
      return 'observed, no goal';
  }
}
