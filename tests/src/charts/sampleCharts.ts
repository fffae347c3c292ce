import type { InfluencePoint } from '@/charts/influenceOption';
import type { ResidualPoint } from '@/charts/residualOption';
import type { SectionInput } from '@/charts/sectionOption';
import type { SieveCurveInput } from '@/charts/sieveCurveOption';
import type { TradeOffInput } from '@/charts/tradeOffOption';
import { passing, spread } from './sampleMap';

/** Invented numbers for tests. */
const along = (count: number) => Array.from({ length: count + 1 }, (_, k) => k / count);

export const SECTION: SectionInput = {
  name: 'Passing 2 mm, %',
  x: { unit: 'mm', digits: 1 },
  y: { unit: 'kV', digits: 0 },
  points: along(80).map((share) => {
    const [x, y] = [17.5 + 15 * share, 134 + 44 * share];
    const mean = passing(y, x);
    const half = 2 * 1.86 * spread(y, x);
    const wide = 2 * 1.86 * Math.sqrt(1 + spread(y, x) ** 2);
    return {
      share,
      x,
      y,
      mean,
      ciLow: mean - half,
      ciHigh: mean + half,
      piLow: mean - wide,
      piHigh: mean + wide,
    };
  }),
  runs: [
    { id: 4, share: 0.33, value: 79.5, residualShare: -1.1 },
    { id: 2, share: 0.48, value: 83.4, residualShare: 0.1 },
    { id: 5, share: 0.5, value: 86.4, residualShare: 1.8 },
    { id: 9, share: 0.95, value: 85.6, residualShare: 0 },
  ],
  limits: [{ value: 80, side: 'atLeast' }],
  setPointShare: 0.58,
};

const SIEVES: readonly [number, number][] = [
  [16, 100],
  [11.2, 99.6],
  [8, 98.7],
  [5.6, 96.7],
  [4, 93.6],
  [2.8, 88.2],
  [2, 80.1],
  [1.4, 69],
  [1, 56.9],
  [0.5, 33],
  [0.25, 16.2],
  [0.125, 7.24],
  [0.063, 3.4],
];
const FEED: readonly [number, number][] = [
  [16, 0.5],
  [22.4, 2.5],
  [31.5, 9],
  [45, 38],
  [56, 78],
  [63, 97],
  [75, 100],
];
const curve = (pairs: readonly [number, number][]) =>
  pairs.map(([openingMm, passingPercent]) => ({ openingMm, passingPercent }));

export const SIEVE_CURVE: SieveCurveInput = {
  points: curve(SIEVES),
  others: [{ label: 'feed', isFeed: true, points: curve(FEED) }],
  marked: [{ openingMm: 2, passingPercent: 80.1 }],
};

const RESIDUALS = [
  -0.4, -0.3, 0.3, 2.5, -0.9, 0, -0.1, -0.7, -2.1, 0, 0.6, 1.4, 0.4, 0.8, 2, -0.3, -0.5, 1.1, -0.1,
  -2.8, -0.4,
];
const FITTED = [
  53, 58, 64, 85, 67, 80, 81, 70, 87, 79, 82, 80, 76, 77, 71, 88, 60, 82, 81, 79.5, 81.5,
];

export const AGAINST_FITTED: readonly ResidualPoint[] = RESIDUALS.map((residual, k) => ({
  id: k + 1,
  x: FITTED[k] ?? 80,
  residual,
}));
export const IN_ORDER: readonly ResidualPoint[] = RESIDUALS.map((residual, k) => ({
  id: k + 1,
  x: k + 1,
  residual,
}));

/** A crude normal quantile, good enough for a picture. */
const quantile = (p: number) => 4.91 * (p ** 0.14 - (1 - p) ** 0.14);
const SCORES = RESIDUALS.map((_, k) => quantile((k + 0.625) / (RESIDUALS.length + 0.25)));
export const AGAINST_NORMAL: readonly ResidualPoint[] = [...RESIDUALS]
  .sort((a, b) => a - b)
  .map((residual, k) => ({ id: k + 1, x: SCORES[k] ?? 0, residual }));
export const NORMAL_BAND = SCORES.map((x) => ({
  x,
  low: x - 0.55 - 0.25 * x * x * 0.6,
  high: x + 0.55 + 0.25 * x * x * 0.6,
}));

export const INFLUENCE: readonly InfluencePoint[] = RESIDUALS.map((residual, k) => ({
  id: k + 1,
  order: k + 1,
  cook: k === 3 ? 0.86 : k === 19 ? 0.94 : Math.abs(residual) * 0.07,
  leverage: 0.35 + ((k * 7) % 11) * 0.035,
}));

export const SPREADS = {
  fractions: along(50),
  spreads: along(50).map((share) => 0.38 + 0.28 * share + 0.3 * share ** 12),
  highest: 1.4,
};

const lattice = along(25).flatMap((v) =>
  along(18).flatMap((g) =>
    along(12).map((n) => {
      const [kv, mm, pulses] = [130 + 50 * v, 16 + 18 * g, 20 + 40 * n];
      return {
        x: 1.48e-5 * kv * kv * pulses,
        y: passing(kv, mm, pulses),
        holds: v + n < 1.2,
      };
    }),
  ),
);
const shown = lattice.filter(({ x, y }) => y > 64 && x < 26);
const front = [...shown]
  .sort((a, b) => a.x - b.x)
  .reduce<{ x: number; y: number }[]>(
    (best, point) => (point.y > (best.at(-1)?.y ?? -Infinity) ? [...best, point] : best),
    [],
  );

export const TRADE_OFF: TradeOffInput = {
  x: { name: 'Specific energy, kWh/t', limits: [{ value: 18, side: 'atMost' }] },
  y: { name: 'Passing 2 mm, %', limits: [{ value: 80, side: 'atLeast' }] },
  points: shown,
  front,
  candidates: [
    { letter: 'A', x: 14.5, y: 84.6, isReferred: true },
    { letter: 'B', x: 14.3, y: 83, isReferred: false },
    { letter: 'C', x: 12.7, y: 82.4, isReferred: false },
    { letter: 'D', x: 16.3, y: 86, isReferred: false },
    { letter: 'E', x: 12.9, y: 81.9, isReferred: false },
  ],
};
