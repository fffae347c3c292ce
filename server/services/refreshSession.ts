import type { Transaction } from 'sequelize';
import { Customer } from '../models/Customer';
import { Lab } from '../models/Lab';
import { Person } from '../models/Person';
import { Session } from '../models/Session';
import { randomToken, signAccessToken, tokenHash } from '../tokens';
import type { OpenedSession } from './openSession';
import { recordEvent } from './recordEvent';

/** Two tabs may refresh at once: the token just replaced is good for a moment longer. */
const GRACE_MS = 10_000;

const WITH_PERSON = {
  model: Person,
  as: 'person',
  include: [
    { model: Lab, as: 'lab' },
    { model: Customer, as: 'customer' },
  ],
};

export interface Refreshed {
  readonly person: Person;
  /** `refreshToken` is null within the grace: the other tab has already been given the new one. */
  readonly session: Omit<OpenedSession, 'refreshToken'> & { refreshToken: string | null };
}

const isOver = (session: Session) =>
  session.revokedAt !== null || session.expiresAt.getTime() <= Date.now();

/**
 * Exchanges a refresh token for a new one. A token that was already exchanged ends its whole session:
 * somebody has a copy.
 *
 * @returns null when the token is worth nothing (any more).
 */
export async function refreshSession(
  token: string,
  requestId: string,
  transaction: Transaction,
): Promise<Refreshed | null> {
  const hash = tokenHash(token);
  const options = {
    include: WITH_PERSON,
    transaction,
    lock: { level: transaction.LOCK.UPDATE, of: Session },
  };
  const current = await Session.findOne({ where: { tokenHash: hash }, ...options });
  const session =
    current ?? (await Session.findOne({ where: { previousTokenHash: hash }, ...options }));
  const person = session?.person;
  if (!session || !person || isOver(session) || !person.isActive) return null;
  const { expiresAt } = session;
  const accessToken = signAccessToken({ personId: person.id, sessionId: session.id });
  if (current) {
    const refreshToken = randomToken();
    await session.update(
      { tokenHash: tokenHash(refreshToken), previousTokenHash: hash, rotatedAt: new Date() },
      { transaction },
    );
    return { person, session: { accessToken, refreshToken, expiresAt } };
  }
  if (Date.now() - session.rotatedAt.getTime() <= GRACE_MS)
    return { person, session: { accessToken, refreshToken: null, expiresAt } };
  await session.update({ revokedAt: new Date() }, { transaction });
  await recordEvent(
    {
      labId: person.labId,
      person,
      action: 'used an old refresh token',
      requestId,
      why: 'The session was ended: its token was used twice.',
    },
    transaction,
  );
  return null;
}
