// The whole job over the API: sample, study, matrix, runs from a CSV, models, recommended settings.
// node examples/granite-sand/wholeJob.mjs [address] — with `npm start` running and its demo people.
import { randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';

const address = process.argv[2] ?? 'http://127.0.0.1:4173';
const read = (name) => readFileSync(new URL(name, import.meta.url), 'utf8');
const { sample, rig, sieveStack, brief, plan, models } = JSON.parse(read('study.json'));

async function call(token, method, path, body) {
  const answer = await fetch(`${address}/api${path}`, {
    method,
    headers: {
      'Content-Type': 'application/json',
      'Idempotency-Key': randomUUID(), // a request sent twice is done once
      ...(token ? { Authorization: `Bearer ${token}` } : {}),
    },
    body: body && JSON.stringify(body),
  });
  const json = await answer.json();
  if (!answer.ok) throw new Error(`${method} ${path}: ${JSON.stringify(json)}`);
  return json;
}

async function signIn(role) {
  const person = { email: `${role}@tarnlab.example`, password: 'demo-tarnlab-2026' };
  const { accessToken } = await call(null, 'POST', '/auth/sign-in', person);
  return (method, path, body) => call(accessToken, method, path, body);
}

const named = (list, name) => list.find((each) => each.name === name);
const roles = ['researcher', 'operator', 'analyst'];
const [researcher, operator, analyst] = await Promise.all(roles.map(signIn));

// the researcher: sample, Brief, frozen matrix
const rigUsed = named(await researcher('GET', '/rigs'), rig);
const stack = named(await researcher('GET', '/sieve-stacks'), sieveStack);
const { id: sampleId } = await researcher('POST', '/samples', { ...sample, customerId: null });
let study = await researcher('POST', '/studies', { title: brief.title, sampleId });
const path = `/studies/${study.id}`;
const whole = { ...brief, sampleId, rigId: rigUsed.id, sieveStackId: stack.id };
study = await researcher('PUT', `${path}/brief`, { brief: whole, version: study.version });
await researcher('POST', `${path}/matrix`, { plan, version: study.version });

// the operator: every run, from one CSV with semicolons and decimal commas
await operator('POST', `${path}/runs/import`, { csv: read('runs.csv'), accept: true });
const runs = await operator('GET', `${path}/runs`);

// the analyst: a model of each response, kept; then the settings that meet the goals best
for (const model of models) {
  const { summary } = await analyst('POST', `${path}/fits`, model);
  console.log(`${model.responseKey}: predicted R² ${summary.predictedRSquared.toFixed(3)}`);
}
const { envelope } = rigUsed;
const capacitanceNf = envelope.stageCapacitanceNf / envelope.stages;
const choice = await analyst('POST', '/calc/choose', {
  factors: brief.factors.map((factor) => ({ ...factor, ...envelope[factor.key] })),
  constraints: [
    { terms: { voltage: 1, gap: -envelope.fieldMaxKvPerMm }, op: '<=', bound: 0 },
    { terms: { voltage: 1, gap: -envelope.fieldMinKvPerMm }, op: '>=', bound: 0 },
  ],
  responses: models.map(({ responseKey: key, terms }) => ({
    key,
    model: terms,
    runs: runs.map(({ settings, results }) => ({ settings, value: results[key] })),
  })),
  computed: [{ key: 'energy', kind: 'specificEnergy', capacitanceNf, massG: brief.batchMassG }],
  goals: brief.responses.map(({ key, aim, low, high }) => ({ response: key, aim, low, high })),
  fixed: { frequency: brief.fixed.frequency },
});
const [{ settings, probabilityAllGoals }] = choice.best;
console.log(`${runs.length} runs, ${choice.evaluated} settings compared`);
console.log(`Recommended: ${settings.voltage} kV, ${settings.gap} mm, ${settings.pulses} pulses`);
console.log(`All goals hold with probability ${probabilityAllGoals.toFixed(2)}`);
