import type { AuditEventJson } from '@shared/schemas/history';
import type { AuditEvent } from '../models/AuditEvent';

export function presentAuditEvent(event: AuditEvent): AuditEventJson {
  const { id, at, actorId, actorName, noun, nounId, action, before, after, why } = event;
  return {
    id,
    at: at.toISOString(),
    by: actorId === null ? null : { id: actorId, name: actorName ?? '' },
    noun,
    nounId,
    action,
    before,
    after,
    why,
  };
}
