import type { ByLine } from '@shared/schemas/identity';
import type { Person } from '../models/Person';

/** The person as named on a record. */
export function byLine(person: Person | null | undefined): ByLine {
  if (!person) throw new Error('A record was presented without the person who made it.');
  return { id: person.id, name: person.name };
}
