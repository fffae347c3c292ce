import { z } from 'zod';

const above0 = z.number('Enter a number.').positive('Enter a number above 0.');

/** Capacitance is the erected one: stage value ÷ number of stages. */
export const energyRequestSchema = z.strictObject({
  capacitanceNf: above0.max(1e9),
  voltageKv: above0.max(1e5),
  pulses: z
    .number()
    .int('The number of pulses is a whole number, 1 or more.')
    .min(1, 'The number of pulses is a whole number, 1 or more.')
    .max(1e9),
  frequencyHz: above0.max(1e6),
  gapMm: above0.max(1e6).optional(),
  massG: above0.max(1e9).optional(),
  chargingPowerW: above0.max(1e12).optional(),
});
export type EnergyRequest = z.output<typeof energyRequestSchema>;

export interface EnergyAnswer {
  readonly pulseEnergyJ: number;
  readonly totalEnergyJ: number;
  readonly specificEnergyKwhPerT: number | null;
  readonly durationS: number;
  readonly achievableDurationS: number;
  readonly averagePowerW: number;
  readonly fieldKvPerMm: number | null;
  readonly warnings: readonly { code: string; message: string }[];
}
