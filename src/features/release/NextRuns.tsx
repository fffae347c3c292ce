import type { NextAnswer } from '@shared/schemas/calc/next';
import { NEXT_PURPOSES } from '@shared/schemas/calc/next';
import { reasonSchema } from '@shared/schemas/text';
import { SET_POINTS, type SettingJson } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { constraintsOf, fullSetting, variedSettings } from '@shared/study/plan';
import { fitRequestOf, type Evidence, type ModelChoice } from '@shared/study/requests';
import type { ResponseJson } from '@shared/schemas/response';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { DataTable } from '@/components/DataTable';
import { Field, SelectField, TextArea } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { compute } from '@/engine/engine';
import { newKey } from '@/lib/api';
import {
  decimalsFor,
  formatDuration,
  formatInterval,
  formatMass,
  formatNumber,
  formatPlain,
} from '@/lib/format';
import { useAddRuns } from '@/queries/studies';

type Purpose = (typeof NEXT_PURPOSES)[number];

const WORDS: Readonly<Record<Purpose, string>> = {
  confirm: 'confirm the setting looked at',
  replicate: 'replicate, to judge lack of fit',
  augment: 'augment where prediction is poor',
  ascent: 'follow the steepest ascent',
  improve: 'try where most may be gained',
};

interface NextRunsProps {
  readonly study: StudyJson;
  readonly evidence: Evidence;
  readonly models: readonly { readonly response: ResponseJson; readonly fit: ModelChoice }[];
  readonly picked: SettingJson | null;
  readonly why: string | null;
  readonly onAdded: () => void;
}

const aimOf = ({ aim }: ResponseJson) =>
  aim === 'minimise' ? 'minimise' : aim === 'target' ? 'target' : 'maximise';

/** More runs, for a purpose: proposed by the model, added in a block of their own. */
export function NextRuns({ study, evidence, models, picked, why, onAdded }: NextRunsProps) {
  const { brief, envelope } = evidence;
  const [purpose, setPurpose] = useState<Purpose>('confirm');
  const [countText, setCountText] = useState('3');
  const [responseKey, setResponseKey] = useState(models[0]?.response.key ?? '');
  const [proposal, setProposal] = useState<NextAnswer | null>(null);
  const [reason, setReason] = useState('');
  const [problem, setProblem] = useState<string | null>(null);
  const [key, setKey] = useState(newKey);
  const addRuns = useAddRuns(study.id);
  const count = /^[1-9]\d?$/.test(countText) ? Number(countText) : null;
  const model = models.find(({ response }) => response.key === responseKey) ?? models[0];

  const propose = async () => {
    if (!model || count === null) return;
    const { response } = model;
    const fit = fitRequestOf(evidence, response, model.fit);
    setProblem(null);
    try {
      const answer = await compute(
        'next',
        {
          ...fit,
          constraints: constraintsOf(brief, envelope),
          region: 'range',
          purpose,
          count,
          aim: aimOf(response),
          ...(response.target === null ? {} : { target: response.target }),
          ...(purpose === 'confirm' && picked ? { at: variedSettings(brief, picked) } : {}),
        },
        new AbortController().signal,
      );
      setProposal(answer);
      setReason(answer.why.slice(0, 300));
    } catch (error) {
      setProposal(null);
      setProblem(error instanceof Error ? error.message : 'No runs could be proposed.');
    }
  };
  const onAdd = async () => {
    const parsed = reasonSchema.safeParse(reason);
    if (!proposal || !parsed.success) {
      setProblem(parsed.success ? 'Propose runs first.' : (parsed.error.issues[0]?.message ?? ''));
      return;
    }
    try {
      await addRuns.mutateAsync({
        purpose,
        settings: proposal.runs.map(({ settings }) => fullSetting(brief, settings)),
        why: parsed.data,
        version: study.version,
        key,
      });
      setKey(newKey());
      onAdded();
    } catch (error) {
      setProblem(error instanceof Error ? error.message : 'The runs could not be added.');
    }
  };
  const runs = proposal?.runs ?? [];
  return (
    <Panel name="More runs" fact="in a block of their own">
      <div className="grid gap-4">
        <div className="grid gap-3 phone:grid-cols-[3fr_1fr_2fr_auto] items-end">
          <SelectField
            label="Purpose"
            value={purpose}
            options={NEXT_PURPOSES.map((value) => ({ value, label: WORDS[value] })).reverse()}
            onChange={(event) => {
              setPurpose(event.target.value as Purpose); // one of the options above
              setProposal(null);
            }}
          />
          <Field
            label="Runs"
            value={countText}
            inputMode="numeric"
            error={count === null ? 'From 1 to 60.' : undefined}
            onChange={(event) => setCountText(event.target.value)}
          />
          <SelectField
            label="By the model of"
            value={responseKey}
            options={models.map(({ response }) => ({ value: response.key, label: response.name }))}
            onChange={(event) => {
              setResponseKey(event.target.value);
              setProposal(null);
            }}
          />
          <Button onClick={() => void propose()} disabled={count === null || !model}>
            Propose
          </Button>
        </div>
        {problem !== null && <Notice tone="stop">{problem}</Notice>}
        {proposal && (
          <>
            <p className="reading">{proposal.why}</p>
            {proposal.warnings.map(({ code, message }) => (
              <Notice key={code} tone="caution">
                {message}
              </Notice>
            ))}
            <DataTable
              caption="Proposed runs"
              columns={[
                ...brief.factors.map(({ key: factor }) => {
                  const setPoint = SET_POINTS.find((each) => each.key === factor);
                  return {
                    key: factor,
                    header: setPoint?.name ?? factor,
                    unit: setPoint?.unit,
                    numeric: true,
                    cell: ({ settings }: NextAnswer['runs'][number]) =>
                      formatPlain(Number(settings[factor])),
                  };
                }),
                {
                  key: 'predicted',
                  header: `${model?.response.name ?? ''} expected`,
                  unit: model?.response.unit,
                  numeric: true,
                  cell: ({ predicted }) => formatNumber(predicted, decimalsFor(predicted)),
                },
                {
                  key: 'interval',
                  header: 'One run, 95 %',
                  numeric: true,
                  cell: ({ piLow, piHigh }) => formatInterval(piLow, piHigh),
                },
              ]}
              rows={runs.map((run, i) => ({ ...run, i }))}
              rowKey={(run) => (run as { i?: number }).i ?? 0}
            />
            <p className="text-2 text-ink-2">
              Costs {runs.length} runs, {formatMass(runs.length * brief.batchMassG)} of{' '}
              {formatMass(study.stock.leftG)} left, about{' '}
              {formatDuration(60 * runs.length * brief.handlingMinutes)} at the bench.
            </p>
            {why !== null ? (
              <Notice>{why}</Notice>
            ) : (
              <>
                <TextArea
                  label="Why these runs?"
                  rows={2}
                  value={reason}
                  onChange={(event) => setReason(event.target.value)}
                />
                <div>
                  <Button look="primary" isBusy={addRuns.isPending} onClick={() => void onAdd()}>
                    Add {runs.length} runs
                  </Button>
                </div>
              </>
            )}
          </>
        )}
      </div>
    </Panel>
  );
}
