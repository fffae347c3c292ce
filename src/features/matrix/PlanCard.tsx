import type { DesignAnswer } from '@shared/schemas/calc/design';
import type { EvaluateAnswer } from '@shared/schemas/calc/evaluate';
import type { StudyJson } from '@shared/schemas/study';
import type { EnvelopeJson } from '@shared/schemas/rig';
import { Chart } from '@/charts/Chart';
import { Pegs } from '@/charts/Pegs';
import { spreadCurveOption } from '@/charts/spreadCurveOption';
import { classes } from '@/lib/classes';
import { formatDuration, formatMass, formatNumber } from '@/lib/format';
import { floorOf, pegsOf, rangesOn, spansOf, type LaidOut } from './pegs';
import { costOfRuns, type PlanCost } from './costOfRuns';
import type { PlanChoice } from './plans';
import type { Refusal } from './refusal';
import { termSymbol } from '@/lib/termSymbol';

type Brief = NonNullable<StudyJson['brief']>;

export interface PlanCardProps {
  readonly choice: PlanChoice;
  readonly brief: Brief;
  readonly envelope: EnvelopeJson;
  readonly leftG: number;
  readonly design: DesignAnswer | null;
  readonly evaluation: EvaluateAnswer | null;
  readonly refusal: Refusal | null;
  readonly isPicked: boolean;
  readonly onPick: () => void;
}

const GOOD_POWER = 0.8;
const LIMITS_SHOWN = 4;

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

function Costs({ cost, leftG }: { readonly cost: PlanCost; readonly leftG: number }) {
  return (
    <dl className="facts">
      <dt>Runs</dt>
      <dd>{cost.runs}</dd>
      <dt>Sample</dt>
      <dd className={cost.massG > leftG ? 'text-stop' : ''}>
        {formatMass(cost.massG)} <small>of {formatMass(leftG)} left</small>
      </dd>
      <dt>Bench time</dt>
      <dd>{formatDuration(cost.timeS)}</dd>
      <dt>Stored energy</dt>
      <dd>
        {formatNumber(cost.energyJ / 1000, 0)} <small>kJ</small>
      </dd>
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

/** In the place of the costs: why there are none. */
function Waiting({ refusal }: { readonly refusal: Refusal | null }) {
  if (!refusal) return <p className="text-2 text-ink-3">Working it out …</p>;
  return (
    <div className="grid gap-2 text-2 text-ink-2 content-start">
      <p>{refusal.message}</p>
      <ul className="list-none p-0 m-0 grid gap-1">
        {refusal.limits.slice(0, LIMITS_SHOWN).map((limit) => (
          <li key={limit}>{limit}</li>
        ))}
        {refusal.limits.length > LIMITS_SHOWN && (
          <li>And {refusal.limits.length - LIMITS_SHOWN} more.</li>
        )}
      </ul>
    </div>
  );
}

/** One plan: what it costs, what it can tell, and how evenly it predicts. */
export function PlanCard(props: PlanCardProps) {
  const { choice, brief, envelope, leftG, design, evaluation, refusal, isPicked, onPick } = props;
  const laidOut: readonly LaidOut[] =
    refusal?.points ?? design?.runs.map(({ settings }) => ({ settings, isBroken: false })) ?? [];
  const spans = spansOf(brief, laidOut);
  return (
    <article className={classes('plan', isPicked && 'picked')} aria-label={choice.name}>
      <header>
        <h2 className="font-head flex-1">{choice.name}</h2>
        {refusal ? (
          <span className="text-stop text-2">cannot be frozen</span>
        ) : (
          <button
            type="button"
            className={classes('link text-2', isPicked && 'font-head')}
            aria-pressed={isPicked}
            onClick={onPick}
            disabled={!design}
          >
            {isPicked ? 'picked' : 'Pick'}
            <span className="sr-only"> {choice.name}</span>
          </button>
        )}
      </header>
      <p className="text-2 text-ink-2">{choice.words}</p>
      <div className="!py-0">
        <Pegs
          pegs={pegsOf(brief, laidOut)}
          floor={floorOf(brief, envelope, spans)}
          ranges={rangesOn(spans, brief)}
          label={`${laidOut.length} settings of ${choice.name}: gap across, voltage deep, pulses high`}
        />
      </div>
      {design ? (
        <Costs cost={costOfRuns(brief, envelope, design.runs)} leftG={leftG} />
      ) : (
        <Waiting refusal={refusal} />
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
