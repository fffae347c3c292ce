import type { EnvelopeJson } from '@shared/schemas/rig';
import type { StudyJson } from '@shared/schemas/study';
import { Link } from 'react-router-dom';
import { Field } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { formatPlain } from '@/lib/format';
import { PickedRuns } from './PickedRuns';
import { PlanCard } from './PlanCard';
import { refusalOf } from './refusal';
import type { Plans } from './usePlans';

type Brief = NonNullable<StudyJson['brief']>;

interface PlanComparisonProps {
  readonly study: StudyJson;
  readonly brief: Brief;
  readonly envelope: EnvelopeJson;
  readonly plans: Plans;
}

/** What is asked, and against which spread it has to be seen. */
function Question({ study, brief }: { readonly study: StudyJson; readonly brief: Brief }) {
  const [first] = brief.responses;
  const unit = first?.unit === '%' ? 'points' : (first?.unit ?? '');
  const figure = (value: number | null) =>
    value === null ? 'not stated' : `${formatPlain(value)} ${unit}`;
  return (
    <div className="flex flex-wrap gap-x-8 gap-y-1 items-baseline">
      <dl className="ask">
        <div>
          <dt>Question</dt>
          <dd>{study.question || 'not written down'}</dd>
        </div>
        <div>
          <dt>Effect that matters</dt>
          <dd>{figure(brief.effectThatMatters)}</dd>
        </div>
        <div>
          <dt>Run-to-run spread</dt>
          <dd>{figure(brief.expectedSpread)}</dd>
        </div>
      </dl>
      <Link className="link text-2" to={`/studies/${study.id}/brief`}>
        Change the Brief
      </Link>
    </div>
  );
}

function Keys({ brief }: { readonly brief: Brief }) {
  const { effectThatMatters, expectedSpread } = brief;
  const isJudged = effectThatMatters !== null && expectedSpread !== null;
  return (
    <p className="key text-2 text-ink-3 flex flex-wrap gap-x-5 gap-y-1 items-center">
      <span className="inline-flex gap-2 items-center">
        <i />
        {isJudged
          ? `found from ${formatPlain(effectThatMatters)} up, at least 4 times in 5`
          : 'can be told apart'}
      </span>
      {isJudged && (
        <span className="inline-flex gap-2 items-center">
          <i className="half" /> only if larger
        </span>
      )}
      <span className="inline-flex gap-2 items-center">
        <i className="none" /> not separable
      </span>
      <span>
        Peg: one setting; its height is the third set-point. ×6: repeats. Red cross: cannot be
        dialled in. Dashed: the ranges of the Brief.
      </span>
    </p>
  );
}

/** The plans side by side, and below them the runs of the one that is picked. */
export function PlanComparison({ study, brief, envelope, plans }: PlanComparisonProps) {
  const { centrePoints, seed, picked } = plans;
  return (
    <>
      <Question study={study} brief={brief} />
      {(brief.effectThatMatters === null || brief.expectedSpread === null) && (
        <Notice>
          State in the Brief the smallest change that matters and the spread you expect between
          equal runs: then each plan shows its chance to find such a change.
        </Notice>
      )}
      <div className="grid gap-3 desk:grid-cols-2 wide:grid-cols-4">
        {plans.plans.map(({ choice, design, evaluation, error }) => (
          <PlanCard
            key={choice.id}
            choice={choice}
            brief={brief}
            envelope={envelope}
            leftG={study.stock.leftG}
            design={design}
            evaluation={evaluation}
            refusal={refusalOf(error, brief, envelope)}
            isPicked={choice.id === picked?.choice.id}
            onPick={() => plans.pick(choice.id)}
          />
        ))}
        <div className="plan-options">
          <Field
            label="Centre points in all"
            hint="repeats at the centre: they measure the run-to-run spread"
            value={centrePoints.text}
            inputMode="numeric"
            error={centrePoints.value === null ? 'A whole number from 0 to 30.' : undefined}
            onChange={(event) => centrePoints.setText(event.target.value)}
          />
          <Field
            label="Seed of the random order"
            hint="the same seed gives the same order on every machine"
            value={seed.text}
            inputMode="numeric"
            error={seed.value === null ? 'A whole number.' : undefined}
            onChange={(event) => seed.setText(event.target.value)}
          />
        </div>
      </div>
      <Keys brief={brief} />
      {picked?.design && (
        <PickedRuns name={picked.choice.name} plan={picked.plan} design={picked.design} />
      )}
    </>
  );
}
