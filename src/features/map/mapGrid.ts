import type { ConstraintInput } from '@shared/schemas/calc/common';
import type { EnvelopeJson } from '@shared/schemas/rig';
import { setPointOf, type SettingJson, type SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence } from '@shared/study/requests';
import type { Axes } from '@/charts/grid';
import { formatPlain, withUnit } from '@/lib/format';
import type { SectionEnds, SectionWay } from './SectionPanel';

export type Range = readonly [number, number];

const COLUMNS = 61;
const ROWS = 51;

const evenly = (low: number, high: number, n: number) =>
  Array.from({ length: n }, (_, i) => low + ((high - low) * i) / (n - 1));

/** The Brief’s range of a set-point. */
export function rangeOf({ brief }: Evidence, key: SetPointKey): Range {
  const factor = brief.factors.find((each) => each.key === key);
  return [factor?.low ?? 0, factor?.high ?? 1];
}

/** The lattice that the map is drawn from: both ranges, ends included. */
export const latticeOf = (x: Range, y: Range): Axes => ({
  x: evenly(...x, COLUMNS),
  y: evenly(...y, ROWS),
});

/** Where A and A′ lie. */
export function sectionEnds(
  way: SectionWay,
  x: Range,
  y: Range,
  at: readonly [number, number],
): SectionEnds {
  if (way === 'across')
    return [
      [x[0], at[1]],
      [x[1], at[1]],
    ];
  if (way === 'up')
    return [
      [at[0], y[0]],
      [at[0], y[1]],
    ];
  const inset = (range: Range, share: number) => range[0] + share * (range[1] - range[0]);
  return [
    [inset(x, 0.08), inset(y, 0.08)],
    [inset(x, 0.92), inset(y, 0.96)],
  ];
}

/** "40 pulses", "2 Hz": what a slice is held at. */
export const heldWords = (setting: SettingJson) => (key: SetPointKey) => {
  const { name, unit } = setPointOf(key);
  const figure = withUnit(formatPlain(setting[key]), unit);
  return unit === '' ? `${figure} ${name.toLowerCase()}` : figure;
};

/** A limit of the rig as it stands along its edge on the map. */
export const limitName = (envelope: EnvelopeJson) => (constraint: ConstraintInput) => {
  if (
    constraint.terms['voltage^2:frequency'] !== undefined ||
    constraint.terms['voltage^2'] !== undefined
  )
    return `charger ${withUnit(formatPlain(envelope.chargingPowerW), 'W')}`;
  return constraint.op === '<='
    ? `field limit ${withUnit(formatPlain(envelope.fieldMaxKvPerMm), 'kV/mm')}`
    : `misfires below ${withUnit(formatPlain(envelope.fieldMinKvPerMm), 'kV/mm')}`;
};
