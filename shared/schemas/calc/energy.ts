import { z } from 'zod';

const above0 = (what: string, max: number) =>
  z.number(`Enter the ${what}.`).positive(`The ${what} is above 0.`).max(max);

/** `capacitanceNf` is the erected value: the stage value ÷ the stages of a Marx bank. */
export const energyRequestSchema = z.strictObject({
  capacitanceNf: above0('erected capacitance in nF', 1e6),
  voltageKv: above0('voltage in kV', 1e4),
  /** Pulses delivered, not set. */
  pulses: z
    .number('Enter the number of pulses.')
    .int('The number of pulses is a whole number.')
    .min(0, 'The number of pulses is a whole number, 0 or more.')
    .max(1e7),
  frequencyHz: above0('frequency in Hz', 1e4),
  gapMm: above0('gap in mm', 1e4).optional(),
  massG: above0('dry mass in g', 1e7).optional(),
  chargingPowerW: above0('charging power in W', 1e9).optional(),
});
export type EnergyRequest = z.input<typeof energyRequestSchema>;

export const energyAnswerSchema = z.object({
  pulseEnergyJ: z.number(),
  totalEnergyJ: z.number(),
  specificEnergyKwhPerT: z.number().nullable(),
  durationS: z.number(),
  achievableDurationS: z.number(),
  /** Power that the wished frequency takes, ½CV²·f. */
  averagePowerW: z.number(),
  fieldKvPerMm: z.number().nullable(),
  warnings: z.array(z.object({ code: z.string(), message: z.string() })),
});
export type EnergyAnswer = z.infer<typeof energyAnswerSchema>;
