import { erectedCapacitanceNf } from '@shared/schemas/rig';
import type { SettingJson, SetPointKey } from '@shared/schemas/setPoint';
import type { Evidence } from '@shared/study/requests';
import type { Axes } from '@/charts/grid';
import type { MapLimit } from '@/charts/map/mapInput';
import { formatPlain, withUnit } from '@/lib/format';

interface Limit {
  readonly label: string;
  readonly shortLabel: string;
  /** Positive where the rig can be set so. */
  readonly margin: (setting: SettingJson) => number;
}

/** The limits of a rig that bind several set-points at once, with the names that stand along their edges. */
function limitsOf({ envelope }: Evidence): Limit[] {
  const { fieldMaxKvPerMm, fieldMinKvPerMm, chargingPowerW } = envelope;
  const field = (value: number) => withUnit(formatPlain(value), 'kV/mm');
  const power = withUnit(formatPlain(chargingPowerW), 'W');
  // ½CV²·f in watts: C in nF and V in kV give millijoule, hence 0.0005
  const powerW = ({ voltage, frequency }: SettingJson) =>
    0.0005 * erectedCapacitanceNf(envelope) * voltage ** 2 * frequency;
  return [
    {
      label: `field limit ${field(fieldMaxKvPerMm)}`,
      shortLabel: field(fieldMaxKvPerMm),
      margin: ({ voltage, gap }) => fieldMaxKvPerMm * gap - voltage,
    },
    {
      label: `misfires below ${field(fieldMinKvPerMm)}`,
      shortLabel: field(fieldMinKvPerMm),
      margin: ({ voltage, gap }) => voltage - fieldMinKvPerMm * gap,
    },
    {
      label: `charger gives ${power}`,
      shortLabel: power,
      margin: (setting) => chargingPowerW - powerW(setting),
    },
  ];
}

/** The limits that cut into a slice, on its lattice: rows along y, columns along x. */
export function rigLimitsOn(
  evidence: Evidence,
  [xKey, yKey]: readonly [SetPointKey, SetPointKey],
  grid: Axes,
  slice: SettingJson,
): MapLimit[] {
  return limitsOf(evidence)
    .map(({ label, shortLabel, margin }) => ({
      label,
      shortLabel,
      margin: grid.y.map((v) => grid.x.map((u) => margin({ ...slice, [xKey]: u, [yKey]: v }))),
    }))
    .filter(({ margin }) => margin.some((row) => row.some((value) => value < 0)));
}
