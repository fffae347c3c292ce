import { AuditEvent } from '../models/AuditEvent';
import type { Transaction } from 'sequelize';

interface AccountEvent {
  readonly labId: number;
  readonly person: { id: number; name: string; roles: readonly string[] } | null;
  readonly action: string;
  readonly requestId: string;
  readonly why?: string;
}

/** An event that changes no record of its own: signing in and out, a failed signature. */
export async function recordEvent(event: AccountEvent, transaction: Transaction): Promise<void> {
  const { labId, person, action, requestId, why } = event;
  await AuditEvent.create(
    {
      labId,
      actorId: person?.id ?? null,
      actorName: person?.name ?? null,
      actorRoles: person?.roles.join(', ') ?? null,
      noun: 'session',
      nounId: person?.id ?? null,
      studyId: null,
      action,
      before: null,
      after: null,
      why: why ?? null,
      requestId,
    },
    { transaction },
  );
}
