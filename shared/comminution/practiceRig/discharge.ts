import { pulseEnergyJ } from '../energy/pulseEnergy';
import type { Material } from './materials';

/** The invented rig. `chargingPowerW` is the demo lab's; the energy of a pulse does not depend on it. */
export const PRACTICE_RIG = {
  capacitanceNf: 32,
  chargingPowerW: 2800,
  waterL: 3,
  /** Length that turns conductivity into resistance, m. */
  cellM: 0.1,
  startConductivityUsPerCm: 50,
  startTemperatureC: 20,
  /** How long the voltage stays high enough to bridge water, µs. */
  tailUs: 1.6,
  channelEfficiency: 0.8,
  channelHalfGapMm: 14,
  waterEfficiency: 0.05,
  wearMmPer1000: 0.3,
} as const;

export type Rig = { readonly [K in keyof typeof PRACTICE_RIG]: number };

/** What is delivered, and the water as it is now. */
export interface Conditions {
  readonly voltageKv: number;
  readonly gapMm: number;
  readonly conductivityUsPerCm: number;
}

/** What one pulse would do with a solid in the gap. */
export interface Outlook {
  readonly solidProbability: number;
  readonly waterProbability: number;
  readonly availableEnergyJ: number;
  readonly efficiency: number;
  /** Field over the median strength. */
  readonly over: number;
}

/**
 * Breakdown of solid against water: the solid's delay, the streamer through water, the voltage left after
 * leakage, and a Weibull chance of firing. All constants are assumed.
 */
export function discharge(
  { voltageKv, gapMm, conductivityUsPerCm }: Conditions,
  material: Material,
  rig: Rig,
): Outlook {
  const strength = material.strengthKvPerMm * (gapMm / 30) ** -material.strengthGapExponent;
  const solidUs = Math.min(2, material.delayUs * ((strength * gapMm) / voltageKv) ** 2);
  const waterUs = (gapMm / 10 / (8.8 * (voltageKv / 1000) ** 0.6)) ** 2;
  const delayUs = Math.min(solidUs, waterUs, rig.tailUs);
  const resistanceOhm = 1 / (conductivityUsPerCm * 1e-4 * rig.cellM);
  const decayUs = resistanceOhm * rig.capacitanceNf * 1e-3;
  const leftKv = voltageKv * Math.exp(-delayUs / decayUs);
  const over = leftKv / gapMm / strength;
  const fires = 1 - Math.exp(-Math.LN2 * over ** material.weibull);
  const isFirst = 1 / (1 + (solidUs / waterUs) ** 2.5);
  return {
    solidProbability: fires * isFirst,
    waterProbability: 1 / (1 + (waterUs / rig.tailUs) ** 4),
    availableEnergyJ: pulseEnergyJ(rig.capacitanceNf, leftKv),
    efficiency: (rig.channelEfficiency * gapMm) / (gapMm + rig.channelHalfGapMm),
    over,
  };
}
