import type { Role } from '@shared/schemas/account';
import type { FitInput } from '@shared/schemas/fit';
import type { PlanInput } from '@shared/schemas/matrix';
import type { MaterialName } from '@shared/comminution/practiceRig/materials';
import type { Transaction } from 'sequelize';
import { contextOfPerson, type Context } from '../context';
import type { Person } from '../models/Person';
import { Run } from '../models/Run';
import type { Study } from '../models/Study';
import { addRuns } from '../services/addRuns';
import { freezeMatrix } from '../services/freezeMatrix';
import { keepFit } from '../services/keepFit';
import { loadStudy } from '../services/loadStudy';
import { openStudy } from '../services/openStudy';
import { recordRun } from '../services/recordRun';
import { saveBrief } from '../services/saveBrief';
import { signRelease } from '../services/signRelease';
import { takeCandidate } from '../services/takeCandidate';
import { voidRun } from '../services/voidRun';
import { CONCRETE_BRIEF, DEMO_PASSWORD, GRANITE_BRIEF } from './demoLab';
import { simulateRun } from './simulateRun';

/** Who works in the demo, and on what. */
export interface DemoWorld {
  readonly transaction: Transaction;
  readonly people: Readonly<Record<Role, Person>>;
  readonly rigId: number;
  readonly stackIds: readonly [number, number];
  readonly aperturesMm: readonly (readonly number[])[];
}

const DAY_EFFECTS = [0, 0.03, -0.02];

const as = ({ people, transaction }: DemoWorld, role: Role): Context =>
  contextOfPerson(people[role], transaction);

/** The study anew, with what its services need loaded. */
const fresh = async (study: Study, ctx: Context) => (await loadStudy(study.id, ctx)).study;

async function planned(study: Study, { transaction }: Context): Promise<Run[]> {
  return Run.findAll({
    where: { studyId: study.id, status: 'planned' },
    order: [['number', 'ASC']],
    transaction,
  });
}

/** Does up to `most` of the open runs on the practice rig. */
async function doRuns(
  world: DemoWorld,
  study: Study,
  of: { material: MaterialName; stack: 0 | 1; seed: number; measuredKey: string | null },
  most = Infinity,
): Promise<void> {
  const ctx = as(world, 'operator');
  const loaded = await fresh(study, ctx);
  for (const [i, run] of (await planned(study, ctx)).entries()) {
    if (i >= most) return;
    const record = simulateRun(run, {
      material: of.material,
      aperturesMm: world.aperturesMm[of.stack] ?? [],
      seed: of.seed + run.number,
      dayEffect: DAY_EFFECTS[run.block - 1] ?? 0,
      measuredKey: of.measuredKey,
    });
    await recordRun(run, loaded, record, ctx);
  }
}

const GRANITE_PLAN: PlanInput = {
  kind: 'optimal',
  options: { criterion: 'I', runs: 15 },
  blocks: 1,
  centrePoints: 6,
  replicates: 1,
  seed: 41,
};

const FITS: readonly FitInput[] = [
  {
    responseKey: 'passing2',
    terms: [
      'voltage',
      'gap',
      'pulses',
      'voltage:gap',
      'voltage:pulses',
      'gap:pulses',
      'voltage^2',
      'gap^2',
      'pulses^2',
    ],
    transform: 'logit',
    settingsUsed: 'actual',
    exclusions: [],
    why: 'percentages close to 100: the logit keeps predictions below it',
  },
  {
    responseKey: 'dust',
    terms: [
      'voltage',
      'gap',
      'pulses',
      'voltage:gap',
      'voltage:pulses',
      'gap:pulses',
      'gap^2',
      'pulses^2',
    ],
    transform: 'log',
    settingsUsed: 'actual',
    exclusions: [],
    why: 'spread grows with the level',
  },
];

const CHOSEN = { voltage: 160, gap: 27, pulses: 43, frequency: 2 };

async function openWithBrief(
  world: DemoWorld,
  sampleId: number,
  brief: typeof GRANITE_BRIEF,
  stack: 0 | 1,
): Promise<Study> {
  const ctx = as(world, 'researcher');
  const { title, question } = brief;
  const study = await openStudy({ title, question, sampleId, isSimulated: true }, ctx);
  const input = { ...brief, sampleId, rigId: world.rigId, sieveStackId: world.stackIds[stack] };
  await saveBrief(await fresh(study, ctx), input, ctx);
  return fresh(study, ctx);
}

/** A study that has walked the whole path: planned, run, fitted, confirmed, signed. */
export async function finishedStudy(world: DemoWorld, sampleId: number): Promise<void> {
  const study = await openWithBrief(world, sampleId, GRANITE_BRIEF, 0);
  await freezeMatrix(study, GRANITE_PLAN, as(world, 'researcher'));
  const of = { material: 'granite', stack: 0, seed: 17_000, measuredKey: null } as const;
  await doRuns(world, study, of);
  const analyst = as(world, 'analyst');
  for (const fit of FITS) await keepFit(await fresh(study, analyst), fit, analyst);
  const lead = as(world, 'lead');
  await takeCandidate(
    await fresh(study, lead),
    { settings: CHOSEN, note: 'surest of the ranked settings' },
    lead,
  );
  const confirm = {
    purpose: 'confirm' as const,
    settings: [CHOSEN, CHOSEN, CHOSEN],
  };
  await addRuns(await fresh(study, lead), confirm, {
    ...lead,
    why: 'three fresh bags test the claim of the models',
  });
  await doRuns(world, study, of);
  const why = 'confirmation runs taken in';
  for (const fit of FITS) await keepFit(await fresh(study, analyst), { ...fit, why }, analyst);
  await signRelease(
    await fresh(study, lead),
    {
      settings: CHOSEN,
      purpose: 'Coarse sand for Lonmoor Stone from feed of 45 to 63 mm',
      decisionRule:
        'mean of three confirmation runs inside the 95 % prediction interval; every bag meets every goal',
      validUntil: null,
      password: DEMO_PASSWORD,
      version: 0,
    },
    lead,
  );
}

/** A study half-way at the bench: a face-centred matrix with some runs done and one void. */
export async function benchStudy(world: DemoWorld, sampleId: number): Promise<void> {
  const study = await openWithBrief(world, sampleId, CONCRETE_BRIEF, 1);
  await freezeMatrix(
    study,
    {
      kind: 'centralComposite',
      options: { alpha: 'faceCentred' },
      blocks: 1,
      centrePoints: 6,
      replicates: 1,
      seed: 42,
    },
    as(world, 'researcher'),
  );
  const of = {
    material: 'concrete',
    stack: 1,
    seed: 4200,
    measuredKey: 'freeAggregate',
  } as const;
  await doRuns(world, study, of, 8);
  const ctx = as(world, 'operator');
  const [spilt] = await planned(study, ctx);
  if (spilt) await voidRun(spilt, await fresh(study, ctx), 'tray tipped over before weighing', ctx);
  await doRuns(world, study, of, 1);
}

/** A study whose Brief is still to be written. */
export async function briefStudy(world: DemoWorld, sampleId: number): Promise<void> {
  await openStudy(
    {
      title: 'Free the copper from board mix B',
      question: 'Which settings free 80 % of the metal, and what does it cost in energy?',
      sampleId,
      isSimulated: true,
    },
    as(world, 'researcher'),
  );
}
