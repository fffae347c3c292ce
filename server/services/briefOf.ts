import type { EnvelopeJson } from '@shared/schemas/rig';
import type { BriefJson } from '@shared/schemas/study';
import { impossible } from '../errors';
import type { Study } from '../models/Study';
import { presentBrief } from '../presenters/study';

/** The saved Brief and the envelope it was planned on. @throws HttpError 422 while there is none. */
export function briefOf(study: Study): { brief: BriefJson; envelope: EnvelopeJson } {
  const brief = presentBrief(study);
  const envelope = study.rigEnvelope?.envelope;
  if (!brief || !envelope)
    throw impossible(
      'no-brief',
      'Save the Brief first: factors, responses and rig decide what can be planned.',
    );
  return { brief, envelope };
}
