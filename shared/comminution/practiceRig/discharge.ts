import { pulseEnergyJ } from '../energy/pulseEnergy';
import type { Material, PracticeRig } from './materials';

/** The solid needs at most this long, µs: beyond it the pulse is over anyway. */
const MAX_SOLID_DELAY_US = 2;

/** What one pulse would do with a solid in the gap. */
export interface Discharge {
  /** The solid breaks down, and before the water does. */
  readonly solidProbability: number;
  /** The water gap closes in time, given that the solid did not. */
  readonly waterProbability: number;
  /** Energy left in the bank when the channel forms, J. */
  readonly availableJ: number;
  /** Share of it that reaches the channel. */
  readonly efficiency: number;
  /** Field over the field that breaks down half of the times. */
  readonly excess: number;
}

export interface PulseState {
  readonly voltageKv: number;
  readonly gapMm: number;
  readonly conductivityUsPerCm: number;
}

/**
 * One pulse: the race between solid and water, and what leaks through the water meanwhile.
 *
 * @see Weibull form of the breakdown probability; water closing time after J. C. Martin's point–plane
 *   relation d = 8.8·V^0.6·t^½ (cm, MV, µs). Constants are assumed.
 */
export function discharge(pulse: PulseState, material: Material, rig: PracticeRig): Discharge {
  const { voltageKv, gapMm, conductivityUsPerCm } = pulse;
  const halfField = material.field30KvPerMm * (gapMm / 30) ** -material.gapExponent;
  const field = voltageKv / gapMm;
  const solidUs = Math.min(MAX_SOLID_DELAY_US, material.delayUs * (halfField / field) ** 2);
  const waterUs = (gapMm / 10 / (8.8 * (voltageKv / 1000) ** 0.6)) ** 2;
  const delayUs = Math.min(solidUs, waterUs, rig.tailUs);
  // µS/cm → S/m is 1e-4; ohm · nF is ns
  const resistanceOhm = 1 / (conductivityUsPerCm * 1e-4 * rig.cellM);
  const timeConstantUs = resistanceOhm * rig.capacitanceNf * 1e-3;
  const leftKv = voltageKv * Math.exp(-delayUs / timeConstantUs);
  const excess = leftKv / gapMm / halfField;
  const breaksDown = 1 - Math.exp(-Math.LN2 * excess ** material.weibull);
  const isFirst = 1 / (1 + (solidUs / waterUs) ** 2.5);
  return {
    solidProbability: breaksDown * isFirst,
    waterProbability: 1 / (1 + (waterUs / rig.tailUs) ** 4),
    availableJ: pulseEnergyJ(rig.capacitanceNf, leftKv),
    efficiency: (rig.efficiency * gapMm) / (gapMm + rig.halfGapMm),
    excess,
  };
}
