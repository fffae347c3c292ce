import type { EnvelopeJson } from '../schemas/rig';
import { erectedCapacitanceNf } from '../schemas/rig';
import { SET_POINTS, type SettingJson, type SetPointKey } from '../schemas/setPoint';
import { isSettable } from '../stats/coding/snap';

/** Room for the rounding of a product, relative to the limit. */
const SLACK = 1e-9;

export interface BrokenLimit {
  readonly key: SetPointKey | 'field' | 'power';
  readonly message: string;
}

const figure = (value: number) => String(Number(value.toPrecision(4)));

function offDial(envelope: EnvelopeJson, setting: SettingJson): BrokenLimit[] {
  return SET_POINTS.flatMap(({ key, name, unit }): BrokenLimit[] => {
    const { min, max, step } = envelope[key];
    const value = setting[key];
    const u = unit && ` ${unit}`;
    if (value < min)
      return [{ key, message: `${name} ${value}${u} is below this rig’s ${min}${u}.` }];
    if (value > max)
      return [{ key, message: `${name} ${value}${u} is above this rig’s limit of ${max}${u}.` }];
    if (isSettable({ key, low: min, high: max, min, max, step }, value)) return [];
    return [
      {
        key,
        message: `${name} ${value}${u} cannot be dialled: the steps are ${step}${u} from ${min}${u}.`,
      },
    ];
  });
}

/**
 * The limits of the rig that a setting breaks, each as a sentence; empty when it can be dialled in.
 * Checked when planning, before freezing, at the bench and again when signing.
 */
export function brokenLimits(envelope: EnvelopeJson, setting: SettingJson): BrokenLimit[] {
  const { fieldMinKvPerMm, fieldMaxKvPerMm, chargingPowerW } = envelope;
  const broken = offDial(envelope, setting);
  const field = setting.voltage / setting.gap;
  const at = `${setting.voltage} kV over ${setting.gap} mm is ${figure(field)} kV/mm`;
  if (field > fieldMaxKvPerMm * (1 + SLACK))
    broken.push({ key: 'field', message: `${at}, above the limit of ${fieldMaxKvPerMm} kV/mm.` });
  if (field < fieldMinKvPerMm * (1 - SLACK))
    broken.push({
      key: 'field',
      message: `${at}: below ${fieldMinKvPerMm} kV/mm it does not discharge.`,
    });
  const powerW = 0.0005 * erectedCapacitanceNf(envelope) * setting.voltage ** 2 * setting.frequency;
  if (powerW > chargingPowerW * (1 + SLACK))
    broken.push({
      key: 'power',
      message: `${setting.voltage} kV at ${setting.frequency} Hz takes ${figure(powerW)} W; the charger gives ${chargingPowerW} W.`,
    });
  return broken;
}

/** What is wrong with the ranges of a Brief: outside the envelope, or with no corner that discharges. */
export function brokenRanges(
  envelope: EnvelopeJson,
  ranges: Readonly<Record<SetPointKey, { low: number; high: number }>>,
): BrokenLimit[] {
  const broken: BrokenLimit[] = [];
  for (const { key, name, unit } of SET_POINTS) {
    const { min, max } = envelope[key];
    const { low, high } = ranges[key];
    const u = unit && ` ${unit}`;
    if (low < min * (1 - SLACK))
      broken.push({ key, message: `${name} from ${low}${u} starts below this rig’s ${min}${u}.` });
    if (high > max * (1 + SLACK))
      broken.push({
        key,
        message: `${name} up to ${high}${u} goes above this rig’s limit of ${max}${u}.`,
      });
  }
  const highest = ranges.voltage.high / ranges.gap.low;
  const lowest = ranges.voltage.low / ranges.gap.high;
  if (highest < envelope.fieldMinKvPerMm)
    broken.push({
      key: 'field',
      message: `Even ${ranges.voltage.high} kV over ${ranges.gap.low} mm is only ${figure(highest)} kV/mm; below ${envelope.fieldMinKvPerMm} kV/mm nothing discharges.`,
    });
  if (lowest > envelope.fieldMaxKvPerMm)
    broken.push({
      key: 'field',
      message: `Even ${ranges.voltage.low} kV over ${ranges.gap.high} mm is ${figure(lowest)} kV/mm, above the limit of ${envelope.fieldMaxKvPerMm} kV/mm.`,
    });
  return broken;
}
