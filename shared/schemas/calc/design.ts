import { z } from 'zod';
import {
  constraintsSchema,
  factorsSchema,
  modelSchema,
  regionSchema,
  settingsSchema,
} from './common';
import { evaluationSchema } from './evaluate';

export const DESIGN_KINDS = [
  'factorial',
  'fractional',
  'threeLevel',
  'plackettBurman',
  'centralComposite',
  'boxBehnken',
  'definitiveScreening',
  'optimal',
  'spaceFilling',
] as const;
export const designKindSchema = z.enum(DESIGN_KINDS);
export type DesignKind = z.infer<typeof designKindSchema>;

const MAX_RUNS = 2000;
const wholeNumber = z.number('Enter a whole number.').int('Enter a whole number.');

export const designOptionsSchema = z.strictObject({
  /** fractional: like `frequency=voltage:gap:pulses`. */
  generators: z.array(z.string().max(300)).max(11).optional(),
  /** fractional, centralComposite: p of 2^(k−p). */
  fraction: wholeNumber.min(0).max(11).optional(),
  /** fractional: true = all signs reversed, or the key of the one factor that is. */
  foldOver: z.union([z.boolean(), z.string().max(60)]).optional(),
  /** plackettBurman, optimal, spaceFilling: runs in all. */
  runs: wholeNumber.min(1, 'Ask for at least one run.').max(MAX_RUNS).optional(),
  alpha: z
    .union([
      z.enum([
        'rotatable',
        'faceCentred',
        'spherical',
        'orthogonal',
        'orthogonalBlocks',
        'fourthRoot',
      ]),
      z.number().positive('The axial distance is above 0.').max(10),
    ])
    .optional(),
  inscribed: z.boolean().optional(),
  criterion: z.enum(['D', 'I']).optional(),
  /** The model that an optimal design is made for, and that any design is evaluated for. */
  model: modelSchema.optional(),
  /** optimal: runs that stay. */
  include: z
    .array(z.strictObject({ settings: settingsSchema, block: wholeNumber.min(1).optional() }))
    .max(MAX_RUNS)
    .optional(),
});
export type DesignOptions = z.infer<typeof designOptionsSchema>;

export const designRequestSchema = z.strictObject({
  factors: factorsSchema,
  constraints: constraintsSchema,
  region: regionSchema,
  kind: designKindSchema,
  options: designOptionsSchema.default({}),
  blocks: wholeNumber.min(1).max(100).default(1),
  /** In all. Default 6; none extra in threeLevel, one in definitiveScreening, none in optimal and
   * spaceFilling (where they count among `runs`). */
  centrePoints: wholeNumber.min(0).max(200).optional(),
  replicates: wholeNumber.min(1).max(50).default(1),
  seed: wholeNumber.min(0).max(4_294_967_295).default(7),
  randomise: z.boolean().default(true),
  snap: z.boolean().default(true),
});
export type DesignRequest = z.input<typeof designRequestSchema>;

const settingOut = z.union([z.number(), z.string()]);

export const POINT_TYPES = [
  'factorial',
  'axial',
  'centre',
  'edge',
  'optimal',
  'spaceFilling',
  'included',
] as const;

export const designRunSchema = z.object({
  runOrder: z.number(),
  standardOrder: z.number(),
  block: z.number(),
  pointType: z.enum(POINT_TYPES),
  coded: z.record(z.string(), settingOut),
  settings: z.record(z.string(), settingOut),
});

export const designAnswerSchema = z.object({
  /** In run order. */
  runs: z.array(designRunSchema),
  properties: z.object({
    /** Axial distance over that of the factorial points. */
    alpha: z.number().nullable(),
    resolution: z.number().nullable(),
    generators: z.array(z.string()),
    definingRelation: z.array(z.array(z.string())),
    /** Groups of effects that cannot be told apart; a leading − reverses the sign. */
    aliases: z.array(z.array(z.string())),
    /** Effects lost to blocks. */
    confounded: z.array(z.string()),
    /** Share of |M|^(1/p) lost by snapping; null when the model cannot be fitted. */
    snapLoss: z.number().nullable(),
    /** The generator of random numbers that gave the order. */
    random: z.string(),
    notes: z.array(z.string()),
  }),
  evaluation: evaluationSchema,
});
export type DesignAnswer = z.infer<typeof designAnswerSchema>;
