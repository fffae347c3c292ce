/**
 * Invented materials of the practice rig. Every constant is assumed, none is measured: no number of it is
 * a fact about a real material.
 */

export interface Phase {
  readonly name: string;
  /** Share by mass. */
  readonly share: number;
  /** Natural grain size: Rosin–Rammler d63 in mm and slope. */
  readonly d63Mm: number;
  readonly slope: number;
  /** Toughness at 10 mm in J/g, and how it grows towards fine sizes. */
  readonly toughnessJPerG: number;
  readonly toughnessExponent: number;
  /** How readily a free grain is hit. */
  readonly hit: number;
  readonly isMetal: boolean;
}

export interface Material {
  readonly feedMassG: number;
  /** Share of the feed by the sieve it stays on, mm. */
  readonly feed: readonly { readonly apertureMm: number; readonly share: number }[];
  /** Median breakdown strength at 30 mm in kV/mm, and its fall with the gap. */
  readonly strengthKvPerMm: number;
  readonly strengthGapExponent: number;
  readonly weibull: number;
  /** Breakdown delay at the median strength, µs. */
  readonly delayUs: number;
  readonly toughnessJPerG: number;
  readonly toughnessExponent: number;
  readonly breakage: { readonly phi: number; readonly gamma: number; readonly beta: number };
  /** Share freed on breakage, its size in mm and steepness; null size: freed at any size. */
  readonly freedShare: number;
  readonly freedSizeMm: number | null;
  readonly freedExponent: number;
  /** Fines made round the channel: g per J, and its growth with over-voltage. */
  readonly crushedGPerJ: number;
  readonly crushedExponent: number;
  readonly hitExponent: number;
  /** Conductivity set free, µS/cm per g/L below 1 mm. */
  readonly leach: number;
  /** Mass that bridges the gap by 63 %, g. */
  readonly bridgeMassG: number;
  readonly phases: readonly Phase[];
  /** Spreads (natural-log units) between bags, and the mean loss in %. */
  readonly bagSpread: number;
  readonly daySpread: number;
  readonly lossPercent: number;
}

const phase = (
  name: string,
  share: number,
  [d63Mm, slope]: readonly [number, number],
  [toughnessJPerG, toughnessExponent, hit]: readonly [number, number, number],
): Phase => ({
  name,
  share,
  d63Mm,
  slope,
  toughnessJPerG,
  toughnessExponent,
  hit,
  isMetal: toughnessJPerG > 1000,
});

export const MATERIALS = {
  granite: {
    feedMassG: 300,
    feed: [{ apertureMm: 45, share: 1 }],
    strengthKvPerMm: 4.3,
    strengthGapExponent: 0.3,
    weibull: 7,
    delayUs: 0.35,
    toughnessJPerG: 3.3,
    toughnessExponent: 0.65,
    breakage: { phi: 0.25, gamma: 0.75, beta: 2.6 },
    freedShare: 0.75,
    freedSizeMm: 7,
    freedExponent: 1.6,
    crushedGPerJ: 0.0006,
    crushedExponent: 0.9,
    hitExponent: 0.35,
    leach: 0.4,
    bridgeMassG: 45,
    phases: [phase('grains', 1, [1.4, 1.5], [60, 0.6, 0.8])],
    bagSpread: 0.09,
    daySpread: 0.04,
    lossPercent: 0.4,
  },
  concrete: {
    feedMassG: 250,
    feed: [
      { apertureMm: 31.5, share: 0.7 },
      { apertureMm: 22.4, share: 0.3 },
    ],
    strengthKvPerMm: 3.2,
    strengthGapExponent: 0.3,
    weibull: 5,
    delayUs: 0.35,
    toughnessJPerG: 3,
    toughnessExponent: 0.35,
    breakage: { phi: 0.3, gamma: 0.6, beta: 2.2 },
    freedShare: 0.78,
    freedSizeMm: null,
    freedExponent: 2,
    crushedGPerJ: 0.0007,
    crushedExponent: 0.8,
    hitExponent: 0.25,
    leach: 25,
    bridgeMassG: 40,
    phases: [
      phase('aggregate', 0.6, [10.5, 2.6], [16, 0.55, 0.3]),
      phase('mortar', 0.4, [1.1, 0.85], [18, 0.45, 0.6]),
    ],
    bagSpread: 0.13,
    daySpread: 0.05,
    lossPercent: 0.6,
  },
  board: {
    feedMassG: 120,
    feed: [
      { apertureMm: 31.5, share: 0.55 },
      { apertureMm: 22.4, share: 0.35 },
      { apertureMm: 16, share: 0.1 },
    ],
    strengthKvPerMm: 6,
    strengthGapExponent: 0.25,
    weibull: 4.5,
    delayUs: 0.5,
    toughnessJPerG: 20,
    toughnessExponent: 0.3,
    breakage: { phi: 0.15, gamma: 0.9, beta: 2.2 },
    freedShare: 0.55,
    freedSizeMm: 7,
    freedExponent: 1.5,
    crushedGPerJ: 0.00012,
    crushedExponent: 0.8,
    hitExponent: 0.3,
    leach: 2.5,
    bridgeMassG: 45,
    phases: [
      phase('metal', 0.28, [2.4, 1.2], [4000, 0.2, 0.85]),
      phase('laminate', 0.52, [1.4, 1.05], [160, 0.4, 0.8]),
      phase('parts', 0.2, [3, 1.4], [80, 0.4, 0.8]),
    ],
    bagSpread: 0.18,
    daySpread: 0.05,
    lossPercent: 0.9,
  },
  slag: {
    feedMassG: 400,
    feed: [
      { apertureMm: 22.4, share: 0.6 },
      { apertureMm: 16, share: 0.4 },
    ],
    strengthKvPerMm: 3.8,
    strengthGapExponent: 0.2,
    weibull: 5,
    delayUs: 0.3,
    toughnessJPerG: 6,
    toughnessExponent: 0.6,
    breakage: { phi: 0.28, gamma: 0.7, beta: 2.6 },
    freedShare: 0.6,
    freedSizeMm: 3.5,
    freedExponent: 1.5,
    crushedGPerJ: 0.00065,
    crushedExponent: 1,
    hitExponent: 0.3,
    leach: 6,
    bridgeMassG: 50,
    phases: [
      phase('prills', 0.07, [0.6, 1.6], [2500, 0.2, 1.2]),
      phase('silicate', 0.93, [1.1, 1.1], [90, 0.6, 0.8]),
    ],
    bagSpread: 0.12,
    daySpread: 0.05,
    lossPercent: 0.5,
  },
} as const satisfies Record<string, Material>;

export type MaterialName = keyof typeof MATERIALS;
