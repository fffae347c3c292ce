import type { Transaction } from 'sequelize';
import type { Person } from '../models/Person';
import { Session } from '../models/Session';
import { randomToken, signAccessToken, tokenHash } from '../tokens';

/** A person at the bench may put the tablet down for a shift; after this they sign in again. */
export const SESSION_HOURS = 12;

export interface OpenedSession {
  readonly accessToken: string;
  readonly refreshToken: string;
  readonly expiresAt: Date;
}

/** A new session for a person who has just proved who they are. */
export async function openSession(
  person: Person,
  transaction: Transaction,
): Promise<OpenedSession> {
  const refreshToken = randomToken();
  const now = new Date();
  const expiresAt = new Date(now.getTime() + SESSION_HOURS * 3_600_000);
  const session = await Session.create(
    {
      labId: person.labId,
      personId: person.id,
      tokenHash: tokenHash(refreshToken),
      previousTokenHash: null,
      rotatedAt: now,
      expiresAt,
      revokedAt: null,
    },
    { transaction },
  );
  const accessToken = signAccessToken({ personId: person.id, sessionId: session.id });
  return { accessToken, refreshToken, expiresAt };
}
