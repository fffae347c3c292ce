import type { Transaction } from 'sequelize';
import { HttpError } from '../errors';
import { Customer } from '../models/Customer';
import { Invitation } from '../models/Invitation';
import { Lab } from '../models/Lab';
import { Person } from '../models/Person';
import { tokenHash } from '../tokens';

/**
 * The open invitation behind a one-time address, locked until the transaction ends.
 *
 * @throws HttpError 404 when it is used, out of date, or never was: which one is nobody's business.
 */
export async function findInvitation(
  token: string,
  transaction: Transaction,
): Promise<{ invitation: Invitation; person: Person; lab: Lab }> {
  const invitation = await Invitation.findOne({
    where: { tokenHash: tokenHash(token), usedAt: null },
    transaction,
    lock: true,
  });
  const isOpen = invitation !== null && invitation.expiresAt.getTime() > Date.now();
  const person = isOpen
    ? await Person.findOne({
        where: { id: invitation.personId, isActive: true },
        include: [
          { model: Lab, as: 'lab' },
          { model: Customer, as: 'customer' },
        ],
        transaction,
      })
    : null;
  if (!invitation || !person?.lab)
    throw new HttpError(
      404,
      'not-found',
      'This address has been used or is out of date. Ask the lab’s admin for a new one.',
    );
  return { invitation, person, lab: person.lab };
}
