import { isStaff, onlyFor, type Rule } from './actor';

const staff =
  (what: string): Rule =>
  (actor) =>
    isStaff(actor)
      ? null
      : `${what} is for the people of the lab. Your samples are on your own page.`;

export const samplePolicy = {
  read: staff('The sample store'),
  register: (actor) => onlyFor(actor, 'Registering a sample', 'researcher', 'lead'),
  correct: (actor) => onlyFor(actor, 'Correcting a sample', 'researcher', 'lead'),
  enterStock: (actor) => onlyFor(actor, 'Entering stock', 'researcher', 'operator', 'lead'),
} satisfies Record<string, Rule>;

export const rigPolicy = {
  read: staff('The rig’s envelope'),
  revise: (actor) => onlyFor(actor, 'Changing a rig’s envelope', 'admin'),
} satisfies Record<string, Rule>;

export const sieveStackPolicy = {
  read: staff('The list of sieves'),
  register: (actor) => onlyFor(actor, 'Registering a sieve stack', 'admin'),
} satisfies Record<string, Rule>;

export const personPolicy = {
  read: (actor) => onlyFor(actor, 'The list of people', 'admin'),
  invite: (actor) => onlyFor(actor, 'Inviting people', 'admin'),
  change: (actor) => onlyFor(actor, 'Changing roles', 'admin'),
} satisfies Record<string, Rule>;

export const customerPolicy = {
  read: staff('The list of customers'),
  register: (actor) => onlyFor(actor, 'Registering a customer', 'researcher', 'lead', 'admin'),
  readOwnSamples: (actor) => onlyFor(actor, 'This page', 'customer'),
} satisfies Record<string, Rule>;

export const labPolicy = {
  read: staff('The rules of the lab'),
  change: (actor) => onlyFor(actor, 'Changing the rules of the lab', 'admin'),
} satisfies Record<string, Rule>;

export const calculationPolicy = {
  use: staff('The calculator'),
} satisfies Record<string, Rule>;
