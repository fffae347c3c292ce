import { SET_POINTS } from '@shared/schemas/setPoint';

/** "voltage^2:gap" as "V²·g". */
export function termSymbol(term: string): string {
  if (term === 'intercept') return '1';
  return term
    .split(':')
    .map((part) => {
      const [key = '', power] = part.split('^');
      const symbol = SET_POINTS.find((each) => each.key === key)?.symbol ?? key;
      return `${symbol}${power === '2' ? '²' : power ? `^${power}` : ''}`;
    })
    .join('·');
}
