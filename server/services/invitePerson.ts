import type { PersonInput } from '@shared/schemas/account';
import type { Context } from '../context';
import { conflict, notFound } from '../errors';
import { Customer } from '../models/Customer';
import { Invitation } from '../models/Invitation';
import { Person } from '../models/Person';
import { services } from '../runtime';
import { randomToken, tokenHash } from '../tokens';

const INVITATION_HOURS = 72;

export interface Invited {
  readonly person: Person;
  readonly address: string;
  readonly expiresAt: Date;
}

/** A fresh one-time address for a person; older ones stop working. */
export async function issueInvitation(
  person: Person,
  ctx: Pick<Context, 'transaction'>,
): Promise<Invited> {
  const { transaction } = ctx;
  await Invitation.update(
    { usedAt: new Date() },
    { where: { personId: person.id, usedAt: null }, transaction },
  );
  const token = randomToken();
  const expiresAt = new Date(Date.now() + INVITATION_HOURS * 3_600_000);
  await Invitation.create(
    {
      labId: person.labId,
      personId: person.id,
      tokenHash: tokenHash(token),
      expiresAt,
      usedAt: null,
    },
    { transaction },
  );
  // behind the hash: it is never sent to a server by itself, so it stands in no log
  return { person, address: `${services().config.publicUrl}/invitation#${token}`, expiresAt };
}

/** Adds a person to the actor's lab and hands out the address by which they choose a password. */
export async function invitePerson(input: PersonInput, ctx: Context): Promise<Invited> {
  const { labId } = ctx.actor;
  if (input.customerId !== null) {
    const customer = await Customer.findOne({
      where: { id: input.customerId, labId },
      transaction: ctx.transaction,
    });
    if (!customer) throw notFound('customer');
  }
  const known = await Person.findOne({
    where: { email: input.email },
    transaction: ctx.transaction,
  });
  if (known)
    throw conflict(
      'exists',
      'This e-mail address is taken. Each person has an address of their own.',
    );
  const person = await Person.create({ ...input, labId, passwordHash: null }, ctx);
  return issueInvitation(person, ctx);
}
