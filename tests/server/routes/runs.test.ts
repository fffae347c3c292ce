import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AuditEvent } from '@server/models/AuditEvent';
import { Run } from '@server/models/Run';
import { StockEntry } from '@server/models/StockEntry';
import {
  briefBody,
  buildBrief,
  buildFitted,
  buildFrozen,
  buildLab,
  buildRecorded,
  PLAN,
  recordBody,
  runsOf,
  sampleBody,
  versionOf,
  type BuiltLab,
  type BuiltStudy,
} from '@tests/support/buildLab';
import { startTestApp, type TestApp } from '@tests/support/testApp';

let test: TestApp;
let lab: BuiltLab;

beforeAll(async () => {
  test = startTestApp();
  lab = await buildLab(test.app);
});
afterAll(() => test.close());

const url = ({ studyId }: BuiltStudy, runId: number, rest = '') =>
  `/studies/${studyId}/runs/${runId}${rest}`;

describe('recording a run', () => {
  it('derives the responses, both balances, and writes exactly one event for the run', async () => {
    const built = await buildFrozen(lab);
    const [run] = await runsOf(lab, built.studyId);
    const before = await AuditEvent.count({ where: { noun: 'run', nounId: run!.id } });
    const answer = await lab
      .as('operator', 'put', url(built, run!.id), recordBody(run!))
      .expect(200);
    expect(answer.body.run.results.passing2).toBeGreaterThan(30);
    // 0.5·32 nF·V²·N / 300 g / 3.6: ½CV² by hand
    const { voltage, pulses } = run!.settings;
    const kwhPerT = (0.0005 * 32 * voltage ** 2 * pulses) / 300 / 3.6;
    expect(answer.body.run.results.energy).toBeCloseTo(kwhPerT, 9);
    expect(answer.body.run.balances.treatment.lossPercent).toBeCloseTo(0.2, 9);
    expect(answer.body.run.balances.sieving.verdict).toBe('holds');
    const events = await AuditEvent.findAll({
      where: { noun: 'run', nounId: run!.id },
      order: [['id', 'DESC']],
    });
    expect(events.length - before).toBe(1);
    expect(events[0]!.actorName).toBe(lab.people.operator.name);
    expect(events[0]!.before).toMatchObject({ status: 'planned', feedMassG: null });
    expect(events[0]!.after).toMatchObject({ status: 'recorded', feedMassG: 300 });
  });

  it('asks why when the order is left, and when a recorded run is changed', async () => {
    const built = await buildFrozen(lab);
    const [first, second] = await runsOf(lab, built.studyId);
    const out = await lab.as('operator', 'put', url(built, second!.id), recordBody(second!));
    expect(out.status).toBe(422);
    expect(out.body.error.code).toBe('out-of-order');
    expect(out.body.error.issues[0].path).toBe('why');
    await lab.as('operator', 'put', url(built, first!.id), recordBody(first!)).expect(200);
    const again = { ...recordBody(first!), version: first!.version + 1, beforeSievingG: 299 };
    const refused = await lab.as('operator', 'put', url(built, first!.id), again);
    expect(refused.body.error.code).toBe('reason-needed');
    await lab
      .as('operator', 'put', url(built, first!.id), { ...again, why: 'read the wrong line' })
      .expect(200);
    const events = await AuditEvent.findAll({
      where: { noun: 'run', nounId: first!.id },
      order: [['id', 'DESC']],
    });
    expect(events[0]!.why).toBe('read the wrong line');
    expect(events[0]!.before).toMatchObject({ beforeSievingG: 299.4 });
    expect(events[0]!.after).toMatchObject({ beforeSievingG: 299 });
  });

  it('answers a stale edit with 409 and the record as it stands, and changes nothing', async () => {
    const built = await buildFrozen(lab);
    const [run] = await runsOf(lab, built.studyId);
    await lab.as('operator', 'put', url(built, run!.id), recordBody(run!)).expect(200);
    const stale = await lab.as('operator', 'put', url(built, run!.id), {
      ...recordBody(run!),
      feedMassG: 301,
    });
    expect(stale.status).toBe(409);
    expect(stale.body.error.code).toBe('stale');
    expect(stale.body.error.current.feedMassG).toBe(300);
    expect((await Run.findByPk(run!.id))?.feedMassG).toBe(300);
  });

  it('moves the sample from reserved to used, and gives it back when an open run is voided', async () => {
    const built = await buildFrozen(lab);
    const [first, second] = await runsOf(lab, built.studyId);
    const stock = async () =>
      (await lab.as('lead', 'get', `/samples/${built.sampleId}`)).body.stock as Record<
        string,
        number
      >;
    expect(await stock()).toMatchObject({ reservedG: 3300, usedG: 0, leftG: 8700 });
    await lab.as('operator', 'put', url(built, first!.id), recordBody(first!)).expect(200);
    expect(await stock()).toMatchObject({ reservedG: 3000, usedG: 300, leftG: 8700 });
    await lab
      .as('operator', 'post', url(built, second!.id, '/void'), {
        why: 'tray tipped over',
        version: second!.version,
      })
      .expect(200);
    expect(await stock()).toMatchObject({ reservedG: 2700, usedG: 300, leftG: 9000 });
    expect(await StockEntry.count({ where: { sampleId: built.sampleId } })).toBe(5);
  });
});

describe('bad input at the bench', () => {
  const bad = (what: string, change: object, status: number, words: RegExp) => ({
    what,
    change,
    status,
    words,
  });
  const sieve = (apertureMm: number, retainedG: unknown) => ({ apertureMm, retainedG });
  it.each([
    bad('a negative mass', { sieves: [sieve(2, -5), sieve(0, 100)] }, 400, /below 0 g/),
    bad('a mass that is no number', { sieves: [sieve(2, 'ten'), sieve(0, 1)] }, 400, /mass in g/),
    bad(
      'more retained than fed',
      { sieves: [sieve(2, 600), sieve(0, 100)] },
      422,
      /only 300 g was fed/,
    ),
    bad(
      'a sieve twice',
      { sieves: [sieve(2, 1), sieve(2, 1), sieve(0, 1)] },
      400,
      /is there twice/,
    ),
    bad('no pan', { sieves: [sieve(2, 1)] }, 400, /pan is missing/),
    bad('a zero feed', { feedMassG: 0 }, 400, /above 0 g/),
    bad(
      'half a pulse',
      { actual: { voltage: null, gap: null, pulses: 1.7, frequency: null } },
      400,
      /whole number/,
    ),
    bad('an unknown field', { colour: 'grey' }, 400, /no field called ‘colour’/),
    bad(
      'a typed derived response',
      { measured: [{ responseKey: 'passing2', value: 90 }] },
      422,
      /never typed/,
    ),
  ])('refuses $what in a plain sentence and saves nothing', async ({ change, status, words }) => {
    const built = await buildFrozen(lab);
    const [run] = await runsOf(lab, built.studyId);
    const answer = await lab.as('operator', 'put', url(built, run!.id), {
      ...recordBody(run!),
      ...change,
    });
    expect(answer.status).toBe(status);
    const said = [
      answer.body.error.message,
      ...(answer.body.error.issues ?? []).map((issue: { message: string }) => issue.message),
    ];
    expect(said.join(' ')).toMatch(words);
    expect((await Run.findByPk(run!.id))?.status).toBe('planned');
  });

  it('stores text of any script as it was typed, without hidden characters', async () => {
    const built = await buildFrozen(lab);
    const [run] = await runsOf(lab, built.studyId);
    const note = 'Probe 試料 \u202Eنمونه — Ω ½ 🪨';
    const answer = await lab
      .as('operator', 'put', url(built, run!.id), { ...recordBody(run!), note })
      .expect(200);
    expect(answer.body.run.note).toBe('Probe 試料 نمونه — Ω ½ 🪨');
  });
});

describe('importing a CSV', () => {
  const line = (run: {
    number: number;
    settings: { voltage: number; pulses: number };
    version: number;
  }) => {
    const body = recordBody(run);
    const comma = (value: number) => String(value).replace('.', ',');
    return [
      run.number,
      '0,3 kg',
      comma(body.beforeSievingG),
      run.settings.pulses,
      ...body.sieves.map(({ retainedG }) => comma(retainedG)),
    ].join(';');
  };
  const headings =
    'run;feed mass [g];before sieving [g];delivered pulses;4 mm;2 mm;1 mm;0,5 mm;125 µm;pan';

  it('reads semicolons, decimal commas and units; shows first, then records all or nothing', async () => {
    const built = await buildFrozen(lab);
    const runs = await runsOf(lab, built.studyId);
    const csv = [headings, ...runs.map(line)].join('\r\n');
    const path = `/studies/${built.studyId}/runs/import`;
    const preview = await lab.as('operator', 'post', path, { csv, accept: false }).expect(200);
    expect(preview.body).toMatchObject({
      accepted: false,
      separator: ';',
      decimal: 'comma',
      problems: [],
    });
    expect(preview.body.rows.flatMap((row: { problems: string[] }) => row.problems)).toEqual([]);
    expect((await runsOf(lab, built.studyId)).every(({ status }) => status === 'planned')).toBe(
      true,
    );
    const broken = csv.replace('0,3 kg', 'heavy');
    const refused = await lab
      .as('operator', 'post', path, { csv: broken, accept: true })
      .expect(200);
    expect(refused.body.accepted).toBe(false);
    expect(refused.body.rows[0].problems.join(' ')).toMatch(/‘heavy’ is not a number/);
    expect((await runsOf(lab, built.studyId)).every(({ status }) => status === 'planned')).toBe(
      true,
    );
    const done = await lab.as('operator', 'post', path, { csv, accept: true }).expect(200);
    expect(done.body.accepted).toBe(true);
    const after = await runsOf(lab, built.studyId);
    expect(after.every(({ status }) => status === 'recorded')).toBe(true);
    expect(after[0]!.results['passing2']).toBeGreaterThan(30);
  });

  it('names unknown columns, runs that do not exist, lines that come twice and other settings', async () => {
    const built = await buildFrozen(lab);
    const [run] = await runsOf(lab, built.studyId);
    const csv = [
      'run,feed,colour,set voltage',
      `${run!.number},300,grey,${run!.settings.voltage + 5}`,
      `${run!.number},300,grey,${run!.settings.voltage}`,
      '99,300,grey,150',
    ].join('\n');
    const { body } = await lab
      .as('operator', 'post', `/studies/${built.studyId}/runs/import`, { csv, accept: true })
      .expect(200);
    expect(body.accepted).toBe(false);
    expect(body.columns).toContainEqual({ heading: 'colour', meaning: null });
    expect(body.rows[0].problems.join(' ')).toMatch(/The file says voltage/);
    expect(body.rows[1].problems.join(' ')).toMatch(/in the file twice/);
    expect(body.rows[2].problems.join(' ')).toMatch(/no run 99/);
  });

  it('asks which sign is the decimal one when the file does not tell', async () => {
    const built = await buildFrozen(lab);
    const csv = 'run;feed mass [g]\n1;1,234';
    const { body } = await lab
      .as('operator', 'post', `/studies/${built.studyId}/runs/import`, { csv, accept: true })
      .expect(200);
    expect(body.accepted).toBe(false);
    expect(body.problems.join(' ')).toMatch(/could be 1\.234 or 1234/);
  });
});

describe('planning', () => {
  it.each([
    [
      'a reversed range',
      {
        factors: [
          { key: 'voltage', low: 170, high: 130, scale: 'linear' },
          { key: 'pulses', low: 20, high: 60, scale: 'linear' },
        ],
      },
      400,
      /Swap them/,
    ],
    [
      'a range outside the envelope',
      {
        factors: [
          { key: 'voltage', low: 150, high: 230, scale: 'linear' },
          { key: 'pulses', low: 20, high: 60, scale: 'linear' },
        ],
      },
      422,
      /above this rig’s limit of 200 kV/,
    ],
    [
      'a field that cannot discharge',
      {
        factors: [
          { key: 'voltage', low: 90, high: 110, scale: 'linear' },
          { key: 'pulses', low: 20, high: 60, scale: 'linear' },
        ],
        fixed: { voltage: null, gap: 40, pulses: null, frequency: 2 },
      },
      422,
      /nothing discharges/,
    ],
    [
      'a held value off the dial',
      { fixed: { voltage: null, gap: 25.3, pulses: null, frequency: 2 } },
      422,
      /cannot be dialled/,
    ],
    [
      'one factor only',
      {
        factors: [{ key: 'voltage', low: 130, high: 170, scale: 'linear' }],
        fixed: { voltage: null, gap: 25, pulses: 40, frequency: 2 },
      },
      400,
      /at least two/,
    ],
  ] as const)('refuses %s with a sentence at its field', async (_what, change, status, words) => {
    const sample = await lab.as('researcher', 'post', '/samples', sampleBody(lab)).expect(201);
    const study = await lab
      .as('researcher', 'post', '/studies', { title: 'Bad Brief', sampleId: sample.body.id })
      .expect(201);
    const brief = { ...briefBody(lab, sample.body.id as number), ...change };
    const answer = await lab.as('researcher', 'put', `/studies/${study.body.id}/brief`, {
      brief,
      version: study.body.version,
    });
    expect(answer.status).toBe(status);
    expect(JSON.stringify(answer.body.error)).toMatch(words);
    expect(answer.body.error.issues[0].path).toMatch(/^brief\./);
  });

  it('freezes what was shown, once, and refuses what the sample cannot give', async () => {
    const built = await buildBrief(lab);
    const path = `/studies/${built.studyId}/matrix`;
    const version = await versionOf(lab, built.studyId);
    const greedy = { plan: { ...PLAN, replicates: 5 }, version };
    const refused = await lab.as('researcher', 'post', path, greedy);
    expect(refused.body.error.code).toBe('not-enough-sample');
    await lab.as('researcher', 'post', path, { plan: PLAN, version }).expect(201);
    const again = await lab.as('researcher', 'post', path, {
      plan: PLAN,
      version: await versionOf(lab, built.studyId),
    });
    expect(again.status).toBe(403);
    expect(again.body.error.message).toMatch(/frozen/);
    expect(await runsOf(lab, built.studyId)).toHaveLength(11);
  });
});

describe('from models to a signature', () => {
  it('shows a model as stale once a run under it has changed', async () => {
    const built = await buildFitted(lab);
    const fits = () => lab.as('lead', 'get', `/studies/${built.studyId}/fits`).expect(200);
    expect((await fits()).body[0].isStale).toBe(false);
    const [run] = await Run.findAll({
      where: { studyId: built.studyId },
      order: [['number', 'ASC']],
    });
    const body = recordBody({
      number: run!.number,
      version: run!.version,
      settings: { voltage: run!.setVoltageKv, pulses: run!.setPulses },
    });
    await lab
      .as('operator', 'put', url(built, run!.id), {
        ...body,
        sieves: body.sieves.map((each, i) => ({
          ...each,
          retainedG: each.retainedG + (i === 0 ? 2 : 0),
        })),
        why: 're-weighed the coarse sieve',
      })
      .expect(200);
    expect((await fits()).body[0].isStale).toBe(true);
  });

  it('refuses fewer runs than terms and a constant response, in plain words', async () => {
    const built = await buildFrozen(lab);
    const [run] = await runsOf(lab, built.studyId);
    await lab.as('operator', 'put', url(built, run!.id), recordBody(run!)).expect(200);
    const few = await lab.as('analyst', 'post', `/studies/${built.studyId}/fits`, {
      responseKey: 'passing2',
      terms: ['voltage', 'pulses'],
    });
    expect(few.status).toBe(422);
    expect(few.body.error.code).toBe('too-few-runs');
  });

  it('signs with the password, by somebody who kept no model, and seals what was signed', async () => {
    const built = await buildFitted(lab);
    const path = `/studies/${built.studyId}/releases`;
    const settings = { voltage: 160, gap: 25, pulses: 50, frequency: 2 };
    const body = async (password: string, setting = settings) => ({
      settings: setting,
      purpose: 'sand for the tests',
      decisionRule: 'every bag meets every goal',
      password,
      version: await versionOf(lab, built.studyId),
    });
    const wrong = await lab.as('lead', 'post', path, await body('not the password'));
    expect(wrong.body.error.code).toBe('wrong-password');
    const off = await lab.as(
      'lead',
      'post',
      path,
      await body('a password for the tests', { ...settings, voltage: 205 }),
    );
    expect(off.body.error.code).toBe('outside-envelope');
    const signed = await lab
      .as('lead', 'post', path, await body('a password for the tests'))
      .expect(201);
    expect(signed.body.isSealIntact).toBe(true);
    expect(signed.body.content.expectations).toHaveLength(2);
    expect(signed.body.content.chanceAllGoals).toBeGreaterThanOrEqual(0);
    expect(signed.body.content.confirmation.runs).toBe(0);
    const late = await lab.as('operator', 'get', `/studies/${built.studyId}`);
    expect(late.body.progress.releasedAt).not.toBeNull();
    const more = await lab.as('lead', 'post', path, await body('a password for the tests'));
    expect(more.status).toBe(403);
  });

  it('sends a study back to the bench with added runs in a block of their own', async () => {
    const built = await buildRecorded(lab);
    const answer = await lab
      .as('lead', 'post', `/studies/${built.studyId}/added-runs`, {
        purpose: 'confirm',
        settings: [{ voltage: 150, gap: 25, pulses: 40, frequency: 2 }],
        why: 'a fresh bag tests the claim',
        version: await versionOf(lab, built.studyId),
      })
      .expect(201);
    expect(answer.body.progress).toMatchObject({ stage: 'bench', runsPlanned: 1, blocks: 2 });
  });
});
