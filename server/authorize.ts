import type { Rule } from '@shared/policies/actor';
import type { SignedInActor } from './context';
import { forbidden } from './errors';

/** Policy → 403, with the policy's own sentence. */
export function authorize<Facts>(rule: Rule<Facts>, actor: SignedInActor, facts: Facts): void {
  const why = rule(actor, facts);
  if (why !== null) throw forbidden(why);
}
