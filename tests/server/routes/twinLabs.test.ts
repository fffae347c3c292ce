import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Role } from '@shared/schemas/account';
import { AuditEvent } from '@server/models/AuditEvent';
import {
  briefBody,
  buildFitted,
  buildLab,
  ENVELOPE,
  PLAN,
  recordBody,
  runsOf,
  sampleBody,
  versionOf,
  type BuiltLab,
} from '@tests/support/buildLab';
import { startTestApp, type TestApp } from '@tests/support/testApp';

/**
 * S-31: two labs built alike; every id of the one, in path or body, used by the other. The answer is the
 * same as for an id that nobody has, and nothing happens in the lab that owns it.
 */

interface Twin {
  readonly lab: BuiltLab;
  readonly sampleId: number;
  readonly studyId: number;
  readonly runId: number;
  readonly fitId: number;
}

const NOBODY = 8_888_888_888;
let test: TestApp;
let own: Twin;
let other: Twin;

async function buildTwin(): Promise<Twin> {
  const lab = await buildLab(test.app);
  const built = await buildFitted(lab);
  const runs = await runsOf(lab, built.studyId);
  const fits = await lab.as('analyst', 'get', `/studies/${built.studyId}/fits`);
  return { lab, ...built, runId: runs[0]?.id ?? 0, fitId: fits.body[0].id as number };
}

interface Attempt {
  readonly what: string;
  readonly role: Role;
  readonly method: 'get' | 'post' | 'put';
  readonly path: (ids: Ids) => string;
  readonly body?: (ids: Ids, version: number) => object;
  /** Where the foreign id is no address but a value, 422 says the same for both. */
  readonly status?: 404 | 422;
}

interface Ids {
  readonly sampleId: number;
  readonly studyId: number;
  readonly runId: number;
  readonly fitId: number;
  readonly rigId: number;
  readonly stackId: number;
  readonly customerId: number;
  readonly personId: number;
}

const setting = { voltage: 150, gap: 25, pulses: 40, frequency: 2 };
const reason = { why: 'a reason', version: 0 };

const ATTEMPTS: readonly Attempt[] = [
  { what: 'a sample', role: 'lead', method: 'get', path: (ids) => `/samples/${ids.sampleId}` },
  {
    what: 'correcting a sample',
    role: 'lead',
    method: 'put',
    path: (ids) => `/samples/${ids.sampleId}`,
    body: () => ({ name: 'Mine now', description: '', storage: '', ...reason }),
  },
  {
    what: 'a sample’s stock',
    role: 'lead',
    method: 'post',
    path: (ids) => `/samples/${ids.sampleId}/stock`,
    body: () => ({ kind: 'lost', massG: 1, note: 'a reason' }),
  },
  {
    what: 'a customer on a new sample',
    role: 'lead',
    method: 'post',
    path: () => '/samples',
    body: (ids) => ({ ...sampleBody(own.lab), customerId: ids.customerId }),
  },
  {
    what: 'opening a study on a sample',
    role: 'lead',
    method: 'post',
    path: () => '/studies',
    body: (ids) => ({ title: 'Mine', sampleId: ids.sampleId }),
  },
  { what: 'a study', role: 'lead', method: 'get', path: (ids) => `/studies/${ids.studyId}` },
  {
    what: 'a study’s history',
    role: 'lead',
    method: 'get',
    path: (ids) => `/studies/${ids.studyId}/history`,
  },
  {
    what: 'a Brief',
    role: 'lead',
    method: 'put',
    path: (ids) => `/studies/${ids.studyId}/brief`,
    body: () => ({ brief: briefBody(own.lab, own.sampleId), version: 0 }),
  },
  {
    what: 'a matrix',
    role: 'lead',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/matrix`,
    body: () => ({ plan: PLAN, version: 0 }),
  },
  {
    what: 'added runs',
    role: 'lead',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/added-runs`,
    body: () => ({ purpose: 'confirm', settings: [setting], ...reason }),
  },
  { what: 'runs', role: 'lead', method: 'get', path: (ids) => `/studies/${ids.studyId}/runs` },
  {
    what: 'recording a run',
    role: 'operator',
    method: 'put',
    path: (ids) => `/studies/${ids.studyId}/runs/${ids.runId}`,
    body: () => recordBody({ number: 1, version: 0, settings: setting }),
  },
  {
    what: 'a foreign run under an own study',
    role: 'operator',
    method: 'put',
    path: (ids) => `/studies/${own.studyId}/runs/${ids.runId}`,
    body: () => recordBody({ number: 1, version: 0, settings: setting }),
  },
  {
    what: 'voiding a run',
    role: 'operator',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/runs/${ids.runId}/void`,
    body: () => reason,
  },
  {
    what: 'importing runs',
    role: 'operator',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/runs/import`,
    body: () => ({ csv: 'run;feed mass [g]\n1;300', accept: true }),
  },
  { what: 'models', role: 'lead', method: 'get', path: (ids) => `/studies/${ids.studyId}/fits` },
  {
    what: 'a model',
    role: 'lead',
    method: 'get',
    path: (ids) => `/studies/${own.studyId}/fits/${ids.fitId}`,
  },
  {
    what: 'keeping a model',
    role: 'analyst',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/fits`,
    body: () => ({ responseKey: 'passing2', terms: ['voltage'] }),
  },
  {
    what: 'leaving out a foreign run',
    role: 'analyst',
    method: 'post',
    path: () => `/studies/${own.studyId}/fits`,
    body: (ids) => ({
      responseKey: 'passing2',
      terms: ['voltage'],
      exclusions: [{ runId: ids.runId, why: 'a reason' }],
    }),
    status: 422,
  },
  {
    what: 'candidates',
    role: 'lead',
    method: 'get',
    path: (ids) => `/studies/${ids.studyId}/candidates`,
  },
  {
    what: 'a candidate',
    role: 'lead',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/candidates`,
    body: () => ({ settings: setting }),
  },
  {
    what: 'releases',
    role: 'lead',
    method: 'get',
    path: (ids) => `/studies/${ids.studyId}/releases`,
  },
  {
    what: 'a release',
    role: 'lead',
    method: 'post',
    path: (ids) => `/studies/${ids.studyId}/releases`,
    body: () => ({
      settings: setting,
      purpose: 'sand',
      decisionRule: 'all goals',
      password: 'x',
      version: 0,
    }),
  },
  {
    what: 'a rig’s envelope',
    role: 'admin',
    method: 'post',
    path: (ids) => `/rigs/${ids.rigId}/envelopes`,
    body: () => ({ envelope: ENVELOPE, why: 'a reason', revision: 1 }),
  },
  {
    what: 'changing a person',
    role: 'admin',
    method: 'put',
    path: (ids) => `/people/${ids.personId}`,
    body: () => ({ roles: ['lead'], isActive: true, version: 0 }),
  },
  {
    what: 'inviting a person again',
    role: 'admin',
    method: 'post',
    path: (ids) => `/people/${ids.personId}/invitation`,
    body: () => ({}),
  },
  {
    what: 'a customer of a new person',
    role: 'admin',
    method: 'post',
    path: () => '/people',
    body: (ids) => ({
      name: 'Someone',
      email: `someone.${own.lab.lab.code}@lab.example`,
      roles: ['customer'],
      customerId: ids.customerId,
    }),
  },
];

const idsOf = (twin: Twin): Ids => ({
  sampleId: twin.sampleId,
  studyId: twin.studyId,
  runId: twin.runId,
  fitId: twin.fitId,
  rigId: twin.lab.rig.id,
  stackId: twin.lab.stack.id,
  customerId: twin.lab.customer.id,
  personId: twin.lab.people.operator.id,
});
const nobody = (): Ids => ({
  sampleId: NOBODY,
  studyId: NOBODY,
  runId: NOBODY,
  fitId: NOBODY,
  rigId: NOBODY,
  stackId: NOBODY,
  customerId: NOBODY,
  personId: NOBODY,
});

const withoutRequestId = (body: { error?: { requestId?: string } }) =>
  JSON.stringify({ ...body, error: { ...body.error, requestId: undefined } });

beforeAll(async () => {
  test = startTestApp();
  own = await buildTwin();
  other = await buildTwin();
});
afterAll(() => test.close());

describe('two labs', () => {
  it.each(ATTEMPTS)(
    'keeps $what to its own lab',
    async ({ role, method, path, body, status = 404 }) => {
      const before = await AuditEvent.count({ where: { labId: other.lab.lab.id } });
      const foreign = await own.lab.as(role, method, path(idsOf(other)), body?.(idsOf(other), 0));
      const absent = await own.lab.as(role, method, path(nobody()), body?.(nobody(), 0));
      expect(foreign.status).toBe(status);
      expect(absent.status).toBe(status);
      expect(withoutRequestId(foreign.body)).toBe(withoutRequestId(absent.body));
      expect(await AuditEvent.count({ where: { labId: other.lab.lab.id } })).toBe(before);
    },
  );

  it.each(['rigId', 'sieveStackId', 'sampleId'] as const)(
    'refuses a Brief with the %s of another lab',
    async (field) => {
      const sample = await own.lab.as('lead', 'post', '/samples', sampleBody(own.lab)).expect(201);
      const opened = await own.lab
        .as('lead', 'post', '/studies', { title: 'Mine', sampleId: sample.body.id })
        .expect(201);
      const foreign = {
        rigId: other.lab.rig.id,
        sieveStackId: other.lab.stack.id,
        sampleId: other.sampleId,
      };
      const brief = {
        ...briefBody(own.lab, sample.body.id as number),
        [field]: foreign[field],
      };
      await own.lab
        .as('lead', 'put', `/studies/${opened.body.id}/brief`, {
          brief,
          version: await versionOf(own.lab, opened.body.id as number),
        })
        .expect(404);
    },
  );

  it('shows no word of the other lab in any list', async () => {
    const markers = [other.lab.lab.code, `Customer ${other.lab.lab.code}`];
    for (const path of ['/studies', '/samples', '/customers', '/rigs', '/sieve-stacks', '/lab']) {
      const { text } = await own.lab.as('lead', 'get', path).expect(200);
      for (const marker of markers) expect(text).not.toContain(marker);
    }
    const { text } = await own.lab.as('admin', 'get', '/people').expect(200);
    expect(text).not.toContain(other.lab.lab.code.toLowerCase());
  });

  it('shows a customer their own samples and nothing else', async () => {
    const { body } = await own.lab.as('customer', 'get', '/my-samples').expect(200);
    const codes = (body as { id: number }[]).map(({ id }) => id);
    expect(codes).toContain(own.sampleId);
    expect(codes).not.toContain(other.sampleId);
  });
});
