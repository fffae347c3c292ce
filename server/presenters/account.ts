import type { CustomerJson, PersonJson, UserJson } from '@shared/schemas/account';
import type { Customer } from '../models/Customer';
import type { Lab } from '../models/Lab';
import type { Person } from '../models/Person';

export function presentPerson(person: Person): PersonJson {
  const { id, name, email, roles, customerId, isActive, version } = person;
  return {
    id,
    name,
    email,
    roles,
    customerId,
    isActive,
    hasPassword: person.passwordHash !== null,
    version,
  };
}

/** A person with lab and customer loaded, as their own page knows them. */
export function presentUser(person: Person): UserJson {
  const { id, name, email, roles, lab, customer } = person;
  if (!lab) throw new Error('presentUser needs the person’s lab.');
  return {
    id,
    name,
    email,
    roles,
    lab: { id: lab.id, name: lab.name, twoPersonRule: lab.twoPersonRule, isDemo: lab.isDemo },
    customer: customer ? { id: customer.id, name: customer.name } : null,
  };
}

export function presentCustomer({ id, name, version }: Customer): CustomerJson {
  return { id, name, version };
}

export function presentLab({ id, name, twoPersonRule, version }: Lab) {
  return { id, name, twoPersonRule, version };
}
