import type { candidateInputSchema } from '@shared/schemas/release';
import { brokenLimits } from '@shared/study/envelope';
import type { z } from 'zod';
import type { Context } from '../context';
import { conflict, HttpError, impossible } from '../errors';
import { Candidate } from '../models/Candidate';
import type { Study } from '../models/Study';
import { briefOf } from './briefOf';

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ';

/** Keeps a settable setting with the study, under the next letter. */
export async function takeCandidate(
  study: Study,
  { settings, note }: z.output<typeof candidateInputSchema>,
  ctx: Context,
): Promise<Candidate> {
  const { envelope } = briefOf(study);
  const issues = brokenLimits(envelope, settings).map(({ key, message }) => ({
    path: `settings.${key}`,
    message,
  }));
  if (issues.length > 0)
    throw new HttpError(422, 'outside-envelope', issues[0]?.message ?? '', { issues });
  const taken = await Candidate.findAll({
    where: { studyId: study.id },
    transaction: ctx.transaction,
  });
  const same = taken.find(
    (each) =>
      each.settings.voltage === settings.voltage &&
      each.settings.gap === settings.gap &&
      each.settings.pulses === settings.pulses &&
      each.settings.frequency === settings.frequency,
  );
  if (same) throw conflict('exists', `This setting is candidate ${same.letter} already.`);
  const letter = LETTERS[taken.length];
  if (letter === undefined)
    throw impossible('too-many', 'A study keeps at most 26 candidates.', 'settings');
  return Candidate.create(
    { labId: study.labId, studyId: study.id, letter, settings, note, byId: ctx.actor.id },
    ctx,
  );
}
