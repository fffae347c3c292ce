import { z } from 'zod';
import { lineSchema } from './text';

const number = z.number('Enter a number.');

/**
 * How a response comes about. Derived ones follow from sieve masses or settings and are never typed:
 * passing at a size, size at a passing, specific energy, duration. Measured ones are typed by a person.
 */
export const RESPONSE_KINDS = [
  'passing',
  'size',
  'specificEnergy',
  'duration',
  'measured',
] as const;
export const responseKindSchema = z.enum(RESPONSE_KINDS);
export type ResponseKind = z.infer<typeof responseKindSchema>;

export const AIMS = ['maximise', 'minimise', 'target', 'within', 'observe'] as const;
export const aimSchema = z.enum(AIMS);
export type Aim = z.infer<typeof aimSchema>;

const responseFields = z.strictObject({
  key: z
    .string()
    .regex(
      /^[a-z][A-Za-z0-9]{0,39}$/,
      'A key starts with a small letter; letters and digits follow.',
    ),
  name: lineSchema('A name for the response', 60),
  kind: responseKindSchema,
  unit: z.string().max(20),
  /** passing: the size that it passes. */
  apertureMm: number.positive('A size is above 0 mm.').max(200).nullable().default(null),
  /** size: the share that passes it. */
  percent: number.gt(0).lt(100).nullable().default(null),
  aim: aimSchema,
  low: number.nullable().default(null),
  high: number.nullable().default(null),
  target: number.nullable().default(null),
  priority: number.positive().max(10).default(1),
});
export type ResponseInput = z.infer<typeof responseFields>;

const LIMIT_SENTENCE: Record<Exclude<Aim, 'observe'>, string> = {
  maximise:
    'To be at least a value, the goal needs its lower limit, and above it the value that fully satisfies.',
  minimise:
    'To be at most a value, the goal needs its upper limit, and below it the value that fully satisfies.',
  target: 'A target needs a lower limit, the target, and an upper limit.',
  within: 'A range needs its lower and its upper limit.',
};

/** The limit that a goal still lacks, if any. */
function missingLimit({ aim, low, high, target }: ResponseInput): string | null {
  if (low === null) return 'low';
  if (high === null) return 'high';
  return aim === 'target' && target === null ? 'target' : null;
}

function checkGoal(response: ResponseInput, issue: (path: string, message: string) => void): void {
  const { aim, low, high, target } = response;
  if (aim === 'observe') return;
  const missing = missingLimit(response);
  if (missing !== null) issue(missing, LIMIT_SENTENCE[aim]);
  if (low === null || high === null) return;
  if (low >= high) issue('high', `${low} to ${high}: the larger limit comes second.`);
  if (aim === 'target' && target !== null && (target <= low || target >= high))
    issue('target', `The target ${target} lies outside its limits ${low} to ${high}.`);
}

export const responseInputSchema = responseFields.superRefine((response, ctx) => {
  const issue = (path: string, message: string) => {
    ctx.addIssue({ code: 'custom', path: [path], message });
  };
  if (response.kind === 'passing' && response.apertureMm === null)
    issue('apertureMm', 'Passing needs the sieve size that it passes.');
  if (response.kind === 'size' && response.percent === null)
    issue('percent', 'A size needs the share of mass that passes it.');
  checkGoal(response, issue);
});

export type ResponseJson = ResponseInput;

/** The share of a percent response; other units have no natural bounds above. */
export function boundsOf(
  response: Pick<ResponseJson, 'kind' | 'unit'>,
): { lower: number; upper: number } | null {
  return response.kind === 'passing' || response.unit === '%' ? { lower: 0, upper: 100 } : null;
}

export function isComputed(response: Pick<ResponseJson, 'kind'>): boolean {
  return response.kind === 'specificEnergy' || response.kind === 'duration';
}
