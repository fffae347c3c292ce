import type { PlanInput } from '@shared/schemas/matrix';

/** A plan to compare, in words. */
export interface PlanChoice {
  readonly id: string;
  readonly name: string;
  readonly words: string;
  readonly kind: PlanInput['kind'];
  readonly options: Record<string, unknown>;
  /** Only with so many factors. */
  readonly least: number;
}

/** Terms of a full quadratic with intercept. */
const quadraticTerms = (k: number) => ((k + 1) * (k + 2)) / 2;

/** The plans that stand side by side for k varied set-points. */
export function planChoices(k: number): PlanChoice[] {
  const choices: PlanChoice[] = [
    {
      id: 'factorial',
      name: 'Full factorial',
      words: 'every corner of the ranges: straight effects and products, no curvature',
      kind: 'factorial',
      options: {},
      least: 2,
    },
    {
      id: 'rotatable',
      name: 'Central composite, rotatable',
      words: 'corners and axial points beyond them: predicts equally well in every direction',
      kind: 'centralComposite',
      options: { alpha: 'rotatable' },
      least: 2,
    },
    {
      id: 'faceCentred',
      name: 'Central composite, face-centred',
      words: 'corners and the middles of faces: three values of each set-point',
      kind: 'centralComposite',
      options: { alpha: 'faceCentred' },
      least: 2,
    },
    {
      id: 'inscribed',
      name: 'Central composite, inscribed',
      words: 'drawn in until the axial points lie on the ranges',
      kind: 'centralComposite',
      options: { alpha: 'rotatable', inscribed: true },
      least: 2,
    },
    {
      id: 'boxBehnken',
      name: 'Box–Behnken',
      words: 'midpoints of edges: no corner is ever run',
      kind: 'boxBehnken',
      options: {},
      least: 3,
    },
    {
      id: 'fitted',
      name: 'Fitted to the limits',
      words: 'settable points inside every limit, spread for even prediction',
      kind: 'optimal',
      options: { criterion: 'I', runs: quadraticTerms(k) + 5 },
      least: 2,
    },
    {
      id: 'thrifty',
      name: 'Fitted, thrifty',
      words: 'as few points as carry the full quadratic with three to spare',
      kind: 'optimal',
      options: { criterion: 'D', runs: quadraticTerms(k) + 3 },
      least: 2,
    },
  ];
  return choices.filter(({ least }) => k >= least);
}

export function planOf(
  choice: PlanChoice,
  { centrePoints, seed }: { centrePoints: number; seed: number },
): PlanInput {
  return {
    kind: choice.kind,
    options: choice.options,
    blocks: 1,
    centrePoints,
    replicates: 1,
    seed,
  };
}
