import type { DesignAnswer } from '@shared/schemas/calc/design';
import type { EvaluateAnswer } from '@shared/schemas/calc/evaluate';
import type { StudyJson } from '@shared/schemas/study';
import type { EnvelopeJson } from '@shared/schemas/rig';
import { Chart } from '@/charts/Chart';
import { Pegs } from '@/charts/Pegs';
import { spreadCurveOption } from '@/charts/spreadCurveOption';
import { classes } from '@/lib/classes';
import { formatDuration, formatMass, formatNumber } from '@/lib/format';
import { floorOf, pegsOf, type LaidOut } from './pegs';
import type { PlanChoice } from './plans';
import { termSymbol } from '@/lib/termSymbol';

type Brief = NonNullable<StudyJson['brief']>;

export interface PlanCardProps {
  readonly choice: PlanChoice;
  readonly brief: Brief;
  readonly envelope: EnvelopeJson;
  readonly leftG: number;
  readonly design: DesignAnswer | null;
  readonly evaluation: EvaluateAnswer | null;
  /** Why it cannot be had, and its points with the limits that they break. */
  readonly refusal: { readonly message: string; readonly points: readonly LaidOut[] } | null;
  readonly isPicked: boolean;
  readonly onPick: () => void;
}

const GOOD_POWER = 0.8;

/** Filled: found; half: only if larger, or not judged; crossed: not separable. */
function TermChips({ evaluation }: { readonly evaluation: EvaluateAnswer }) {
  const terms = evaluation.terms.filter(({ term }) => term !== 'intercept');
  return (
    <ul className="term-chips" aria-label="Terms that can be estimated">
      {terms.map(({ term, power }) => {
        const isOut = evaluation.notEstimable.includes(term);
        const isWeak = power !== null && power < GOOD_POWER;
        const words = isOut ? 'not separable' : isWeak ? 'found only if larger' : 'estimable';
        return (
          <li key={term} title={power === null ? words : `${words}, power ${power.toFixed(2)}`}>
            <i className={isOut ? 'none' : isWeak ? 'half' : ''} />
            {termSymbol(term)}
            <span className="sr-only"> {words}</span>
          </li>
        );
      })}
    </ul>
  );
}

function sentenceOf(evaluation: EvaluateAnswer): string {
  const { notEstimable, terms } = evaluation;
  const out = notEstimable.filter((term) => term !== 'intercept').map(termSymbol);
  const all = terms.length - 1;
  if (out.length > 0)
    return `${all - out.length} of ${all} terms. ${out.join(', ')} cannot be told apart from the rest.`;
  const weak = terms.filter(({ power }) => power !== null && power < GOOD_POWER);
  if (weak.length === 0) return `All ${all} terms of the quadratic.`;
  return `All ${all} terms; ${weak.map(({ term }) => termSymbol(term)).join(', ')} only if larger than the change that matters.`;
}

function Costs({
  brief,
  runs,
  leftG,
}: {
  readonly brief: Brief;
  readonly runs: number;
  readonly leftG: number;
}) {
  const massG = runs * brief.batchMassG;
  return (
    <dl className="facts">
      <dt>Runs</dt>
      <dd>{runs}</dd>
      <dt>Sample</dt>
      <dd>
        {formatMass(massG)} <small>of {formatMass(leftG)} left</small>
      </dd>
      <dt>Bench time</dt>
      <dd>{formatDuration(60 * runs * brief.handlingMinutes)}</dd>
    </dl>
  );
}

function Curve({
  evaluation,
  runs,
}: {
  readonly evaluation: EvaluateAnswer;
  readonly runs: number;
}) {
  const variance = evaluation.predictionVariance;
  if (!variance)
    return (
      <p className="state">No curve: the full quadratic has no single solution from these runs.</p>
    );
  // scaled variance is n·x'(X'X)⁻¹x: back to the spread of the mean over that of one run
  const ratios = variance.scaled.map((value) => Math.sqrt(value / runs));
  const rows = variance.fractions.map((fraction, i) => ({ fraction, ratio: ratios[i] ?? 0 }));
  return (
    <Chart
      label="Spread of a prediction over run-to-run spread, sorted over the region"
      height={120}
      option={(tokens) =>
        spreadCurveOption({ fractions: variance.fractions, spreads: ratios }, tokens)
      }
      table={{
        columns: [
          {
            key: 'fraction',
            header: 'Share of the region, %',
            numeric: true,
            cell: ({ fraction }) => formatNumber(100 * fraction, 0),
          },
          {
            key: 'ratio',
            header: 'Spread at most',
            numeric: true,
            cell: ({ ratio }) => formatNumber(ratio, 2),
          },
        ],
        rows: rows.filter((_, i) => i % 10 === 0),
        rowKey: ({ fraction }) => fraction,
      }}
    />
  );
}

/** One plan: what it costs, what it can tell, and how evenly it predicts. */
export function PlanCard(props: PlanCardProps) {
  const { choice, brief, envelope, leftG, design, evaluation, refusal, isPicked, onPick } = props;
  const laidOut: readonly LaidOut[] =
    refusal?.points ?? design?.runs.map(({ settings }) => ({ settings, broken: [] })) ?? [];
  return (
    <article className={classes('plan', isPicked && 'picked')} aria-label={choice.name}>
      <header className="flex items-center gap-3">
        <h2 className="font-head flex-1">{choice.name}</h2>
        {refusal ? (
          <span className="text-stop text-2">cannot be frozen</span>
        ) : (
          <button
            type="button"
            className={classes('btn', isPicked && 'font-head')}
            aria-pressed={isPicked}
            onClick={onPick}
            disabled={!design}
          >
            {isPicked ? 'Picked' : 'Pick'}
            <span className="sr-only"> {choice.name}</span>
          </button>
        )}
      </header>
      <p className="text-2 text-ink-2">{choice.words}</p>
      <div>
        <Pegs
          pegs={pegsOf(brief, laidOut)}
          floor={floorOf(brief, envelope)}
          label={`${laidOut.length} settings of ${choice.name}: gap across, voltage deep, pulses high`}
        />
      </div>
      {design ? (
        <Costs brief={brief} runs={design.runs.length} leftG={leftG} />
      ) : (
        <div className="text-2 text-ink-2">{refusal ? refusal.message : 'Working it out …'}</div>
      )}
      <div className="grid gap-2 content-start">
        {evaluation && (
          <>
            <h3 className="font-head text-2">Can be estimated</h3>
            <TermChips evaluation={evaluation} />
            <p className="text-2 text-ink-2">{sentenceOf(evaluation)}</p>
          </>
        )}
      </div>
      <div>
        {evaluation && design && (
          <>
            <h3 className="text-2">
              <b>Prediction spread</b> <span className="text-ink-3">÷ run-to-run</span>
            </h3>
            <Curve evaluation={evaluation} runs={design.runs.length} />
          </>
        )}
      </div>
    </article>
  );
}
