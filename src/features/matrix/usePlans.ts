import { designRequestSchema, type DesignAnswer } from '@shared/schemas/calc/design';
import type { EvaluateAnswer } from '@shared/schemas/calc/evaluate';
import type { PlanInput } from '@shared/schemas/matrix';
import type { EnvelopeJson } from '@shared/schemas/rig';
import type { StudyJson } from '@shared/schemas/study';
import { constraintsOf, factorsOf } from '@shared/study/plan';
import { designRequestOf } from '@shared/study/requests';
import { useQueries } from '@tanstack/react-query';
import { useState } from 'react';
import { calculation } from '@/engine/engine';
import { planChoices, planOf, type PlanChoice } from './plans';

type Brief = NonNullable<StudyJson['brief']>;

/** A plan as far as it is worked out. */
export interface WorkedPlan {
  readonly choice: PlanChoice;
  readonly plan: PlanInput;
  readonly design: DesignAnswer | null;
  readonly evaluation: EvaluateAnswer | null;
  readonly error: Error | null;
}

const wholeNumber = (text: string, most: number): number | null => {
  const value = /^\d{1,10}$/.test(text.trim()) ? Number(text) : NaN;
  return Number.isFinite(value) && value <= most ? value : null;
};

/** A number as it is typed, and as it is used. */
function useTyped(initial: string, most: number) {
  const [text, setText] = useState(initial);
  return { text, setText, value: wholeNumber(text, most) };
}

function evaluationRequest(brief: Brief, envelope: EnvelopeJson, { runs }: DesignAnswer) {
  return {
    factors: factorsOf(brief, envelope),
    constraints: constraintsOf(brief, envelope),
    region: 'range' as const,
    runs: runs.map(({ settings, block }) => ({ settings: { ...settings }, block })),
    model: 'quadratic' as const,
    effect: brief.effectThatMatters,
    sigma: brief.expectedSpread,
    significance: 0.05,
  };
}

/** The plans of a study, worked out and judged by the engine, and the one that is picked. */
export function usePlans(study: StudyJson, brief: Brief, envelope: EnvelopeJson) {
  const centrePoints = useTyped('6', 30);
  const seed = useTyped(String(1 + (study.id % 90)), 4_294_967_295);
  const [pickedId, setPickedId] = useState<string | null>(null);
  const plans = planChoices(brief.factors.length).map((choice) => ({
    choice,
    plan: planOf(choice, { centrePoints: centrePoints.value ?? 6, seed: seed.value ?? 7 }),
  }));
  const designs = useQueries({
    queries: plans.map(({ plan }) =>
      calculation('design', designRequestSchema.parse(designRequestOf(brief, envelope, plan))),
    ),
  });
  const evaluations = useQueries({
    queries: designs.map(({ data }) =>
      calculation('evaluate', data ? evaluationRequest(brief, envelope, data) : null),
    ),
  });
  const worked = plans.map(({ choice, plan }, i): WorkedPlan => ({
    choice,
    plan,
    design: designs[i]?.data ?? null,
    evaluation: evaluations[i]?.data ?? null,
    error: designs[i]?.error ?? null,
  }));
  return {
    centrePoints,
    seed,
    plans: worked,
    picked: worked.find(({ choice }) => choice.id === pickedId) ?? null,
    pick: setPickedId,
    isReady: centrePoints.value !== null && seed.value !== null,
  };
}

export type Plans = ReturnType<typeof usePlans>;
