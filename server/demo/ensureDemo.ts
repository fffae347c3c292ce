import { ROLES, type Role } from '@shared/schemas/account';
import type { Transaction } from 'sequelize';
import { systemContext, contextOfPerson, type Context } from '../context';
import { Counter } from '../models/Counter';
import { Customer } from '../models/Customer';
import { Lab } from '../models/Lab';
import { Person } from '../models/Person';
import { Rig } from '../models/Rig';
import { RigEnvelope } from '../models/RigEnvelope';
import { SieveStack } from '../models/SieveStack';
import { hashPassword } from '../passwords';
import { services } from '../runtime';
import { issueInvitation } from '../services/invitePerson';
import { registerSample } from '../services/registerSample';
import {
  DEMO_CUSTOMERS,
  DEMO_DOMAIN,
  DEMO_ENVELOPE,
  DEMO_LAB,
  DEMO_PASSWORD,
  DEMO_PEOPLE,
  DEMO_STACKS,
} from './demoLab';
import { benchStudy, briefStudy, finishedStudy, type DemoWorld } from './demoStudies';

async function makePeople(lab: Lab, customerId: number, ctx: Context) {
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const people = new Map<Role, Person>();
  for (const { role, name } of DEMO_PEOPLE)
    people.set(
      role,
      await Person.create(
        {
          labId: lab.id,
          name,
          email: `${role}@${DEMO_DOMAIN}`,
          roles: [role],
          customerId: role === 'customer' ? customerId : null,
          passwordHash,
        },
        ctx,
      ),
    );
  const of = (role: Role): Person => {
    const person = people.get(role);
    if (!person) throw new Error(`The demo lab has no ${role}.`);
    return person;
  };
  return Object.fromEntries(ROLES.map((role) => [role, of(role)])) as Record<Role, Person>;
}

async function makeSamples(
  customers: readonly Customer[],
  ctx: Context,
): Promise<{ granite: number; concrete: number; board: number }> {
  const [stone, demolition] = customers;
  const register = async (
    input: Omit<Parameters<typeof registerSample>[0], 'screened' | 'found' | 'storage'>,
  ) => {
    const full = { ...input, screened: true as const, found: [], storage: 'shelf 3, dry' };
    return (await registerSample(full, ctx, { isSimulated: true })).id;
  };
  const common = { receivedOn: '2026-11-02', moisturePercent: 0.4 };
  return {
    granite: await register({
      ...common,
      name: 'Quernby granite',
      customerId: stone?.id ?? null,
      material: 'Granite, massive',
      description: 'Invented. Fist-sized pieces, bagged by mass to 300 g.',
      receivedMassG: 12_400,
      feedFromMm: 45,
      feedToMm: 63,
      cautions: [],
    }),
    concrete: await register({
      ...common,
      name: 'Harbour wall concrete',
      customerId: demolition?.id ?? null,
      material: 'Concrete with river gravel',
      description: 'Invented. Crushed to 22 to 45 mm, rinsed before treatment.',
      receivedMassG: 9_000,
      feedFromMm: 22.4,
      feedToMm: 45,
      cautions: ['saltyOrClayey'],
    }),
    board: await register({
      ...common,
      name: 'Board mix B',
      customerId: stone?.id ?? null,
      material: 'Printed circuit boards, cut to 30 mm',
      description: 'Invented. Batteries and large capacitors taken off by hand.',
      receivedMassG: 4_200,
      feedFromMm: 16,
      feedToMm: 45,
      cautions: ['solidMetal'],
    }),
  };
}

async function loadDemo(transaction: Transaction): Promise<void> {
  const lab = await Lab.create(
    { name: DEMO_LAB.name, code: DEMO_LAB.code, isDemo: true },
    systemContext(0, transaction),
  );
  const ctx = systemContext(lab.id, transaction);
  await Counter.create(
    { labId: lab.id, noun: 'study', value: DEMO_LAB.firstStudy },
    { transaction },
  );
  await Counter.create(
    { labId: lab.id, noun: 'sample', value: DEMO_LAB.firstSample },
    { transaction },
  );
  const customers = [];
  for (const name of DEMO_CUSTOMERS)
    customers.push(await Customer.create({ labId: lab.id, name }, ctx));
  const people = await makePeople(lab, customers[0]?.id ?? 0, ctx);
  const admin = contextOfPerson(people.admin, transaction);
  const rig = await Rig.create({ labId: lab.id, name: 'Rig 2', isSimulated: true }, admin);
  await RigEnvelope.create(
    { labId: lab.id, rigId: rig.id, revision: 1, envelope: DEMO_ENVELOPE },
    admin,
  );
  const stacks = [];
  for (const stack of DEMO_STACKS)
    stacks.push(await SieveStack.create({ labId: lab.id, ...stack }, admin));
  const samples = await makeSamples(customers, contextOfPerson(people.researcher, transaction));
  const world: DemoWorld = {
    transaction,
    people,
    rigId: rig.id,
    stackIds: [stacks[0]?.id ?? 0, stacks[1]?.id ?? 0],
    aperturesMm: DEMO_STACKS.map(({ aperturesMm }) => aperturesMm),
  };
  await finishedStudy(world, samples.granite);
  await benchStudy(world, samples.concrete);
  await briefStudy(world, samples.board);
}

/** Loads the demo lab on the first start; all of it or nothing. */
export async function ensureDemo(): Promise<void> {
  if ((await Lab.count({ where: { isDemo: true } })) > 0) return;
  await services().sequelize.transaction(loadDemo);
}

/**
 * Demo people have a password that everybody knows, so they may not be reached from another machine.
 *
 * @param giveUp ends the start with a sentence.
 */
export async function refuseDemoPeople(giveUp: (sentence: string) => never): Promise<void> {
  const { isLoopback } = services().config;
  if (isLoopback || (await Lab.count({ where: { isDemo: true } })) === 0) return;
  giveUp(
    'This data folder has the demo people, whose password everybody knows. Use HOST=127.0.0.1, or start with CRAGLINE_DEMO=0 and another data folder (CRAGLINE_DATA).',
  );
}

const FIRST_ADMIN = { name: 'First administrator', email: 'admin@localhost.example' };

/** On an empty database: a lab with one admin, and the one-time address to choose a password. */
export async function inviteFirstAdmin(): Promise<string | null> {
  if ((await Person.count({ where: {} })) > 0) return null;
  return services().sequelize.transaction(async (transaction) => {
    const lab = await Lab.create({ name: 'New lab', code: 'LAB' }, systemContext(0, transaction));
    const person = await Person.create(
      { ...FIRST_ADMIN, labId: lab.id, roles: ['admin'], customerId: null, passwordHash: null },
      systemContext(lab.id, transaction),
    );
    return (await issueInvitation(person, { transaction })).address;
  });
}
