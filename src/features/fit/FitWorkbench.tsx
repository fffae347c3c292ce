import { fitRequestSchema, type FitRequest } from '@shared/schemas/calc/fit';
import type { FitInput, FitJson } from '@shared/schemas/fit';
import { boundsOf, type ResponseJson } from '@shared/schemas/response';
import type { RunJson } from '@shared/schemas/run';
import { factorsOf } from '@shared/study/plan';
import { fitRequestOf, type Evidence } from '@shared/study/requests';
import { termsOf } from '@shared/stats/model/term';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { SelectField, TextArea } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { LoadingState } from '@/components/states';
import { calculation, compute } from '@/engine/engine';
import { newKey } from '@/lib/api';
import { formatMoment } from '@/lib/format';
import { useKeepFit } from '@/queries/fits';
import { AnovaTable } from './AnovaTable';
import { CoefficientTable } from './CoefficientTable';
import { Exclusions } from './Exclusions';
import { FitSummary } from './FitSummary';
import { ResidualPlots } from './ResidualPlots';
import { TermBoard } from './TermBoard';

type Choice = Pick<FitInput, 'terms' | 'transform' | 'settingsUsed' | 'exclusions'>;

interface FitWorkbenchProps {
  readonly studyId: number;
  readonly evidence: Evidence & { readonly runs: readonly RunJson[] };
  readonly response: ResponseJson;
  readonly kept: FitJson | null;
  readonly why: string | null;
}

function startOf({ evidence, kept }: FitWorkbenchProps): Choice {
  if (kept) {
    const { terms, transform, settingsUsed, exclusions } = kept;
    return { terms: [...terms], transform, settingsUsed, exclusions: [...exclusions] };
  }
  const factors = factorsOf(evidence.brief, evidence.envelope);
  return {
    terms: termsOf(factors, 'quadratic', false).map(({ name }) => name),
    transform: 'none',
    settingsUsed: 'actual',
    exclusions: [],
  };
}

/** One response: terms, scale and runs on the left hand, what comes of them on the right. */
export function FitWorkbench(props: FitWorkbenchProps) {
  const { studyId, evidence, response, kept, why } = props;
  const [choice, setChoice] = useState<Choice>(() => startOf(props));
  const [reason, setReason] = useState('');
  const [key, setKey] = useState(newKey);
  const [suggestion, setSuggestion] = useState<string | null>(null);
  const keepFit = useKeepFit(studyId);
  const factors = factorsOf(evidence.brief, evidence.envelope);
  const request: FitRequest = fitRequestSchema.parse(fitRequestOf(evidence, response, choice));
  const { data: answer, error, isFetching } = useQuery(calculation('fit', request));
  const change = (changes: Partial<Choice>) => {
    setChoice({ ...choice, ...changes });
    setSuggestion(null);
  };

  const suggest = async () => {
    try {
      const selected = await compute(
        'select',
        {
          ...request,
          model: termsOf(factors, 'quadratic', false).map(({ name }) => name),
          method: 'backward',
          criterion: 'aicc',
          heredity: 'strong',
        },
        new AbortController().signal,
      );
      const terms = selected.best.terms
        .map(({ term }) => term)
        .filter((term) => term !== 'intercept' && !term.startsWith('block'));
      setChoice({ ...choice, terms });
      setSuggestion(
        `Backward elimination by AICc, heredity kept: ${selected.path.length - 1} steps. ${selected.warnings[0]?.message ?? ''}`,
      );
    } catch (problem) {
      setSuggestion(problem instanceof Error ? problem.message : 'No suggestion could be made.');
    }
  };

  const onKeep = async () => {
    try {
      await keepFit.mutateAsync({ ...choice, responseKey: response.key, why: reason, key });
      setKey(newKey());
    } catch {
      // shown below, from the mutation
    }
  };

  const isSameAsKept =
    kept !== null && !kept.isStale && JSON.stringify(startOf(props)) === JSON.stringify(choice);
  return (
    <div className="grid gap-4 desk:grid-cols-[minmax(0,26rem)_minmax(0,1fr)] items-start">
      <div className="grid gap-4">
        <Panel
          name="Terms"
          fact={`${choice.terms.length} in`}
          control={<Button onClick={() => void suggest()}>Suggest</Button>}
        >
          <div className="grid gap-3">
            <TermBoard
              factors={factors}
              terms={choice.terms}
              answer={answer ?? null}
              onChange={(terms) => change({ terms })}
            />
            {suggestion !== null && <Notice>{suggestion}</Notice>}
            <p className="text-1 text-ink-3">
              A term brings its parents and takes along what hangs on it. Bar: |t|.
            </p>
          </div>
        </Panel>
        <Panel name="Scale and settings">
          <div className="grid gap-3">
            <SelectField
              label="Analysed as"
              value={choice.transform}
              options={[
                { value: 'none', label: 'it is' },
                { value: 'log', label: 'logarithm' },
                { value: 'sqrt', label: 'square root' },
                ...(boundsOf(response)
                  ? [{ value: 'logit', label: 'logit, between 0 and 100 %' }]
                  : []),
              ]}
              onChange={(event) =>
                // one of the options above
                change({ transform: event.target.value as Choice['transform'] })
              }
            />
            <SelectField
              label="Fitted on"
              value={choice.settingsUsed}
              options={[
                { value: 'actual', label: 'delivered settings, where they were read' },
                { value: 'set', label: 'set-points' },
              ]}
              onChange={(event) =>
                // one of the options above
                change({ settingsUsed: event.target.value as Choice['settingsUsed'] })
              }
            />
            <Exclusions
              runs={evidence.runs}
              exclusions={choice.exclusions}
              onChange={(exclusions) => change({ exclusions })}
            />
          </div>
        </Panel>
        <Panel
          name={kept ? 'Kept model' : 'Keep this model'}
          fact={kept ? `by ${kept.by.name}, ${formatMoment(kept.createdAt)}` : undefined}
        >
          <div className="grid gap-3">
            {kept?.isStale && (
              <Notice tone="caution">
                Runs have changed since this model was kept: look again and keep it anew.
              </Notice>
            )}
            {why !== null ? (
              <p className="text-2 text-ink-3">{why}</p>
            ) : (
              <>
                <TextArea
                  label="Why these terms and this scale?"
                  rows={2}
                  value={reason}
                  onChange={(event) => setReason(event.target.value)}
                />
                {keepFit.error && <Notice tone="stop">{keepFit.error.message}</Notice>}
                <div>
                  <Button
                    look="primary"
                    isBusy={keepFit.isPending}
                    disabled={!answer || isFetching || isSameAsKept}
                    onClick={() => void onKeep()}
                  >
                    {isSameAsKept ? 'This model is kept' : `Keep it for ${response.name}`}
                  </Button>
                </div>
              </>
            )}
          </div>
        </Panel>
      </div>
      <div className="grid gap-4 min-w-0">
        {error && <Notice tone="stop">{error.message}</Notice>}
        {!answer && !error && <LoadingState what="Fitting the model." />}
        {answer && (
          <>
            <Panel
              name="May I believe it?"
              fact={`${response.name}, ${answer.summary.n} runs, ${answer.summary.parameters} terms`}
            >
              <FitSummary answer={answer} />
            </Panel>
            {answer.warnings
              .filter(({ code }) => code !== 'no-inference')
              .map(({ code, message }) => (
                <Notice key={code} tone="caution">
                  {message}
                </Notice>
              ))}
            <Panel name="Analysis of variance" isFlush>
              <AnovaTable anova={answer.anova} />
            </Panel>
            <Panel name="Coefficients" fact="coded: −1 low, +1 high" isFlush>
              <CoefficientTable terms={answer.terms} />
            </Panel>
            <Panel name="Residuals" fact="studentised, each run judged by the others">
              <div className="grid gap-3">
                <ResidualPlots diagnostics={answer.diagnostics} />
                <ul className="text-2 text-ink-2 grid gap-1">
                  <li>{answer.checks.normality.message}</li>
                  <li>{answer.checks.constantSpread.message}</li>
                  <li>{answer.checks.runOrder.message}</li>
                </ul>
              </div>
            </Panel>
          </>
        )}
      </div>
    </div>
  );
}
