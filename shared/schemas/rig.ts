import { z } from 'zod';
import { idSchema, momentSchema, versionSchema } from './identity';
import { lineSchema, reasonSchema } from './text';

const above0 = z.number('Enter a number.').positive('Enter a number above 0.');

/** The settable values of one set-point: min, min + step, … up to max, in the set-point's own unit. */
const dialSchema = z
  .strictObject({ min: above0, max: above0, step: above0 })
  .superRefine((dial, ctx) => {
    if (dial.min >= dial.max)
      ctx.addIssue({
        code: 'custom',
        path: ['max'],
        message: `The range runs from ${dial.min} to ${dial.max}: the larger value comes second.`,
      });
    if (dial.step > dial.max - dial.min)
      ctx.addIssue({
        code: 'custom',
        path: ['step'],
        message: 'One step is longer than the whole range.',
      });
  });
export type Dial = z.infer<typeof dialSchema>;

/**
 * What a rig can do: a hard fact. Capacitance is the erected value (stage value ÷ stages of a Marx
 * bank), charging power the mean power into the bank, field limits are voltage ÷ gap in kV/mm.
 */
export const envelopeSchema = z
  .strictObject({
    voltage: dialSchema,
    gap: dialSchema,
    pulses: dialSchema,
    frequency: dialSchema,
    stageCapacitanceNf: above0,
    stages: z.number().int().min(1).max(1000),
    chargingPowerW: above0,
    fieldMinKvPerMm: above0,
    fieldMaxKvPerMm: above0,
    waterL: above0,
  })
  .superRefine((envelope, ctx) => {
    if (envelope.fieldMinKvPerMm >= envelope.fieldMaxKvPerMm)
      ctx.addIssue({
        code: 'custom',
        path: ['fieldMaxKvPerMm'],
        message: 'The lower field limit lies above the upper one.',
      });
  });
export type EnvelopeJson = z.infer<typeof envelopeSchema>;

/** Erected capacitance of n equal stages in series, nF. */
export function erectedCapacitanceNf(envelope: EnvelopeJson): number {
  return envelope.stageCapacitanceNf / envelope.stages;
}

export const rigJsonSchema = z.object({
  id: idSchema,
  name: z.string(),
  isSimulated: z.boolean(),
  envelopeId: idSchema,
  revision: z.number().int(),
  envelope: envelopeSchema,
  since: momentSchema,
});
export type RigJson = z.infer<typeof rigJsonSchema>;

export const rigInputSchema = z.strictObject({
  name: lineSchema('A name for the rig'),
  envelope: envelopeSchema,
});

/** A changed envelope is a new revision; studies keep the one they were planned on. */
export const envelopeRevisionSchema = z.strictObject({
  envelope: envelopeSchema,
  why: reasonSchema,
  revision: z.number().int().min(1),
});

export const sieveStackInputSchema = z.strictObject({
  name: lineSchema('A name for the sieve stack'),
  frameDiameterMm: above0.max(1000),
  aperturesMm: z
    .array(above0.max(200))
    .min(2, 'A stack has at least two sieves.')
    .max(40)
    .refine((sizes) => new Set(sizes).size === sizes.length, 'A sieve is named twice.')
    .transform((sizes) => [...sizes].sort((a, b) => b - a)),
});

export const sieveStackJsonSchema = z.object({
  id: idSchema,
  name: z.string(),
  frameDiameterMm: z.number(),
  aperturesMm: z.array(z.number()),
  version: versionSchema,
});
export type SieveStackJson = z.infer<typeof sieveStackJsonSchema>;
