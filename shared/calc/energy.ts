import {
  highestFrequencyHz,
  pulseEnergyJ,
  specificEnergyKwhPerT,
} from '../comminution/energy/pulseEnergy';
import type { EnergyAnswer, EnergyRequest } from '../schemas/calc/energy';

const figure = (value: number) => String(Number(value.toPrecision(4)));

/** Energy, power and time of one run: `POST /api/calc/energy`. */
export function energyAnswer(request: EnergyRequest): EnergyAnswer {
  const { capacitanceNf, voltageKv, pulses, frequencyHz, gapMm, massG, chargingPowerW } = request;
  const energyJ = pulseEnergyJ(capacitanceNf, voltageKv);
  const totalEnergyJ = energyJ * pulses;
  const averagePowerW = energyJ * frequencyHz;
  const limitHz =
    chargingPowerW === undefined ? Infinity : highestFrequencyHz(chargingPowerW, energyJ);
  const isLimited = frequencyHz > limitHz * (1 + 1e-9);
  return {
    pulseEnergyJ: energyJ,
    totalEnergyJ,
    specificEnergyKwhPerT: massG === undefined ? null : specificEnergyKwhPerT(totalEnergyJ, massG),
    durationS: pulses / frequencyHz,
    achievableDurationS: pulses / Math.min(frequencyHz, limitHz),
    averagePowerW,
    fieldKvPerMm: gapMm === undefined ? null : voltageKv / gapMm,
    warnings: isLimited
      ? [
          {
            code: 'charging-power',
            message: `${figure(voltageKv)} kV at ${figure(frequencyHz)} Hz takes ${figure(averagePowerW)} W, more than the ${figure(chargingPowerW ?? 0)} W of the charger: at most ${figure(limitHz)} Hz is reached.`,
          },
        ]
      : [],
  };
}
