import { z } from 'zod';

/** The four set-points of a rig, in the order in which they are dialled. */
export const SET_POINTS = [
  { key: 'voltage', name: 'Voltage', symbol: 'V', unit: 'kV', decimals: 0 },
  { key: 'gap', name: 'Gap', symbol: 'g', unit: 'mm', decimals: 1 },
  { key: 'pulses', name: 'Pulses', symbol: 'N', unit: '', decimals: 0 },
  { key: 'frequency', name: 'Frequency', symbol: 'f', unit: 'Hz', decimals: 1 },
] as const;

export const setPointKeySchema = z.enum(['voltage', 'gap', 'pulses', 'frequency']);
export type SetPointKey = z.infer<typeof setPointKeySchema>;
export const SET_POINT_KEYS: readonly SetPointKey[] = setPointKeySchema.options;

export function setPointOf(key: SetPointKey) {
  return SET_POINTS[SET_POINT_KEYS.indexOf(key)] ?? SET_POINTS[0];
}

const above0 = (what: string) => z.number(`Enter the ${what}.`).positive(`The ${what} is above 0.`);

/** A full setting: voltage in kV, gap in mm, pulses, frequency in Hz. */
export const settingSchema = z.strictObject({
  voltage: above0('voltage in kV').max(1000),
  gap: above0('gap in mm').max(1000),
  pulses: z
    .number('Enter the number of pulses.')
    .int('The number of pulses is a whole number, 1 or more.')
    .min(1, 'The number of pulses is a whole number, 1 or more.')
    .max(100_000),
  frequency: above0('frequency in Hz').max(1000),
});
export type SettingJson = z.infer<typeof settingSchema>;

/** What was delivered, as far as it was read: null = not read, the set-point stands. */
export const actualSettingSchema = z.strictObject({
  voltage: above0('delivered voltage in kV').max(1000).nullable(),
  gap: above0('gap measured in mm').max(1000).nullable(),
  pulses: z
    .number()
    .int('Pulses delivered is a whole number, 0 or more.')
    .min(0, 'Pulses delivered is a whole number, 0 or more.')
    .max(100_000)
    .nullable(),
  frequency: above0('delivered frequency in Hz').max(1000).nullable(),
});
export type ActualSettingJson = z.infer<typeof actualSettingSchema>;
