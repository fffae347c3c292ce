import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ROLES, type Role } from '@shared/schemas/account';
import { routeTable } from '@server/endpoint';
import { Person } from '@server/models/Person';
import {
  briefBody,
  buildBrief,
  buildFitted,
  buildFrozen,
  buildLab,
  ENVELOPE,
  PLAN,
  recordBody,
  runsOf,
  sampleBody,
  type BuiltLab,
  type BuiltStudy,
} from '@tests/support/buildLab';
import { startTestApp, type TestApp } from '@tests/support/testApp';

/**
 * S-30: every route × every role, generated from the router. The table below says who may; a route that
 * is not in it fails the test. Creates and changes are sent with a stale version where they have one, so
 * that a permitted call answers 409 and leaves the next one the same state.
 */

const STAFF: readonly Role[] = ['researcher', 'operator', 'analyst', 'lead', 'admin'];
const STALE = 999_999;

interface World {
  readonly lab: BuiltLab;
  readonly brief: BuiltStudy;
  readonly frozen: BuiltStudy & { runId: number };
  readonly fitted: BuiltStudy & { fitId: number };
}

interface Expectation {
  readonly who: readonly Role[] | 'public' | 'everyone';
  readonly path?: (world: World) => string;
  readonly body?: (world: World) => object;
}

const factors = [
  { key: 'voltage', low: 120, high: 180 },
  { key: 'gap', low: 20, high: 30 },
];
const runs = [-1, 1].flatMap((a) =>
  [-1, 0, 1].map((b, i) => ({
    id: `${a}.${b}`,
    settings: { voltage: 150 + 30 * a, gap: 25 + 5 * b },
    value: 50 + 7 * a + 3 * b + i,
  })),
);
const study = (world: World) => `/studies/${world.frozen.studyId}`;

const TABLE: Readonly<Record<string, Expectation>> = {
  'get /health': { who: 'public' },
  'get /openapi.json': { who: 'public' },
  'post /auth/sign-in': { who: 'public', body: () => ({ email: 'a@b.example', password: 'x' }) },
  'post /auth/refresh': { who: 'public', body: () => ({}) },
  'post /auth/invitation': { who: 'public', body: () => ({ token: 'x'.repeat(30) }) },
  'post /auth/accept-invitation': {
    who: 'public',
    body: () => ({ token: 'x'.repeat(30), password: 'a long enough password' }),
  },
  'post /auth/sign-out': { who: 'everyone', body: () => ({ everywhere: false }) },
  'get /auth/me': { who: 'everyone' },
  'post /calc/design': { who: STAFF, body: () => ({ factors, kind: 'factorial' }) },
  'post /calc/evaluate': { who: STAFF, body: () => ({ factors, runs, model: 'linear' }) },
  'post /calc/fit': { who: STAFF, body: () => ({ factors, runs, model: 'linear' }) },
  'post /calc/select': {
    who: STAFF,
    body: () => ({ factors, runs, model: 'linear', method: 'backward', criterion: 'aicc' }),
  },
  'post /calc/choose': {
    who: STAFF,
    body: () => ({
      factors: factors.map((factor) => ({ ...factor, step: 5 })),
      responses: [{ key: 'y', model: 'linear', runs }],
      goals: [{ response: 'y', aim: 'maximise', low: 40, high: 80 }],
      draws: 100,
    }),
  },
  'post /calc/next': {
    who: STAFF,
    body: () => ({ factors, runs, model: 'linear', purpose: 'replicate', count: 2 }),
  },
  'post /calc/sieve': {
    who: STAFF,
    body: () => ({ feedMassG: 10, sieves: [{ apertureMm: 1, retainedG: 5 }], panG: 5 }),
  },
  'post /calc/energy': {
    who: STAFF,
    body: () => ({ capacitanceNf: 32, voltageKv: 150, pulses: 10, frequencyHz: 2, massG: 300 }),
  },
  'get /people': { who: ['admin'] },
  'post /people': {
    who: ['admin'],
    body: ({ lab }) => ({
      name: 'New person',
      email: `new.${lab.lab.code}@lab.example`,
      roles: ['operator'],
      customerId: null,
    }),
  },
  'post /people/:personId/invitation': {
    who: ['admin'],
    path: ({ lab }) => `/people/${lab.people.operator.id}/invitation`,
    body: () => ({}),
  },
  'put /people/:personId': {
    who: ['admin'],
    path: ({ lab }) => `/people/${lab.people.operator.id}`,
    body: () => ({ roles: ['operator'], isActive: true, version: STALE }),
  },
  'get /lab': { who: STAFF },
  'put /lab': { who: ['admin'], body: () => ({ twoPersonRule: true, version: STALE }) },
  'get /customers': { who: STAFF },
  'post /customers': {
    who: ['researcher', 'lead', 'admin'],
    body: () => ({ name: `Customer ${Math.floor(performance.now() * 1000)}` }),
  },
  'get /my-samples': { who: ['customer'] },
  'get /samples': { who: STAFF },
  'post /samples': { who: ['researcher', 'lead'], body: ({ lab }) => sampleBody(lab) },
  'get /samples/:sampleId': { who: STAFF, path: (world) => `/samples/${world.brief.sampleId}` },
  'put /samples/:sampleId': {
    who: ['researcher', 'lead'],
    path: (world) => `/samples/${world.brief.sampleId}`,
    body: () => ({ name: 'Name', description: '', storage: '', why: 'a reason', version: STALE }),
  },
  'post /samples/:sampleId/stock': {
    who: ['researcher', 'operator', 'lead'],
    path: (world) => `/samples/${world.brief.sampleId}/stock`,
    body: () => ({ kind: 'lost', massG: 1, note: 'a reason' }),
  },
  'get /rigs': { who: STAFF },
  'post /rigs': {
    who: ['admin'],
    body: () => ({ name: `Rig ${Math.floor(performance.now() * 1000)}`, envelope: ENVELOPE }),
  },
  'post /rigs/:rigId/envelopes': {
    who: ['admin'],
    path: ({ lab }) => `/rigs/${lab.rig.id}/envelopes`,
    body: () => ({ envelope: ENVELOPE, why: 'a reason', revision: STALE }),
  },
  'get /sieve-stacks': { who: STAFF },
  'post /sieve-stacks': {
    who: ['admin'],
    body: () => ({
      name: `Stack ${Math.floor(performance.now() * 1000)}`,
      frameDiameterMm: 200,
      aperturesMm: [2, 1],
    }),
  },
  'get /studies': { who: STAFF },
  'post /studies': {
    who: ['researcher', 'lead'],
    body: (world) => ({ title: 'A study', sampleId: world.brief.sampleId }),
  },
  'get /studies/:studyId': { who: STAFF, path: study },
  'put /studies/:studyId/brief': {
    who: ['researcher', 'lead'],
    path: (world) => `/studies/${world.brief.studyId}/brief`,
    body: (world) => ({ brief: briefBody(world.lab, world.brief.sampleId), version: STALE }),
  },
  'post /studies/:studyId/matrix': {
    who: ['researcher', 'lead'],
    path: (world) => `/studies/${world.brief.studyId}/matrix`,
    body: () => ({ plan: PLAN, version: STALE }),
  },
  'post /studies/:studyId/added-runs': {
    who: ['researcher', 'lead'],
    path: (world) => `${study(world)}/added-runs`,
    body: () => ({
      purpose: 'confirm',
      settings: [{ voltage: 150, gap: 25, pulses: 40, frequency: 2 }],
      why: 'a reason',
      version: STALE,
    }),
  },
  'get /studies/:studyId/runs': { who: STAFF, path: (world) => `${study(world)}/runs` },
  'put /studies/:studyId/runs/:runId': {
    who: ['operator'],
    path: (world) => `${study(world)}/runs/${world.frozen.runId}`,
    body: () => recordBody({ number: 1, version: STALE, settings: { voltage: 150, pulses: 40 } }),
  },
  'post /studies/:studyId/runs/:runId/void': {
    who: ['operator', 'lead'],
    path: (world) => `${study(world)}/runs/${world.frozen.runId}/void`,
    body: () => ({ why: 'a reason', version: STALE }),
  },
  'post /studies/:studyId/runs/import': {
    who: ['operator'],
    path: (world) => `${study(world)}/runs/import`,
    body: () => ({ csv: 'run;feed mass [g]\n1;300', accept: false }),
  },
  'get /studies/:studyId/fits': {
    who: STAFF,
    path: (world) => `/studies/${world.fitted.studyId}/fits`,
  },
  'get /studies/:studyId/fits/:fitId': {
    who: STAFF,
    path: (world) => `/studies/${world.fitted.studyId}/fits/${world.fitted.fitId}`,
  },
  'post /studies/:studyId/fits': {
    who: ['analyst'],
    path: (world) => `/studies/${world.fitted.studyId}/fits`,
    body: () => ({ responseKey: 'passing2', terms: ['voltage', 'pulses'] }),
  },
  'get /studies/:studyId/candidates': { who: STAFF, path: (world) => `${study(world)}/candidates` },
  'post /studies/:studyId/candidates': {
    who: ['analyst', 'lead', 'researcher'],
    path: (world) => `/studies/${world.fitted.studyId}/candidates`,
    body: () => ({ settings: { voltage: 150, gap: 25, pulses: 40, frequency: 2 } }),
  },
  'get /studies/:studyId/releases': { who: STAFF, path: (world) => `${study(world)}/releases` },
  'post /studies/:studyId/releases': {
    who: ['lead'],
    path: (world) => `/studies/${world.fitted.studyId}/releases`,
    body: () => ({
      settings: { voltage: 150, gap: 25, pulses: 40, frequency: 2 },
      purpose: 'sand',
      decisionRule: 'every bag meets every goal',
      password: 'not the password',
      version: STALE,
    }),
  },
  'get /studies/:studyId/history': { who: STAFF, path: (world) => `${study(world)}/history` },
};

let test: TestApp;
let world: World;

beforeAll(async () => {
  test = startTestApp();
  const lab = await buildLab(test.app);
  const brief = await buildBrief(lab);
  const frozen = await buildFrozen(lab);
  const fitted = await buildFitted(lab);
  const [run] = await runsOf(lab, frozen.studyId);
  const fits = await lab.as('analyst', 'get', `/studies/${fitted.studyId}/fits`).expect(200);
  world = {
    lab,
    brief,
    frozen: { ...frozen, runId: run?.id ?? 0 },
    fitted: { ...fitted, fitId: fits.body[0].id as number },
  };
});
afterAll(() => test.close());

const named = () =>
  routeTable.map((route) => ({ ...route, name: `${route.method} ${route.prefix}${route.path}` }));

const pathOf = (name: string) => (TABLE[name]?.path ?? (() => name.split(' ')[1] ?? ''))(world);

describe('who may call which route', () => {
  it('has an expectation for every route, and none that is gone', () => {
    expect(
      named()
        .map(({ name }) => name)
        .sort(),
    ).toEqual(Object.keys(TABLE).sort());
  });

  it('answers 401 to a stranger on every route that is not public', async () => {
    for (const { name, method } of named()) {
      const answer = await request(test.app)
        [method](`/api${pathOf(name)}`)
        .send(TABLE[name]?.body?.(world) ?? {});
      if (TABLE[name]?.who === 'public') expect.soft(answer.status, name).toBeLessThan(500);
      else expect.soft(answer.status, name).toBe(401);
    }
  });

  it.each(ROLES)('lets the %s do their own work and refuses the rest', async (role) => {
    for (const { name, method } of named()) {
      const expectation = TABLE[name];
      if (!expectation || expectation.who === 'public' || name === 'post /auth/sign-out') continue;
      const answer = await world.lab.as(role, method, pathOf(name), expectation.body?.(world));
      const mayCall = expectation.who === 'everyone' || expectation.who.includes(role);
      const where = `${name} as ${role}: ${answer.status} ${JSON.stringify(answer.body).slice(0, 200)}`;
      if (mayCall) {
        expect.soft([401, 403, 404], where).not.toContain(answer.status);
        expect.soft(answer.status, where).not.toBe(400);
        expect.soft(answer.status, where).toBeLessThan(500);
      } else {
        expect.soft(answer.status, where).toBe(403);
        expect.soft(answer.body.error?.message, where).toMatch(/is for|are open to/);
      }
    }
  });

  it('answers 401 to a person who was archived, though the token is still good', async () => {
    const lab = await buildLab(test.app);
    const person = await Person.findByPk(lab.people.operator.id, { rejectOnEmpty: true });
    await lab
      .as('admin', 'put', `/people/${person.id}`, {
        roles: ['operator'],
        isActive: false,
        version: person.version,
      })
      .expect(200);
    await lab.as('operator', 'get', '/studies').expect(401);
  });

  it('ends a session everywhere', async () => {
    const lab = await buildLab(test.app);
    await lab.as('analyst', 'get', '/auth/me').expect(200);
    await lab.as('analyst', 'post', '/auth/sign-out', { everywhere: true }).expect(200);
    await lab.as('analyst', 'get', '/auth/me').expect(401);
  });
});
