import { z } from 'zod';

/** Ids are positive whole numbers up to 2⁵³ − 1; in a path they come as digits and nothing else. */
export const idSchema = z
  .number('Choose one of the list.')
  .int('An id is a whole number.')
  .positive('Choose one of the list.')
  .max(Number.MAX_SAFE_INTEGER);

export const pathIdSchema = z
  .string()
  .regex(/^[1-9]\d{0,15}$/, 'An id is a whole number.')
  .transform(Number)
  .refine(Number.isSafeInteger, 'An id is a whole number.');

/** What a write sends back so that a stale edit is noticed; see `version` in every JSON. */
export const versionSchema = z.number().int().min(0);

/** A moment, as the server stored it: ISO 8601, UTC, milliseconds. */
export const momentSchema = z.iso.datetime();

/** A person as named on a record, with the name of then. */
export const byLineSchema = z.object({ id: idSchema, name: z.string() });
export type ByLine = z.infer<typeof byLineSchema>;
