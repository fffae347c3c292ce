import { randomUUID } from 'node:crypto';
import { Sequelize } from 'sequelize';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { Customer } from '@server/models/Customer';
import { AuditEvent } from '@server/models/AuditEvent';
import { services } from '@server/runtime';
import { buildLab, PASSWORD, type BuiltLab } from '@tests/support/buildLab';
import { startTestApp, type TestApp } from '@tests/support/testApp';

let test: TestApp;
let lab: BuiltLab;

beforeAll(async () => {
  test = startTestApp();
  lab = await buildLab(test.app);
});
afterAll(() => test.close());

describe('creating once', () => {
  const create = (name: string, key: string) =>
    lab.as('lead', 'post', '/customers', { name }).set('Idempotency-Key', key);

  it('D-16: makes one record of a hundred double clicks, and answers both alike', async () => {
    for (let i = 0; i < 100; i++) {
      const key = randomUUID();
      const name = `Double ${i}`;
      const [a, b] = await Promise.all([create(name, key), create(name, key)]);
      expect([a.status, b.status], `${i}: ${a.text} ${b.text}`).toEqual([201, 201]);
      expect(a.body).toEqual(b.body);
    }
    const count = await Customer.count({ where: { labId: lab.lab.id } });
    expect(count).toBe(101);
  });

  it('D-18: refuses a used key with another body, and a create without a key', async () => {
    const key = randomUUID();
    await create('First', key).expect(201);
    expect((await create('Second', key)).status).toBe(422);
    const without = await create('Third', '');
    expect(without.status).toBe(400);
    expect(without.body.error.message).toMatch(/Idempotency-Key/);
  });

  it('D-18: keeps a key to the person who used it', async () => {
    const key = randomUUID();
    const mine = await create('Mine', key).expect(201);
    const theirs = await lab
      .as('researcher', 'post', '/customers', { name: 'Theirs' })
      .set('Idempotency-Key', key)
      .expect(201);
    expect(theirs.body.id).not.toBe(mine.body.id);
  });
});

describe('the audit trail', () => {
  it('R-02: keeps change and event in one transaction: neither without the other', async () => {
    const ctx = {
      actor: {
        id: lab.people.lead.id,
        labId: lab.lab.id,
        name: 'x',
        roles: [],
        customerId: null,
        sessionId: 0,
      },
      requestId: randomUUID(),
    };
    const before = await AuditEvent.count({ where: { labId: lab.lab.id } });
    await expect(
      services().sequelize.transaction(async (transaction) => {
        await Customer.create({ labId: lab.lab.id, name: 'Never there' }, { ...ctx, transaction });
        throw new Error('the rest of the work failed');
      }),
    ).rejects.toThrow('the rest');
    expect(await AuditEvent.count({ where: { labId: lab.lab.id } })).toBe(before);
    expect(await Customer.count({ where: { name: 'Never there' } })).toBe(0);
  });

  it('refuses a write without its context, and bulk writes', async () => {
    await expect(Customer.create({ labId: lab.lab.id, name: 'Nobody' })).rejects.toThrow(/context/);
    await expect(
      Customer.update({ name: 'All' }, { where: { labId: lab.lab.id } }),
    ).rejects.toThrow(/bulk/i);
  });

  it.each([
    'UPDATE audit_events SET why = "x"',
    'DELETE FROM audit_events',
    'TRUNCATE TABLE audit_events',
    'DROP TABLE audit_events',
    'ALTER TABLE audit_events ADD COLUMN x INT',
    'UPDATE releases SET seal = "x"',
    'DELETE FROM releases',
    'SET SESSION timestamp = 1',
  ])('R-03: the application’s own account cannot: %s', async (statement) => {
    const app = new Sequelize(inject('appUrl'), { dialect: 'mariadb', logging: false });
    try {
      await expect(app.query(statement)).rejects.toThrow();
    } finally {
      await app.close();
    }
  });

  it.each(['UPDATE audit_events SET why = "x"', 'DELETE FROM audit_events'])(
    'R-03: not even the owner: %s',
    async (statement) => {
      const owner = new Sequelize(inject('ownerUrl'), { dialect: 'mariadb', logging: false });
      try {
        await expect(owner.query(statement)).rejects.toThrow();
      } finally {
        await owner.close();
      }
    },
  );
});

describe('accounts', () => {
  it('gives a token, rotates the refresh cookie, and notices a stolen old one', async () => {
    const email = lab.people.analyst.email;
    const first = await request(test.app)
      .post('/api/auth/sign-in')
      .send({ email, password: PASSWORD })
      .expect(200);
    const cookieOf = (headers: Record<string, unknown>) =>
      (headers['set-cookie'] as string[] | undefined)?.[0] ?? '';
    const cookie = cookieOf(first.headers);
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Strict/);
    expect(first.body.user.roles).toEqual(['analyst']);
    const second = await request(test.app)
      .post('/api/auth/refresh')
      .set('Cookie', cookie)
      .send({})
      .expect(200);
    expect(cookieOf(second.headers)).not.toBe(cookie);
    expect(second.body.accessToken).toBeTypeOf('string');
  });

  it('says the same for a wrong password and for nobody', async () => {
    const wrong = await request(test.app)
      .post('/api/auth/sign-in')
      .send({ email: lab.people.lead.email, password: 'wrong' });
    const nobody = await request(test.app)
      .post('/api/auth/sign-in')
      .send({ email: 'nobody@lab.example', password: 'wrong' });
    expect([wrong.status, nobody.status]).toEqual([401, 401]);
    expect(wrong.body.error.message).toBe(nobody.body.error.message);
  });

  it.each(['none', 'x.y.z', 'eyJhbGciOiJub25lIn0.eyJzdWIiOiIxIiwic2lkIjoxfQ.'])(
    'refuses the forged token %s',
    async (token) => {
      const answer = await request(test.app)
        .get('/api/studies')
        .set('Authorization', `Bearer ${token}`);
      expect(answer.status).toBe(401);
    },
  );

  it('keeps text in any script in a name, and refuses one that cannot be stored', async () => {
    const good = await lab
      .as('lead', 'post', '/customers', { name: '石切場 «Ürün» Ω' })
      .expect(201);
    expect(good.body.name).toBe('石切場 «Ürün» Ω');
    const bad = await lab.as('lead', 'post', '/customers', { name: 'broken \uD800 half' });
    expect(bad.status).toBe(400);
  });
});
