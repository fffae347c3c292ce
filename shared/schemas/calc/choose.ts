import { z } from 'zod';
import {
  constraintsSchema,
  factorsSchema,
  goalSchema,
  regionSchema,
  settingsSchema,
} from './common';
import { modelledFields } from './fit';

const key = z.string().min(1).max(60);

const modelledResponseSchema = z.strictObject({ key, ...modelledFields });

/** A response that follows exactly from the settings. Capacitance erected, nF; mass of one run, g. */
const computedResponseSchema = z.strictObject({
  key,
  kind: z.enum(['specificEnergy', 'totalEnergy', 'duration', 'field']),
  capacitanceNf: z.number().positive().optional(),
  massG: z.number().positive().optional(),
  chargingPowerW: z.number().positive().optional(),
});
export type ComputedResponse = z.output<typeof computedResponseSchema>;

export const chooseRequestSchema = z
  .strictObject({
    factors: factorsSchema,
    constraints: constraintsSchema,
    region: regionSchema,
    responses: z.array(modelledResponseSchema).max(12).default([]),
    computed: z.array(computedResponseSchema).max(8).default([]),
    goals: z.array(goalSchema).min(1, 'Name at least one goal.').max(20),
    /** Factors held at a value, and set-points that are no factors but that a computed response needs. */
    fixed: settingsSchema.default({}),
    rankBy: z.enum(['desirability', 'probability']).default('desirability'),
    support: z.enum(['data', 'region']).default('data'),
    top: z.number().int().min(1).max(200).default(20),
    draws: z.number().int().min(100).max(20_000).default(2000),
    seed: z.number().int().min(0).max(4_294_967_295).default(7),
  })
  .superRefine((request, ctx) => {
    const known = [...request.responses, ...request.computed].map((each) => each.key);
    known.forEach((each, i) => {
      if (known.indexOf(each) < i)
        ctx.addIssue({
          code: 'custom',
          path: ['responses'],
          message: `Two responses are called ‘${each}’.`,
        });
    });
    request.goals.forEach((goal, i) => {
      const issue = (field: string, message: string) => {
        ctx.addIssue({ code: 'custom', path: ['goals', i, field], message });
      };
      if (!known.includes(goal.response))
        issue('response', `There is no response called ‘${goal.response}’.`);
      if (goal.low === undefined) issue('low', 'A goal needs its lower value.');
      if (goal.high === undefined) issue('high', 'A goal needs its upper value.');
      if (goal.low !== undefined && goal.high !== undefined && goal.low >= goal.high)
        issue('high', `${goal.low} to ${goal.high}: the larger value comes second.`);
      if (goal.aim === 'target' && goal.target === undefined)
        issue('target', 'A target goal needs its target.');
    });
  });
export type ChooseRequest = z.output<typeof chooseRequestSchema>;

export interface ChosenResponse {
  readonly predicted: number;
  readonly piLow: number | null;
  readonly piHigh: number | null;
  readonly holds: boolean | null;
}

export interface ChosenSetting {
  readonly settings: Readonly<Record<string, number | string>>;
  readonly desirability: number;
  readonly probabilityAllGoals: number | null;
  readonly probabilityError: number | null;
  readonly responses: Readonly<Record<string, ChosenResponse>>;
}

export interface ChooseAnswer {
  readonly latticeSize: number;
  readonly evaluated: number;
  readonly exhaustive: boolean;
  readonly best: readonly ChosenSetting[];
  readonly tradeOff: {
    readonly count: number;
    readonly settings: readonly {
      readonly settings: Readonly<Record<string, number | string>>;
      readonly responses: Readonly<Record<string, number>>;
    }[];
  };
  /** How the joint uncertainty was had: one matrix t, seemingly unrelated regressions, or apart. */
  readonly joint: 'matrix-t' | 'seemingly-unrelated' | 'independent' | 'none';
  readonly reasons: readonly string[];
}
