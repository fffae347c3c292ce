import type { Grid } from '@/charts/grid';
import type { MapInput, MapRun } from '@/charts/map/mapInput';

/** An invented response over gap and voltage, for tests. */
const steps = (low: number, high: number, count: number) =>
  Array.from({ length: count }, (_, k) => low + ((high - low) * k) / (count - 1));

const GAPS = steps(16, 34, 61);
const VOLTAGES = steps(130, 180, 51);
const gapOf = (mm: number) => (mm - 25) / 9;
const voltageOf = (kv: number) => (kv - 155) / 25;

const gridOf = (fn: (kv: number, mm: number) => number): Grid =>
  VOLTAGES.map((kv) => GAPS.map((mm) => fn(kv, mm)));

export function passing(kv: number, mm: number, pulses = 40): number {
  const [v, g] = [voltageOf(kv), gapOf(mm)];
  const n = (2 * Math.log(pulses / 20)) / Math.log(3) - 1;
  const straight = 81.73 + 6.93 * v - 1.21 * g + 8.99 * n;
  return straight + 4.66 * v * g - 2.74 * v * n - 2.96 * v * v - 5.9 * g * g - 4.14 * n * n;
}

const energy = (kv: number, pulses = 40) => 1.48e-5 * kv * kv * pulses;
const fines = (kv: number, mm: number) =>
  6 + 0.9 * voltageOf(kv) - 0.3 * gapOf(mm) + 0.2 * voltageOf(kv) * gapOf(mm);
export const spread = (kv: number, mm: number) => {
  const [v, g] = [voltageOf(kv), gapOf(mm)];
  return Math.sqrt(0.12 + 0.16 * v ** 4 + 0.22 * g ** 4 + 0.12 * v * v * g * g);
};

const CENTRES = [0.3, -1.2, 0.1, 0.9, -2.1, 0.05].map((residualShare, k): MapRun => ({
  id: 2 + 3 * k,
  x: 25,
  y: 155,
  residualShare,
  onSlice: true,
}));
const CORNERS: readonly MapRun[] = [
  { id: 1, x: 28, y: 130, residualShare: 0.1, onSlice: true },
  { id: 18, x: 16, y: 130, residualShare: -1.5, onSlice: true },
  { id: 17, x: 34, y: 180, residualShare: -0.3, onSlice: true },
  ...[
    [20, 180],
    [27.9, 180],
    [34, 160],
    [18, 131],
    [22, 150],
    [17.9, 160],
  ].map(([x = 0, y = 0], k): MapRun => ({ id: 30 + k, x, y, residualShare: 1, onSlice: false })),
];

const z = gridOf(passing);

export const SAMPLE_MAP: MapInput = {
  x: { values: GAPS, label: 'Gap', unit: 'mm' },
  y: { values: VOLTAGES, label: 'Voltage', unit: 'kV' },
  z,
  unit: '%',
  limits: [
    {
      label: 'field limit 9 kV/mm',
      shortLabel: '9 kV/mm',
      margin: gridOf((kv, mm) => 9 * mm - kv),
    },
    {
      label: 'misfires below 4.5 kV/mm',
      shortLabel: '4.5 kV/mm',
      margin: gridOf((kv, mm) => kv - 4.5 * mm),
    },
  ],
  support: gridOf(spread),
  runs: [...CENTRES, ...CORNERS],
  goals: [
    { label: '80 %', values: z, level: 80, side: 'atLeast' },
    { label: 'fines 7 %', values: gridOf(fines), level: 7, side: 'atMost' },
    { label: '18 kWh/t', values: gridOf((kv) => energy(kv)), level: 18, side: 'atMost' },
  ],
  setPoint: { x: 26, y: 160 },
  section: { from: { x: 17.5, y: 134 }, to: { x: 32.5, y: 178 } },
};
