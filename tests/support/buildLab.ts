import { randomUUID } from 'node:crypto';
import type { Express } from 'express';
import request, { type Test } from 'supertest';
import { ROLES, type Role } from '@shared/schemas/account';
import type { EnvelopeJson } from '@shared/schemas/rig';
import type { BriefInput } from '@shared/schemas/study';
import { systemContext, type Context } from '@server/context';
import { Customer } from '@server/models/Customer';
import { Lab } from '@server/models/Lab';
import { Person } from '@server/models/Person';
import { Rig } from '@server/models/Rig';
import { RigEnvelope } from '@server/models/RigEnvelope';
import { SieveStack } from '@server/models/SieveStack';
import { hashPassword } from '@server/passwords';
import { services } from '@server/runtime';
import { openSession } from '@server/services/openSession';

export const PASSWORD = 'a password for the tests';

export const ENVELOPE: EnvelopeJson = {
  voltage: { min: 90, max: 200, step: 5 },
  gap: { min: 10, max: 40, step: 1 },
  pulses: { min: 1, max: 200, step: 1 },
  frequency: { min: 0.5, max: 5, step: 0.5 },
  stageCapacitanceNf: 320,
  stages: 10,
  chargingPowerW: 2800,
  fieldMinKvPerMm: 3,
  fieldMaxKvPerMm: 12,
  waterL: 3,
};

type Verb = 'get' | 'post' | 'put' | 'delete';

/** A lab of its own with one person for each role, a rig, a sieve stack and a customer. */
export interface BuiltLab {
  readonly lab: Lab;
  readonly people: Readonly<Record<Role, Person>>;
  readonly customer: Customer;
  readonly rig: Rig;
  readonly stack: SieveStack;
  /** A request as the person of this role; creates get an idempotency key unless one is set. */
  as(role: Role, verb: Verb, path: string, body?: object): Test;
}

async function buildPerson(lab: Lab, role: Role, customerId: number | null, ctx: Context) {
  return Person.create(
    {
      labId: lab.id,
      name: `${role} of ${lab.code}`,
      email: `${role}.${lab.code.toLowerCase()}@lab.example`,
      roles: [role],
      customerId: role === 'customer' ? customerId : null,
      passwordHash: await hashPassword(PASSWORD),
    },
    ctx,
  );
}

let counter = 0;

export async function buildLab(
  app: Express,
  options: { twoPersonRule?: boolean } = {},
): Promise<BuiltLab> {
  const code = `T${process.pid.toString(36)}${(counter++).toString(36)}`.toUpperCase();
  const built = await services().sequelize.transaction(async (transaction) => {
    const lab = await Lab.create(
      { name: `Test lab ${code}`, code, twoPersonRule: options.twoPersonRule ?? true },
      systemContext(0, transaction),
    );
    const ctx = systemContext(lab.id, transaction);
    const customer = await Customer.create({ labId: lab.id, name: `Customer ${code}` }, ctx);
    const people = {} as Record<Role, Person>;
    for (const role of ROLES) people[role] = await buildPerson(lab, role, customer.id, ctx);
    const rig = await Rig.create({ labId: lab.id, name: 'Rig 1' }, ctx);
    await RigEnvelope.create(
      { labId: lab.id, rigId: rig.id, revision: 1, envelope: ENVELOPE },
      ctx,
    );
    const stack = await SieveStack.create(
      { labId: lab.id, name: 'Stack', frameDiameterMm: 200, aperturesMm: [4, 2, 1, 0.5, 0.125] },
      ctx,
    );
    const tokens = {} as Record<Role, string>;
    for (const role of ROLES)
      tokens[role] = (await openSession(people[role], transaction)).accessToken;
    return { lab, people, customer, rig, stack, tokens };
  });
  const { tokens, ...rest } = built;
  return {
    ...rest,
    as(role, verb, path, body) {
      const test = request(app)[verb](`/api${path}`).set('Authorization', `Bearer ${tokens[role]}`);
      if (verb === 'post') void test.set('Idempotency-Key', randomUUID());
      return body === undefined ? test : test.send(body);
    },
  };
}

export const sampleBody = (lab: BuiltLab) => ({
  name: 'Test granite',
  customerId: lab.customer.id,
  material: 'granite',
  receivedMassG: 12_000,
  receivedOn: '2026-11-02',
  screened: true as const,
});

/** Two factors, one derived and one computed response; the held set-points are on a step. */
export const briefBody = (
  lab: BuiltLab,
  sampleId: number,
  change: Partial<BriefInput> = {},
): BriefInput => ({
  title: 'Sand from granite',
  question: 'How much passes 2 mm?',
  sampleId,
  rigId: lab.rig.id,
  sieveStackId: lab.stack.id,
  factors: [
    { key: 'voltage', low: 130, high: 170, scale: 'linear' },
    { key: 'pulses', low: 20, high: 60, scale: 'linear' },
  ],
  fixed: { voltage: null, gap: 25, pulses: null, frequency: 2 },
  responses: [
    {
      key: 'passing2',
      name: 'Passing 2 mm',
      kind: 'passing',
      unit: '%',
      apertureMm: 2,
      percent: null,
      aim: 'maximise',
      low: 60,
      high: 90,
      target: null,
      priority: 1,
    },
    {
      key: 'energy',
      name: 'Specific energy',
      kind: 'specificEnergy',
      unit: 'kWh/t',
      apertureMm: null,
      percent: null,
      aim: 'minimise',
      low: 5,
      high: 30,
      target: null,
      priority: 1,
    },
  ],
  batchMassG: 300,
  handlingMinutes: 20,
  massLimitG: null,
  runLimit: null,
  dayLimit: null,
  effectThatMatters: null,
  expectedSpread: null,
  practiceMaterial: null,
  ...change,
});

export const PLAN = {
  kind: 'centralComposite',
  options: { alpha: 'faceCentred' },
  blocks: 1,
  centrePoints: 3,
  replicates: 1,
  seed: 7,
};

interface RunLike {
  readonly number: number;
  readonly version: number;
  readonly settings: { readonly voltage: number; readonly pulses: number };
}

/** Masses that add up, with a smooth made-up response: more voltage and pulses, finer product. */
export function recordBody(run: RunLike) {
  const u = (run.settings.voltage - 150) / 20;
  const v = (run.settings.pulses - 40) / 20;
  const wobble = ((run.number * 7) % 5) / 4 - 0.5;
  const finer = Math.max(5, 75 + 8 * u + 9 * v - 2 * u * v - 3 * v * v + wobble);
  const shares = [0.3 * (100 - finer), 0.7 * (100 - finer), 0.4 * finer, 0.3 * finer, 0.2 * finer];
  const masses = shares.map((share) => Math.round(share * 29.9) / 10);
  const panG = Math.round((299 - masses.reduce((sum, mass) => sum + mass, 0)) * 10) / 10;
  const apertures = [4, 2, 1, 0.5, 0.125];
  return {
    actual: { voltage: null, gap: null, pulses: run.settings.pulses, frequency: null },
    feedMassG: 300,
    beforeSievingG: 299.4,
    sieves: [
      ...apertures.map((apertureMm, i) => ({ apertureMm, retainedG: masses[i] ?? 0 })),
      { apertureMm: 0, retainedG: panG },
    ],
    version: run.version,
  };
}

export interface BuiltStudy {
  readonly sampleId: number;
  readonly studyId: number;
}

/** A study with its Brief, by the API and by those who may. */
export async function buildBrief(
  lab: BuiltLab,
  change: Partial<BriefInput> = {},
): Promise<BuiltStudy> {
  const sample = await lab.as('researcher', 'post', '/samples', sampleBody(lab)).expect(201);
  const sampleId = sample.body.id as number;
  const study = await lab
    .as('researcher', 'post', '/studies', { title: 'Sand from granite', sampleId })
    .expect(201);
  const studyId = study.body.id as number;
  await lab
    .as('researcher', 'put', `/studies/${studyId}/brief`, {
      brief: briefBody(lab, sampleId, change),
      version: study.body.version,
    })
    .expect(200);
  return { sampleId, studyId };
}

export async function versionOf(lab: BuiltLab, studyId: number): Promise<number> {
  const study = await lab.as('lead', 'get', `/studies/${studyId}`).expect(200);
  return study.body.version as number;
}

/** … with a frozen face-centred matrix of 11 runs. */
export async function buildFrozen(
  lab: BuiltLab,
  change: Partial<BriefInput> = {},
): Promise<BuiltStudy> {
  const built = await buildBrief(lab, change);
  await lab
    .as('researcher', 'post', `/studies/${built.studyId}/matrix`, {
      plan: PLAN,
      version: await versionOf(lab, built.studyId),
    })
    .expect(201);
  return built;
}

export async function runsOf(lab: BuiltLab, studyId: number) {
  const runs = await lab.as('operator', 'get', `/studies/${studyId}/runs`).expect(200);
  return runs.body as (RunLike & { id: number; status: string; results: Record<string, number> })[];
}

/** … with every run recorded. */
export async function buildRecorded(lab: BuiltLab): Promise<BuiltStudy> {
  const built = await buildFrozen(lab);
  for (const run of await runsOf(lab, built.studyId))
    await lab
      .as('operator', 'put', `/studies/${built.studyId}/runs/${run.id}`, recordBody(run))
      .expect(200);
  return built;
}

/** … with the model of its derived response kept by the analyst. */
export async function buildFitted(lab: BuiltLab): Promise<BuiltStudy> {
  const built = await buildRecorded(lab);
  await lab
    .as('analyst', 'post', `/studies/${built.studyId}/fits`, {
      responseKey: 'passing2',
      terms: ['voltage', 'pulses', 'voltage:pulses', 'pulses^2'],
    })
    .expect(201);
  return built;
}
