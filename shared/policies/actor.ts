import type { Role } from '../schemas/account';

/** Who asks: the facts about a person that permissions depend on. */
export interface Actor {
  readonly id: number;
  readonly labId: number;
  readonly roles: readonly Role[];
  readonly customerId: number | null;
}

/**
 * A rule answers null when the actor may, or one plain sentence why not. The server refuses with the
 * sentence; the client shows it where the button would be.
 */
export type Rule<Facts = undefined> = (actor: Actor, facts: Facts) => string | null;

export function has(actor: Actor, ...roles: Role[]): boolean {
  return roles.some((role) => actor.roles.includes(role));
}

/** Everyone of the lab but customers. */
export function isStaff(actor: Actor): boolean {
  return has(actor, 'researcher', 'operator', 'analyst', 'lead', 'admin');
}

const PLURAL: Record<Role, string> = {
  researcher: 'researchers',
  operator: 'operators',
  analyst: 'analysts',
  lead: 'leads',
  customer: 'customers',
  admin: 'admins',
};

/** "Freezing a matrix is for researchers and leads. You are signed in as operator." */
export function onlyFor(actor: Actor, deed: string, ...roles: Role[]): string | null {
  if (has(actor, ...roles)) return null;
  const names = roles.map((role) => PLURAL[role]);
  const whom =
    names.length > 1 ? `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}` : names[0];
  return `${deed} is for ${whom ?? 'nobody'}. You are signed in as ${actor.roles.join(' and ')}.`;
}
