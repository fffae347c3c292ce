import { z } from 'zod';

/** Shapes that the routes under /api/calc have in common. Names are fixed: scripts depend on them. */

const finite = z.number('Enter a number.');
const key = z
  .string()
  .min(1)
  .max(60)
  .regex(/^[\p{L}_][\p{L}\p{N}_]*$/u, 'A key starts with a letter; letters, digits and _ follow.');

const numericFactorSchema = z.strictObject({
  key,
  name: z.string().max(120).optional(),
  unit: z.string().max(30).optional(),
  low: finite,
  high: finite,
  min: finite.optional(),
  max: finite.optional(),
  step: finite.positive('A step is above 0.').optional(),
  scale: z.enum(['linear', 'log']).optional(),
});

const categoricalFactorSchema = z.strictObject({
  key,
  name: z.string().max(120).optional(),
  levels: z.array(z.string().min(1).max(60)).min(2).max(20),
});

interface NumericShape {
  low: number;
  high: number;
  min?: number | undefined;
  max?: number | undefined;
  step?: number | undefined;
  scale?: 'linear' | 'log' | undefined;
}

/** A dial with more positions is set freely: leave the step out. */
const MAX_POSITIONS = 100_000;

function checkRange(factor: NumericShape, issue: (path: string, message: string) => void): void {
  const { low, high, min = low, max = high } = factor;
  if (low > high) issue('low', `Low (${low}) is above high (${high}). Swap them?`);
  if (low === high)
    issue(
      'high',
      `Low and high are both ${low}, so this factor cannot change. Hold it fixed instead.`,
    );
  if (min > max) issue('min', `The envelope runs from ${min} to ${max}: its ends are reversed.`);
  if (factor.step !== undefined && (max - min) / factor.step > MAX_POSITIONS)
    issue(
      'step',
      `A step of ${factor.step} makes more than ${MAX_POSITIONS} settable values. Leave it out for a factor that is set freely.`,
    );
  if (factor.scale === 'log' && Math.min(low, min) <= 0)
    issue('low', 'On a log scale every value must be above 0.');
}

export const factorSchema = z
  .union([numericFactorSchema, categoricalFactorSchema])
  .superRefine((factor, ctx) => {
    if ('levels' in factor) {
      if (new Set(factor.levels).size < factor.levels.length)
        ctx.addIssue({ code: 'custom', path: ['levels'], message: 'Two levels have one name.' });
      return;
    }
    checkRange(factor, (path, message) => {
      ctx.addIssue({ code: 'custom', path: [path], message });
    });
  });

export const factorsSchema = z
  .array(factorSchema)
  .min(1, 'Name at least one factor.')
  .superRefine((factors, ctx) => {
    factors.forEach(({ key: name }, i) => {
      if (factors.findIndex((other) => other.key === name) < i)
        ctx.addIssue({
          code: 'custom',
          path: [i, 'key'],
          message: `Two factors are called ‘${name}’.`,
        });
    });
  });

export const constraintSchema = z.strictObject({
  terms: z.record(z.string().min(1).max(200), finite),
  op: z.enum(['<=', '>=']),
  bound: finite,
});

export const constraintsSchema = z.array(constraintSchema).max(50).default([]);
export const regionSchema = z.enum(['range', 'envelope']).default('range');
export const settingsSchema = z.record(
  z.string().min(1).max(60),
  z.union([finite, z.string().max(60)]),
);
export const modelSchema = z.union([
  z.enum(['linear', 'interaction', 'quadratic']),
  z.array(z.string().min(1).max(200)).max(500),
]);

export const goalSchema = z.strictObject({
  response: key,
  aim: z.enum(['maximise', 'minimise', 'target', 'within']),
  low: finite.optional(),
  high: finite.optional(),
  target: finite.optional(),
  weight: finite.positive().max(100).default(1),
  priority: finite.positive().max(100).default(1),
});

export type FactorInput = z.infer<typeof factorSchema>;
export type ConstraintInput = z.infer<typeof constraintSchema>;
export type GoalInput = z.infer<typeof goalSchema>;
export type ModelInput = z.infer<typeof modelSchema>;
