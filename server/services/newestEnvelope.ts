import type { Context } from '../context';
import { notFound } from '../errors';
import { Rig } from '../models/Rig';
import { RigEnvelope } from '../models/RigEnvelope';

/** The newest envelope of each rig of the actor's lab, by the rig's name. */
export async function newestEnvelopes({ actor, transaction }: Context): Promise<RigEnvelope[]> {
  const all = await RigEnvelope.findAll({
    where: { labId: actor.labId },
    include: { model: Rig, as: 'rig' },
    order: [['revision', 'DESC']],
    transaction,
  });
  const newest = all.filter(
    ({ rigId }, i) => all.findIndex((other) => other.rigId === rigId) === i,
  );
  return newest.sort((a, b) => (a.rig?.name ?? '').localeCompare(b.rig?.name ?? ''));
}

/** The newest envelope of one rig of the actor's lab. @throws HttpError 404 when there is none. */
export async function newestEnvelope(
  rigId: number,
  { actor, transaction }: Context,
): Promise<RigEnvelope> {
  const envelope = await RigEnvelope.findOne({
    where: { rigId, labId: actor.labId },
    include: { model: Rig, as: 'rig' },
    order: [['revision', 'DESC']],
    transaction,
  });
  if (!envelope) throw notFound('rig');
  return envelope;
}
