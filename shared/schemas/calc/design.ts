import { z } from 'zod';
import {
  constraintsSchema,
  factorsSchema,
  modelSchema,
  regionSchema,
  settingsSchema,
} from './common';
import type { EvaluateAnswer } from './evaluate';

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

export const designOptionsSchema = z.strictObject({
  generators: z.array(z.string().max(200)).max(10).optional(),
  fraction: z.number().int().min(0).max(8).optional(),
  foldOver: z.boolean().optional(),
  runs: z.number().int().min(1).max(500).optional(),
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
      z.number().gt(0.1, 'Alpha is above 0.1.').max(10),
    ])
    .optional(),
  inscribed: z.boolean().optional(),
  criterion: z.enum(['D', 'I']).optional(),
  model: modelSchema.optional(),
  include: z
    .array(z.strictObject({ settings: settingsSchema, block: z.number().int().min(1).default(1) }))
    .max(500)
    .optional(),
});
export type DesignOptions = z.output<typeof designOptionsSchema>;

export const designRequestSchema = z.strictObject({
  factors: factorsSchema,
  constraints: constraintsSchema,
  region: regionSchema,
  kind: designKindSchema,
  options: designOptionsSchema.default({}),
  blocks: z.number().int().min(1).max(32).default(1),
  /** In all. Left out: 6 for factorial, fractional, central composite and Box–Behnken designs, else none. */
  centrePoints: z.number().int().min(0).max(100).optional(),
  replicates: z.number().int().min(1).max(20).default(1),
  seed: z.number().int().min(0).max(4_294_967_295).default(7),
  randomise: z.boolean().default(true),
  snap: z.boolean().default(true),
});
export type DesignRequest = z.output<typeof designRequestSchema>;

export const POINT_TYPES = [
  'factorial',
  'axial',
  'centre',
  'edge',
  'optimal',
  'spaceFilling',
  'included',
] as const;
export type PointType = (typeof POINT_TYPES)[number];

export interface DesignRun {
  readonly runOrder: number;
  readonly standardOrder: number;
  readonly block: number;
  readonly pointType: PointType;
  readonly coded: Readonly<Record<string, number | string>>;
  readonly settings: Readonly<Record<string, number | string>>;
}

export interface DesignAnswer {
  readonly runs: readonly DesignRun[];
  readonly properties: {
    readonly alpha?: number;
    readonly resolution?: number;
    readonly generators?: readonly string[];
    readonly definingRelation?: readonly (readonly string[])[];
    readonly aliases?: readonly (readonly string[])[];
    /** Share of D-efficiency lost by snapping to settable steps. */
    readonly snapLoss: number | null;
  };
  readonly evaluation: EvaluateAnswer;
  readonly warnings: readonly { code: string; message: string }[];
}
