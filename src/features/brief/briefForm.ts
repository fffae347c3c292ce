import type { Aim, ResponseKind } from '@shared/schemas/response';
import type { EnvelopeJson, RigJson, SieveStackJson } from '@shared/schemas/rig';
import { SET_POINT_KEYS, type SetPointKey } from '@shared/schemas/setPoint';
import type { BriefInput, PRACTICE_MATERIALS, StudyJson } from '@shared/schemas/study';

/** A number field holds what was read; null is empty, NaN unreadable. */
type Typed = number | null;

export interface SetPointForm {
  use: 'varied' | 'held';
  low: Typed;
  high: Typed;
  scale: 'linear' | 'log';
  held: Typed;
}

export interface ResponseForm {
  key: string;
  name: string;
  kind: ResponseKind;
  unit: string;
  apertureMm: Typed;
  percent: Typed;
  aim: Aim;
  low: Typed;
  high: Typed;
  target: Typed;
  priority: Typed;
}

export interface BriefForm {
  title: string;
  question: string;
  rigId: number;
  sieveStackId: number;
  setPoints: Record<SetPointKey, SetPointForm>;
  responses: ResponseForm[];
  batchMassG: Typed;
  handlingMinutes: Typed;
  massLimitG: Typed;
  runLimit: Typed;
  dayLimit: Typed;
  effectThatMatters: Typed;
  expectedSpread: Typed;
  practiceMaterial: (typeof PRACTICE_MATERIALS)[number] | '';
}

const middle = ({ min, max, step }: { min: number; max: number; step: number }) =>
  Number((min + Math.round((max - min) / 2 / step) * step).toPrecision(10));

function setPointForm(
  key: SetPointKey,
  brief: StudyJson['brief'],
  envelope: EnvelopeJson,
): SetPointForm {
  const scale = key === 'pulses' ? 'log' : 'linear';
  const nothing: SetPointForm = { use: 'varied', low: null, high: null, scale, held: null };
  const factor = brief?.factors.find((each) => each.key === key);
  if (factor) return { ...nothing, low: factor.low, high: factor.high, scale: factor.scale };
  const isHeld = brief !== null || key === 'frequency';
  if (!isHeld) return nothing;
  return { ...nothing, use: 'held', held: brief?.fixed[key] ?? middle(envelope[key]) };
}

/** The form of a study’s Brief: what was saved, or a sensible start. */
export function formOf(
  study: StudyJson,
  rigs: readonly RigJson[],
  stacks: readonly SieveStackJson[],
): BriefForm {
  const { brief } = study;
  const rig = study.rig ?? rigs[0];
  if (!rig) throw new Error('A Brief needs a rig.');
  const of = (key: SetPointKey) => setPointForm(key, brief, rig.envelope);
  return {
    title: study.title,
    question: study.question,
    rigId: rig.id,
    sieveStackId: brief?.sieveStack.id ?? stacks[0]?.id ?? 0,
    setPoints: {
      voltage: of('voltage'),
      gap: of('gap'),
      pulses: of('pulses'),
      frequency: of('frequency'),
    },
    responses: brief
      ? brief.responses.map((response) => ({ ...response }))
      : [newResponse('passing', []), newResponse('specificEnergy', [])],
    ...numbersOf(brief),
    practiceMaterial: brief?.practiceMaterial ?? '',
  };
}

/** The plain numbers of a Brief; a bag of 300 g and half an hour are a usual start. */
function numbersOf(brief: StudyJson['brief']) {
  const start = {
    batchMassG: 300,
    handlingMinutes: 30,
    massLimitG: null,
    runLimit: null,
    dayLimit: null,
    effectThatMatters: null,
    expectedSpread: null,
  };
  if (!brief) return start;
  const { batchMassG, handlingMinutes, massLimitG, runLimit, dayLimit } = brief;
  const { effectThatMatters, expectedSpread } = brief;
  return {
    batchMassG,
    handlingMinutes,
    massLimitG,
    runLimit,
    dayLimit,
    effectThatMatters,
    expectedSpread,
  };
}

const STARTS: Readonly<Record<ResponseKind, Partial<ResponseForm>>> = {
  passing: { name: 'Passing 2 mm', unit: '%', apertureMm: 2, aim: 'maximise' },
  size: { name: 'P80', unit: 'mm', percent: 80, aim: 'observe' },
  specificEnergy: { name: 'Specific energy', unit: 'kWh/t', aim: 'minimise' },
  duration: { name: 'Duration', unit: 's', aim: 'observe' },
  measured: { name: '', unit: '%', aim: 'maximise' },
};

const KEY_STARTS: Readonly<Record<ResponseKind, string>> = {
  passing: 'passing',
  size: 'size',
  specificEnergy: 'energy',
  duration: 'duration',
  measured: 'measured',
};

/** A key that no other response has: passing, passing2, passing3, … */
export function newResponse(kind: ResponseKind, taken: readonly string[]): ResponseForm {
  let key = KEY_STARTS[kind];
  for (let i = 2; taken.includes(key); i++) key = `${KEY_STARTS[kind]}${i}`;
  return {
    key,
    name: '',
    kind,
    unit: '',
    apertureMm: null,
    percent: null,
    aim: 'observe',
    low: null,
    high: null,
    target: null,
    priority: 1,
    ...STARTS[kind],
  };
}

/** As the server takes it; what is missing or unreadable is left for the schema to name. */
export function briefOf(form: BriefForm, sampleId: number): unknown {
  const { setPoints, practiceMaterial, ...rest } = form;
  const varied = SET_POINT_KEYS.filter((key) => setPoints[key].use === 'varied');
  return {
    ...rest,
    sampleId,
    practiceMaterial: practiceMaterial === '' ? null : practiceMaterial,
    factors: varied.map((key) => {
      const { low, high, scale } = setPoints[key];
      return { key, low, high, scale };
    }),
    fixed: Object.fromEntries(
      SET_POINT_KEYS.map((key) => [
        key,
        setPoints[key].use === 'held' ? setPoints[key].held : null,
      ]),
    ),
  } satisfies Record<keyof BriefInput, unknown>;
}

/** Where an issue of the schema or the server stands in the form. */
export function placeOf(path: string, form: BriefForm): string {
  const varied = SET_POINT_KEYS.filter((key) => form.setPoints[key].use === 'varied');
  const bare = path.replace(/^brief\./, '');
  const factor = /^factors\.(\d+)\.?(.*)$/.exec(bare);
  if (factor)
    return `setPoints.${varied[Number(factor[1])] ?? 'voltage'}.${factor[2] === 'low' ? 'low' : 'high'}`;
  const fixed = /^fixed\.(\w+)$/.exec(bare);
  if (fixed) return `setPoints.${fixed[1] ?? 'voltage'}.held`;
  if (bare === 'responses' || bare === 'factors' || bare === 'sampleId') return 'root';
  return bare;
}
