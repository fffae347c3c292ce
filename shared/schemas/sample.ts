import { z } from 'zod';
import { byLineSchema, idSchema, momentSchema, versionSchema } from './identity';
import { stageSchema } from './stage';
import { lineSchema, reasonSchema, textSchema } from './text';

/**
 * What must never go into the vessel, and why. Common practice, no source; local rules go first.
 * A sample with any of these is refused and nobody can override it.
 */
export const NEVER_IN = [
  {
    key: 'chargedCells',
    label: 'Lithium or any other charged cell',
    why: 'a cell can burn or burst when it is opened under water',
  },
  { key: 'sealed', label: 'Sealed or pressurised container', why: 'the shock can burst it' },
  {
    key: 'explosive',
    label: 'Ammunition, explosive or pyrotechnic residue',
    why: 'a discharge can set it off',
  },
  { key: 'capacitors', label: 'Capacitors of size', why: 'they can hold a charge of their own' },
  {
    key: 'reactiveMetal',
    label: 'Reactive metal (sodium, potassium, magnesium or aluminium powder, carbide)',
    why: 'it makes hydrogen with water',
  },
  { key: 'asbestos', label: 'Asbestos', why: 'it needs a licensed laboratory' },
  { key: 'mercury', label: 'Mercury-bearing parts', why: 'it would go into the water' },
  { key: 'biohazard', label: 'Biological hazard', why: 'it would go into the water and the air' },
  {
    key: 'radioactive',
    label: 'Radioactive above exemption',
    why: 'it needs a licensed laboratory',
  },
  {
    key: 'oilSoaked',
    label: 'Oil- or solvent-soaked pieces, unknown liquids',
    why: 'vapour and an arc do not go together',
  },
] as const;

/** What goes in but will not break, or only with difficulty: a warning, not a refusal. */
export const HARD_TO_BREAK = [
  {
    key: 'solidMetal',
    label: 'Solid metal',
    why: 'the current runs through it and nothing breaks',
  },
  { key: 'metalCasing', label: 'Closed metal casing', why: 'the casing shields the field' },
  {
    key: 'ductile',
    label: 'Rubber, wood or ductile polymer',
    why: 'it gives way instead of breaking',
  },
  {
    key: 'conductive',
    label: 'Much magnetite or graphite',
    why: 'it leads the current past the grains',
  },
  {
    key: 'saltyOrClayey',
    label: 'Salty, clayey or swelling',
    why: 'the water becomes conductive and pulses drain away',
  },
  { key: 'fineFeed', label: 'Feed mostly below 2 mm', why: 'too fine to bridge the gap' },
] as const;

const neverInKey = z.enum(NEVER_IN.map(({ key }) => key));
const hardKey = z.enum(HARD_TO_BREAK.map(({ key }) => key));

const massG = z
  .number('Enter the mass in g.')
  .positive('Enter a mass above 0 g.')
  .max(10_000_000, 'More than 10 t is not a laboratory sample.');
const sizeMm = z.number('Enter the size in mm.').positive('A size is above 0 mm.').max(2000);

/** What is written down when a parcel arrives. */
export const sampleInputSchema = z
  .strictObject({
    name: lineSchema('A name for the sample'),
    customerId: idSchema.nullable(),
    material: lineSchema('The material'),
    description: textSchema(4000).default(''),
    receivedMassG: massG,
    receivedOn: z.iso.date('Give the day of receipt.'),
    feedFromMm: sizeMm.nullable().default(null),
    feedToMm: sizeMm.nullable().default(null),
    moisturePercent: z.number().min(0).max(100).nullable().default(null),
    storage: textSchema(300).default(''),
    /** What the person at the door has looked for and found; an empty list is a statement too. */
    found: z.array(neverInKey).default([]),
    cautions: z.array(hardKey).default([]),
    screened: z.literal(
      true,
      'Look the sample through first, then tick that it was looked through.',
    ),
  })
  .superRefine((sample, ctx) => {
    for (const key of sample.found) {
      const item = NEVER_IN.find((each) => each.key === key);
      ctx.addIssue({
        code: 'custom',
        path: ['found'],
        message: `${item?.label ?? key}: cannot be taken in, because ${item?.why ?? 'it is dangerous'}. Nobody can override this.`,
      });
    }
    const { feedFromMm, feedToMm } = sample;
    if (feedFromMm !== null && feedToMm !== null && feedFromMm >= feedToMm)
      ctx.addIssue({
        code: 'custom',
        path: ['feedToMm'],
        message: `The feed runs from ${feedFromMm} to ${feedToMm} mm: the larger size comes second.`,
      });
  });
export type SampleInput = z.infer<typeof sampleInputSchema>;

export const STOCK_KINDS = [
  'received',
  'reserved',
  'released',
  'used',
  'lost',
  'returned',
] as const;
export const stockKindSchema = z.enum(STOCK_KINDS);

/** A line of the stock ledger: mass that came, was set aside, set free again, used, lost or sent back. */
export const stockEntryJsonSchema = z.object({
  id: idSchema,
  kind: stockKindSchema,
  massG: z.number(),
  studyId: idSchema.nullable(),
  runId: idSchema.nullable(),
  note: z.string(),
  by: byLineSchema,
  at: momentSchema,
});

/** What a person may enter by hand; reserving and using follow from the matrix and the bench. */
export const stockEntryInputSchema = z.strictObject({
  kind: z.enum(['received', 'lost', 'returned']),
  massG,
  note: reasonSchema,
});

export const stockSchema = z.object({
  receivedG: z.number(),
  usedG: z.number(),
  lostG: z.number(),
  returnedG: z.number(),
  reservedG: z.number(),
  leftG: z.number(),
});
export type StockJson = z.infer<typeof stockSchema>;

export const sampleJsonSchema = z.object({
  id: idSchema,
  code: z.string(),
  name: z.string(),
  customer: z.object({ id: idSchema, name: z.string() }).nullable(),
  material: z.string(),
  description: z.string(),
  receivedMassG: z.number(),
  receivedOn: z.string(),
  feedFromMm: z.number().nullable(),
  feedToMm: z.number().nullable(),
  moisturePercent: z.number().nullable(),
  storage: z.string(),
  cautions: z.array(hardKey),
  stock: stockSchema,
  isSimulated: z.boolean(),
  by: byLineSchema,
  createdAt: momentSchema,
  version: versionSchema,
});
export type SampleJson = z.infer<typeof sampleJsonSchema>;

/** Fields that may be corrected after intake; the mass is corrected through the ledger. */
export const sampleUpdateSchema = z.strictObject({
  name: lineSchema('A name for the sample'),
  description: textSchema(4000),
  storage: textSchema(300),
  why: reasonSchema,
  version: versionSchema,
});

export const sampleDetailSchema = sampleJsonSchema.extend({
  ledger: z.array(stockEntryJsonSchema),
  studies: z.array(z.object({ id: idSchema, code: z.string(), title: z.string() })),
});

/** What a customer sees of a sample of theirs, and nothing else. */
export const customerSampleSchema = z.object({
  id: idSchema,
  code: z.string(),
  name: z.string(),
  material: z.string(),
  receivedOn: z.string(),
  receivedMassG: z.number(),
  studies: z.array(
    z.object({
      code: z.string(),
      title: z.string(),
      stage: stageSchema,
      isSigned: z.boolean(),
      words: z.string(),
    }),
  ),
});
export type CustomerSampleJson = z.infer<typeof customerSampleSchema>;
