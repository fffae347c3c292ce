import { z } from 'zod';
import { factorsSchema, modelSchema, settingsSchema } from './common';

const finite = z.number('Enter a number.');

export const calcRunSchema = z.strictObject({
  id: z.union([z.string().max(80), z.number()]).optional(),
  settings: settingsSchema,
  block: z.number().int().min(1).max(1000).default(1),
  /** null: not measured; the run is left out and named. */
  value: finite.nullable().optional(),
  weight: z.number().positive('A weight is above 0.').max(1e12).optional(),
  excluded: z.boolean().default(false),
});
export type CalcRun = z.output<typeof calcRunSchema>;

export const transformSchema = z.enum(['none', 'log', 'sqrt', 'logit', 'boxcox']);
export const transformParametersSchema = z.strictObject({
  /** logit: the bounds of the response. */
  lower: finite.optional(),
  upper: finite.optional(),
  /** boxcox: the power; without it the most likely one. */
  lambda: z.number().min(-5).max(5).optional(),
});

/** What decides one response’s model; shared by fit, select, choose and next. */
export const modelledFields = {
  runs: z.array(calcRunSchema).min(1, 'There are no runs.').max(2000),
  model: modelSchema,
  intercept: z.boolean().default(true),
  blocks: z.boolean().default(true),
  transform: transformSchema.default('none'),
  transformParameters: transformParametersSchema.default({}),
};

export const fitRequestSchema = z.strictObject({
  factors: factorsSchema,
  ...modelledFields,
  confidence: z.number().gt(0.5).lt(1).default(0.95),
  predictAt: z.array(settingsSchema).max(5000).default([]),
  meanOf: z.number().int().min(1).max(1000).default(1),
  newBlock: z.boolean().default(false),
  blockSd: z.number().min(0).nullable().default(null),
});
export type FitRequest = z.output<typeof fitRequestSchema>;

interface AnovaLine {
  readonly df: number;
  readonly ss: number;
  readonly ms: number | null;
  readonly f: number | null;
  readonly p: number | null;
}
interface NamedAnovaLine extends AnovaLine {
  readonly term: string;
}

export interface FitTerm {
  readonly term: string;
  readonly estimate: number;
  readonly standardError: number | null;
  readonly t: number | null;
  readonly p: number | null;
  readonly ciLow: number | null;
  readonly ciHigh: number | null;
  readonly vif: number | null;
}

export interface FitPrediction {
  readonly settings: Readonly<Record<string, number | string>>;
  readonly predicted: number;
  readonly standardError: number | null;
  readonly ciLow: number | null;
  readonly ciHigh: number | null;
  readonly piLow: number | null;
  readonly piHigh: number | null;
}

interface Check {
  readonly statistic: number | null;
  readonly p: number | null;
  readonly message: string;
}

export interface FitAnswer {
  readonly terms: readonly FitTerm[];
  readonly realUnits: readonly { term: string; estimate: number; standardError: number | null }[];
  readonly anova: {
    readonly block: AnovaLine | null;
    readonly model: AnovaLine;
    readonly residual: AnovaLine;
    readonly lackOfFit: AnovaLine | null;
    readonly pureError: AnovaLine | null;
    readonly total: AnovaLine;
    readonly sequential: readonly NamedAnovaLine[];
    readonly partial: readonly NamedAnovaLine[];
  };
  readonly summary: {
    readonly n: number;
    readonly parameters: number;
    readonly rSquared: number | null;
    readonly adjustedRSquared: number | null;
    readonly predictedRSquared: number | null;
    readonly press: number | null;
    readonly residualSd: number | null;
    readonly aicc: number | null;
    readonly bic: number | null;
    readonly conditionNumber: number;
    readonly agreementDigits: number;
  };
  readonly diagnostics: readonly {
    readonly id: string | number;
    readonly observed: number;
    readonly fitted: number;
    readonly residual: number;
    readonly leverage: number;
    readonly studentizedInternal: number | null;
    readonly studentizedExternal: number | null;
    readonly cooksDistance: number | null;
  }[];
  readonly checks: {
    readonly normality: Check;
    readonly constantSpread: Check;
    readonly runOrder: Check;
  };
  readonly canonical: {
    readonly stationaryPoint: Readonly<Record<string, number>>;
    readonly coded: Readonly<Record<string, number>>;
    readonly nature: 'maximum' | 'minimum' | 'saddle' | 'ridge';
    readonly inRegion: boolean;
    readonly eigenvalues: readonly number[];
    readonly eigenvectors: readonly (readonly number[])[];
    readonly predicted: number;
    readonly standardError: number | null;
  } | null;
  readonly predictions: readonly FitPrediction[];
  /** Enough to predict anywhere: (XᵀX)⁻¹ of the coded terms, with blocks first after the intercept. */
  readonly covariance: {
    readonly terms: readonly string[];
    readonly unscaled: readonly (readonly number[])[];
    readonly residualSd: number | null;
    readonly df: number;
  };
  readonly transform: {
    readonly kind: 'none' | 'log' | 'sqrt' | 'logit' | 'boxcox';
    readonly lower: number | null;
    readonly upper: number | null;
    /** logit: runs used when the values were moved off the bounds, else 0. */
    readonly movedBy: number;
    readonly lambda: number | null;
    readonly lambdaLow: number | null;
    readonly lambdaHigh: number | null;
  };
  /** Why inference is missing (as many runs as terms, a perfect fit), else null. */
  readonly reason: string | null;
  readonly warnings: readonly { code: string; message: string }[];
}
