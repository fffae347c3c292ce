/**
 * The invented rig and materials of the practice rig. Every constant is assumed and tuned to common
 * practice and orders of magnitude; nothing is measured, nothing is a fact about a real material.
 */
export interface Phase {
  readonly name: string;
  /** Mass fraction of the material. */
  readonly share: number;
  /** Natural size: Rosin–Rammler with 63.2 % passing at `d63Mm`, slope `n`. */
  readonly d63Mm: number;
  readonly n: number;
  /** Toughness of the free grain at 10 mm, J/g, and how it grows towards small sizes. */
  readonly toughnessJPerG: number;
  readonly zeta: number;
  /** How readily a free grain is hit, against composite material of its size. */
  readonly hit: number;
  readonly isMetal: boolean;
}

export interface Material {
  readonly label: string;
  readonly feedMassG: number;
  /** Feed classes: lower opening in mm → mass fraction. */
  readonly feed: readonly { readonly apertureMm: number; readonly share: number }[];
  /** Field that breaks down half of the times at a 30 mm gap, kV/mm; falls with gap^−a. */
  readonly field30KvPerMm: number;
  readonly gapExponent: number;
  readonly weibull: number;
  readonly delayUs: number;
  readonly toughnessJPerG: number;
  readonly zeta: number;
  /** Breakage B(y) = φ·y^γ + (1−φ)·y^β. */
  readonly phi: number;
  readonly gamma: number;
  readonly beta: number;
  /** Freed share F0/(1+(x/x_lib)^q); null size: the same at any size (weakly bonded). */
  readonly freedShare: number;
  readonly freedSizeMm: number | null;
  readonly freedExponent: number;
  /** Crushed zone round the channel, g/J, and its growth with excess field. */
  readonly crushedGPerJ: number;
  readonly crushedExponent: number;
  readonly hitExponent: number;
  /** Conductivity given to the water, µS/cm per g/L below 1 mm. */
  readonly leach: number;
  /** Mass that bridges the gap in 63 % of the cases, g. */
  readonly bridgeMassG: number;
  readonly phases: readonly Phase[];
  /** Spread of toughness between sub-samples, as a log SD. */
  readonly feedSpread: number;
  /** Mean handling loss, per cent. */
  readonly lossPercent: number;
}

export interface PracticeRig {
  readonly capacitanceNf: number;
  readonly chargingPowerW: number;
  readonly waterL: number;
  /** Water resistance is 1/(σ·cellM). */
  readonly cellM: number;
  readonly conductivityUsPerCm: number;
  readonly temperatureC: number;
  /** Time that the voltage stays high enough to bridge water, µs. */
  readonly tailUs: number;
  /** Channel efficiency η = efficiency·g/(g + halfGapMm). */
  readonly efficiency: number;
  readonly halfGapMm: number;
  /** Share of a water discharge that still works on the solid. */
  readonly waterShare: number;
  /** Electrode wear opens the gap. */
  readonly wearMmPer1000: number;
}

export const PRACTICE_RIG: PracticeRig = {
  capacitanceNf: 32,
  chargingPowerW: 2800,
  waterL: 3,
  cellM: 0.1,
  conductivityUsPerCm: 50,
  temperatureC: 20,
  tailUs: 1.6,
  efficiency: 0.8,
  halfGapMm: 14,
  waterShare: 0.05,
  wearMmPer1000: 0.3,
};

type PhaseRow = readonly [string, number, number, number, number, number, number, boolean?];

const phases = (...rows: readonly PhaseRow[]): Phase[] =>
  rows.map(([name, share, d63Mm, n, toughnessJPerG, zeta, hit, isMetal = false]) => ({
    name,
    share,
    d63Mm,
    n,
    toughnessJPerG,
    zeta,
    hit,
    isMetal,
  }));

/** Massive crystalline rock: one fist-sized piece. */
const granite: Material = {
  label: 'Granite-like (invented)',
  feedMassG: 300,
  feed: [{ apertureMm: 45, share: 1 }],
  field30KvPerMm: 4.3,
  gapExponent: 0.3,
  weibull: 7,
  delayUs: 0.35,
  toughnessJPerG: 3.3,
  zeta: 0.65,
  phi: 0.25,
  gamma: 0.75,
  beta: 2.6,
  freedShare: 0.75,
  freedSizeMm: 7,
  freedExponent: 1.6,
  crushedGPerJ: 0.0006,
  crushedExponent: 0.9,
  hitExponent: 0.35,
  leach: 0.4,
  bridgeMassG: 45,
  phases: phases(['grains', 1, 1.4, 1.5, 60, 0.6, 0.8]),
  feedSpread: 0.09,
  lossPercent: 0.4,
};

/** Ordinary concrete rubble: hard gravel in weak mortar. */
const concrete: Material = {
  label: 'Concrete-like (invented)',
  feedMassG: 250,
  feed: [
    { apertureMm: 31.5, share: 0.7 },
    { apertureMm: 22.4, share: 0.3 },
  ],
  field30KvPerMm: 3.2,
  gapExponent: 0.3,
  weibull: 5,
  delayUs: 0.35,
  toughnessJPerG: 3,
  zeta: 0.35,
  phi: 0.3,
  gamma: 0.6,
  beta: 2.2,
  freedShare: 0.78,
  freedSizeMm: null,
  freedExponent: 2,
  crushedGPerJ: 0.0007,
  crushedExponent: 0.8,
  hitExponent: 0.25,
  leach: 25,
  bridgeMassG: 40,
  phases: phases(
    ['aggregate', 0.6, 10.5, 2.6, 16, 0.55, 0.3],
    ['mortar', 0.4, 1.1, 0.85, 18, 0.45, 0.6],
  ),
  feedSpread: 0.13,
  lossPercent: 0.6,
};

/** Populated circuit board, cut to squares of about 30 mm. */
const board: Material = {
  label: 'Circuit-board-like (invented)',
  feedMassG: 120,
  feed: [
    { apertureMm: 31.5, share: 0.55 },
    { apertureMm: 22.4, share: 0.35 },
    { apertureMm: 16, share: 0.1 },
  ],
  field30KvPerMm: 6,
  gapExponent: 0.25,
  weibull: 4.5,
  delayUs: 0.5,
  toughnessJPerG: 20,
  zeta: 0.3,
  phi: 0.15,
  gamma: 0.9,
  beta: 2.2,
  freedShare: 0.55,
  freedSizeMm: 7,
  freedExponent: 1.5,
  crushedGPerJ: 0.00012,
  crushedExponent: 0.8,
  hitExponent: 0.3,
  leach: 2.5,
  bridgeMassG: 45,
  phases: phases(
    ['metal', 0.28, 2.4, 1.2, 4000, 0.2, 0.85, true],
    ['laminate', 0.52, 1.4, 1.05, 160, 0.4, 0.8],
    ['parts', 0.2, 3, 1.4, 80, 0.4, 0.8],
  ),
  feedSpread: 0.18,
  lossPercent: 0.9,
};

/** Crystalline smelter slag with metal prills, in lumps. */
const slag: Material = {
  label: 'Slag-like (invented)',
  feedMassG: 400,
  feed: [
    { apertureMm: 22.4, share: 0.6 },
    { apertureMm: 16, share: 0.4 },
  ],
  field30KvPerMm: 3.8,
  gapExponent: 0.2,
  weibull: 5,
  delayUs: 0.3,
  toughnessJPerG: 6,
  zeta: 0.6,
  phi: 0.28,
  gamma: 0.7,
  beta: 2.6,
  freedShare: 0.6,
  freedSizeMm: 3.5,
  freedExponent: 1.5,
  crushedGPerJ: 0.00065,
  crushedExponent: 1,
  hitExponent: 0.3,
  leach: 6,
  bridgeMassG: 50,
  phases: phases(
    ['prills', 0.07, 0.6, 1.6, 2500, 0.2, 1.2, true],
    ['silicate', 0.93, 1.1, 1.1, 90, 0.6, 0.8],
  ),
  feedSpread: 0.12,
  lossPercent: 0.5,
};

export const PRACTICE_MATERIALS = { granite, concrete, board, slag } as const;
export type PracticeMaterial = keyof typeof PRACTICE_MATERIALS;
