/** What a chart may use of the look: resolved colours, read once per theme. */
export const CHART_TOKENS = [
  'paper',
  'surface',
  'sunk',
  'line',
  'line-strong',
  'ink',
  'ink-2',
  'ink-3',
  'accent',
  'on-accent',
  'spark',
  'spark-halo',
  'stop',
  'focus',
  'veil',
  'isoline',
  'isolabel',
  'isolabel-on-dark',
  'series-1',
  'series-2',
  'series-3',
  'series-4',
  'series-5',
  'map-0',
  'map-1',
  'map-2',
  'map-3',
  'map-4',
  'map-5',
  'map-6',
  'map-7',
  'map-8',
] as const;

export type ChartToken = (typeof CHART_TOKENS)[number];
export type ChartTokens = Readonly<Record<ChartToken, string>>;

export const SANS = "'Fira Sans', 'Fira Sans Signs', system-ui, sans-serif";
export const MONO = "'Fira Mono', 'Fira Sans Signs', ui-monospace, monospace";

export const mapColour = (tokens: ChartTokens, band: number): string =>
  tokens[`map-${Math.max(0, Math.min(8, Math.round(band)))}` as ChartToken];
