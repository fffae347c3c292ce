import type { Actor } from '@shared/policies/actor';
import { useUser } from '@/queries/session';

/** The signed-in person as the policies see them. */
export function useActor(): Actor {
  const { id, lab, roles, customer } = useUser();
  return { id, labId: lab.id, roles, customerId: customer?.id ?? null };
}
