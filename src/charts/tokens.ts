/** The colours and type that a chart draws with, read from the tokens of the theme in force. */
export interface ChartTokens {
  readonly ink: string;
  readonly ink2: string;
  readonly ink3: string;
  readonly line: string;
  readonly lineStrong: string;
  readonly surface: string;
  readonly sunk: string;
  readonly accent: string;
  readonly caution: string;
  readonly map: readonly string[];
  readonly fontFamily: string;
}

export function readTokens(element: Element = document.documentElement): ChartTokens {
  const style = getComputedStyle(element);
  const read = (name: string) => style.getPropertyValue(`--${name}`).trim();
  return {
    ink: read('ink'),
    ink2: read('ink-2'),
    ink3: read('ink-3'),
    line: read('line'),
    lineStrong: read('line-strong'),
    surface: read('surface'),
    sunk: read('sunk'),
    accent: read('accent'),
    caution: read('caution-mark'),
    map: Array.from({ length: 9 }, (_, i) => read(`map-${i}`)),
    fontFamily: read('font-sans'),
  };
}
