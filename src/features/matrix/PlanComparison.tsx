import { designRequestSchema } from '@shared/schemas/calc/design';
import type { PlanInput } from '@shared/schemas/matrix';
import type { StudyJson } from '@shared/schemas/study';
import { constraintsOf, factorsOf } from '@shared/study/plan';
import { designRequestOf } from '@shared/study/requests';
import { useQueries } from '@tanstack/react-query';
import { useState } from 'react';
import { Field } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { calculation, CalculationError } from '@/engine/engine';
import { FreezePanel } from './FreezePanel';
import { PlanCard } from './PlanCard';
import type { LaidOut } from './pegs';
import { planChoices, planOf } from './plans';

interface PlanComparisonProps {
  readonly study: StudyJson;
  readonly brief: NonNullable<StudyJson['brief']>;
  readonly rig: NonNullable<StudyJson['rig']>;
  /** Why this person may not freeze, or null. */
  readonly why: string | null;
  readonly onFrozen: () => void;
}

const wholeNumber = (text: string, most: number): number | null => {
  const value = /^\d{1,10}$/.test(text.trim()) ? Number(text) : NaN;
  return Number.isFinite(value) && value <= most ? value : null;
};

function refusalOf(error: Error | null): { message: string; points: LaidOut[] } | null {
  if (!error) return null;
  const points = error instanceof CalculationError ? error.details['points'] : undefined;
  // made by the engine for `outside-envelope`, and for nothing else
  return { message: error.message, points: (points as LaidOut[] | undefined) ?? [] };
}

/** The plans side by side, the picked one with its run list and the button that freezes it. */
export function PlanComparison({ study, brief, rig, why, onFrozen }: PlanComparisonProps) {
  const { envelope } = rig;
  const [centreText, setCentreText] = useState('6');
  const [seedText, setSeedText] = useState(() => String(1 + (study.id % 90)));
  const [pickedId, setPickedId] = useState<string | null>(null);
  const centrePoints = wholeNumber(centreText, 30);
  const seed = wholeNumber(seedText, 4_294_967_295);
  const choices = planChoices(brief.factors.length);
  const plans = choices.map((choice) =>
    planOf(choice, { centrePoints: centrePoints ?? 6, seed: seed ?? 7 }),
  );
  const requests = plans.map((plan) =>
    designRequestSchema.parse(designRequestOf(brief, envelope, plan)),
  );
  const designs = useQueries({
    queries: requests.map((request) => calculation('design', request)),
  });
  const evaluations = useQueries({
    queries: designs.map(({ data }) =>
      calculation(
        'evaluate',
        data
          ? {
              factors: factorsOf(brief, envelope),
              constraints: constraintsOf(brief, envelope),
              region: 'range' as const,
              runs: data.runs.map(({ settings, block }) => ({ settings: { ...settings }, block })),
              model: 'quadratic' as const,
              effect: brief.effectThatMatters,
              sigma: brief.expectedSpread,
              significance: 0.05,
            }
          : null,
      ),
    ),
  });
  const picked = choices.findIndex(({ id }) => id === pickedId);
  const pickedDesign = designs[picked]?.data ?? null;
  const pickedPlan: PlanInput | null = plans[picked] ?? null;
  return (
    <>
      <div className="flex flex-wrap gap-4 items-end">
        <Field
          label="Centre points in all"
          value={centreText}
          inputMode="numeric"
          error={centrePoints === null ? 'A whole number from 0 to 30.' : undefined}
          onChange={(event) => setCentreText(event.target.value)}
        />
        <Field
          label="Seed of the random order"
          value={seedText}
          inputMode="numeric"
          error={seed === null ? 'A whole number.' : undefined}
          onChange={(event) => setSeedText(event.target.value)}
        />
        <p className="key text-2 text-ink-3 flex flex-wrap gap-4 items-center flex-1">
          <span className="inline-flex gap-2 items-center">
            <i /> found
            {brief.effectThatMatters !== null && brief.expectedSpread !== null
              ? ` from ${brief.effectThatMatters} up, 4 times in 5`
              : ''}
          </span>
          <span className="inline-flex gap-2 items-center">
            <i className="half" /> only if larger
          </span>
          <span className="inline-flex gap-2 items-center">
            <i className="none" /> not separable
          </span>
          <span>Peg: one setting; ×6: repeats; red cross: cannot be dialled in.</span>
        </p>
      </div>
      {brief.effectThatMatters === null || brief.expectedSpread === null ? (
        <Notice>
          With the smallest change that matters and the expected spread in the Brief, each plan
          would show its chance to find it.
        </Notice>
      ) : null}
      <div className="grid gap-3 desk:grid-cols-2 wide:grid-cols-4">
        {choices.map((choice, i) => (
          <PlanCard
            key={choice.id}
            choice={choice}
            brief={brief}
            envelope={envelope}
            leftG={study.stock.leftG}
            design={designs[i]?.data ?? null}
            evaluation={evaluations[i]?.data ?? null}
            refusal={refusalOf(designs[i]?.error ?? null)}
            isPicked={choice.id === pickedId}
            onPick={() => setPickedId(choice.id)}
          />
        ))}
      </div>
      {pickedDesign && pickedPlan && (
        <FreezePanel
          study={study}
          name={choices[picked]?.name ?? ''}
          design={pickedDesign}
          plan={pickedPlan}
          why={why}
          isReady={centrePoints !== null && seed !== null}
          onFrozen={onFrozen}
        />
      )}
    </>
  );
}
