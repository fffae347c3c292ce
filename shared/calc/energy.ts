import { withoutDust } from '../comminution/decimal';
import {
  chargingLimitHz,
  pulseEnergyJ,
  specificEnergyKwhPerT,
} from '../comminution/energy/pulseEnergy';
import type { EnergyAnswer, EnergyRequest } from '../schemas/calc/energy';

/** Room for the rounding of a product, relative to the charging power. */
const SLACK = 1e-9;

const figure = (value: number) => String(Number(value.toPrecision(4)));

/** Energy, power, field and time of a setting: exact, from ½CV² with the erected capacitance. */
export function energyAnswer(request: EnergyRequest): EnergyAnswer {
  const { capacitanceNf, voltageKv, pulses, frequencyHz, gapMm, massG, chargingPowerW } = request;
  const perPulseJ = withoutDust(pulseEnergyJ(capacitanceNf, voltageKv));
  const totalEnergyJ = withoutDust(perPulseJ * pulses);
  const powerW = perPulseJ * frequencyHz;
  const durationS = pulses / frequencyHz;
  const isTooFast = chargingPowerW !== undefined && powerW > chargingPowerW * (1 + SLACK);
  const rateHz = isTooFast ? chargingLimitHz(chargingPowerW, perPulseJ) : frequencyHz;
  const achievableDurationS = pulses / rateHz;
  const warnings = isTooFast
    ? [
        {
          code: 'charging-limit',
          message: `${voltageKv} kV at ${frequencyHz} Hz takes ${figure(powerW)} W, the charger gives ${chargingPowerW} W: at most ${figure(rateHz)} Hz, ${figure(achievableDurationS)} s for ${pulses} pulses.`,
        },
      ]
    : [];
  return {
    pulseEnergyJ: perPulseJ,
    totalEnergyJ,
    specificEnergyKwhPerT: massG === undefined ? null : specificEnergyKwhPerT(totalEnergyJ, massG),
    durationS,
    achievableDurationS,
    averagePowerW: withoutDust(powerW),
    fieldKvPerMm: gapMm === undefined ? null : voltageKv / gapMm,
    warnings,
  };
}
