import { brokenLimits } from '@shared/study/envelope';
import { fullSetting } from '@shared/study/plan';
import type { EnvelopeJson } from '@shared/schemas/rig';
import type { StudyJson } from '@shared/schemas/study';
import { z } from 'zod';
import { CalculationError } from '@/engine/engine';
import type { LaidOut } from './pegs';

const settingsSchema = z.record(z.string(), z.union([z.number(), z.string()]));

/** What the engine tells with `outside-envelope`: the settings that can be dialled and those that cannot. */
const outsideSchema = z.object({
  inside: z.array(settingsSchema),
  points: z.array(z.object({ settings: settingsSchema })),
  alternatives: z.array(z.string()),
});

export interface Refusal {
  readonly message: string;
  /** The limits that its points break, each once, in the words of the rig. */
  readonly limits: readonly string[];
  readonly points: readonly LaidOut[];
}

/** Why a plan cannot be had: the limits in the rig’s words when its points leave the envelope. */
export function refusalOf(
  error: Error | null,
  brief: NonNullable<StudyJson['brief']>,
  envelope: EnvelopeJson,
): Refusal | null {
  if (!error) return null;
  const { data } = outsideSchema.safeParse(error instanceof CalculationError ? error.details : {});
  if (!data) return { message: error.message, limits: [], points: [] };
  const broken = data.points.flatMap(({ settings }) =>
    brokenLimits(envelope, fullSetting(brief, settings)).map(({ message }) => message),
  );
  const count = data.points.length;
  return {
    message: `${count} of its ${count + data.inside.length} settings cannot be dialled in. Take ${data.alternatives.join(', ')}, or narrower ranges.`,
    limits: [...new Set(broken)],
    points: [
      ...data.inside.map((settings) => ({ settings, isBroken: false })),
      ...data.points.map(({ settings }) => ({ settings, isBroken: true })),
    ],
  };
}
