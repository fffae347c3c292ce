import type { Role } from '@shared/schemas/account';
import type { EnvelopeJson } from '@shared/schemas/rig';
import type { BriefInput } from '@shared/schemas/study';

/** The demo lab: everything here is invented, people, companies, rig and materials. */

export const DEMO_PASSWORD = 'demo-tarnlab-2026';
export const DEMO_DOMAIN = 'tarnlab.example';

export const DEMO_LAB = { name: 'Tarn Valley Lab', code: 'TV', firstStudy: 40, firstSample: 16 };

export const DEMO_PEOPLE: readonly { role: Role; name: string }[] = [
  { role: 'admin', name: 'Oda Lindqvist' },
  { role: 'lead', name: 'Ines Hallworth' },
  { role: 'researcher', name: 'Callum Prys' },
  { role: 'operator', name: 'Tobias Renn' },
  { role: 'analyst', name: 'Marit Oduya' },
  { role: 'customer', name: 'Hester Quill' },
];

export const DEMO_CUSTOMERS = ['Lonmoor Stone', 'Saltmarsh Demolition'] as const;

export const DEMO_ENVELOPE: EnvelopeJson = {
  voltage: { min: 90, max: 200, step: 5 },
  gap: { min: 10, max: 40, step: 1 },
  pulses: { min: 1, max: 200, step: 1 },
  frequency: { min: 0.5, max: 5, step: 0.5 },
  stageCapacitanceNf: 320,
  stages: 10,
  chargingPowerW: 2800,
  fieldMinKvPerMm: 4.5,
  fieldMaxKvPerMm: 9,
  waterL: 3,
};

export const DEMO_STACKS = [
  {
    name: 'Full stack, 16 mm to 63 µm',
    frameDiameterMm: 200,
    aperturesMm: [16, 8, 4, 2, 1, 0.5, 0.25, 0.125, 0.063],
  },
  {
    name: 'Coarse stack, 31.5 to 1 mm',
    frameDiameterMm: 300,
    aperturesMm: [31.5, 22.4, 16, 11.2, 8, 4, 2, 1],
  },
];

type BriefParts = Omit<BriefInput, 'sampleId' | 'rigId' | 'sieveStackId'>;

const NO_LIMITS = {
  apertureMm: null,
  percent: null,
  low: null,
  high: null,
  target: null,
  priority: 1,
} as const;

export const GRANITE_BRIEF: BriefParts = {
  title: 'Coarse sand from Quernby granite, little dust',
  question: 'At least 78 % below 2 mm, at most 8 % dust below 0.125 mm, and no more than 20 kWh/t.',
  factors: [
    { key: 'voltage', low: 130, high: 180, scale: 'linear' },
    { key: 'gap', low: 16, high: 34, scale: 'linear' },
    { key: 'pulses', low: 20, high: 60, scale: 'log' },
  ],
  fixed: { voltage: null, gap: null, pulses: null, frequency: 2 },
  responses: [
    {
      ...NO_LIMITS,
      key: 'passing2',
      name: 'Passing 2 mm',
      kind: 'passing',
      unit: '%',
      apertureMm: 2,
      aim: 'maximise',
      low: 78,
      high: 90,
    },
    {
      ...NO_LIMITS,
      key: 'dust',
      name: 'Dust < 0.125 mm',
      kind: 'passing',
      unit: '%',
      apertureMm: 0.125,
      aim: 'minimise',
      low: 3,
      high: 8,
    },
    {
      ...NO_LIMITS,
      key: 'energy',
      name: 'Specific energy',
      kind: 'specificEnergy',
      unit: 'kWh/t',
      aim: 'minimise',
      low: 6,
      high: 20,
    },
    {
      ...NO_LIMITS,
      key: 'p80',
      name: 'P80',
      kind: 'size',
      unit: 'mm',
      percent: 80,
      aim: 'observe',
    },
  ],
  batchMassG: 300,
  handlingMinutes: 34,
  massLimitG: null,
  runLimit: null,
  dayLimit: null,
  effectThatMatters: 6,
  expectedSpread: 1.6,
  practiceMaterial: 'granite',
};

export const CONCRETE_BRIEF: BriefParts = {
  title: 'Clean gravel from harbour concrete',
  question: 'Free the aggregate but keep it coarse: at least 75 % free, at most 45 % below 4 mm.',
  factors: [
    { key: 'voltage', low: 120, high: 170, scale: 'linear' },
    { key: 'gap', low: 19, high: 26, scale: 'linear' },
    { key: 'pulses', low: 4, high: 28, scale: 'log' },
  ],
  fixed: { voltage: null, gap: null, pulses: null, frequency: 2 },
  responses: [
    {
      ...NO_LIMITS,
      key: 'freeAggregate',
      name: 'Aggregate free',
      kind: 'measured',
      unit: '%',
      aim: 'maximise',
      low: 75,
      high: 98,
    },
    {
      ...NO_LIMITS,
      key: 'passing4',
      name: 'Passing 4 mm',
      kind: 'passing',
      unit: '%',
      apertureMm: 4,
      aim: 'minimise',
      low: 15,
      high: 45,
    },
    {
      ...NO_LIMITS,
      key: 'energy',
      name: 'Specific energy',
      kind: 'specificEnergy',
      unit: 'kWh/t',
      aim: 'minimise',
      low: 1,
      high: 8,
    },
  ],
  batchMassG: 250,
  handlingMinutes: 30,
  massLimitG: null,
  runLimit: null,
  dayLimit: null,
  effectThatMatters: 8,
  expectedSpread: 3,
  practiceMaterial: 'concrete',
};
