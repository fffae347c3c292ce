import type { FitJson } from '@shared/schemas/fit';
import type { CandidateJson } from '@shared/schemas/release';
import type { ResponseJson } from '@shared/schemas/response';
import type { RunJson } from '@shared/schemas/run';
import type { SettingJson } from '@shared/schemas/setPoint';
import type { StudyJson } from '@shared/schemas/study';
import { chooseRequestOf, type Evidence } from '@shared/study/requests';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '@/components/Button';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { Segments } from '@/components/Segments';
import { LoadingState } from '@/components/states';
import { calculation } from '@/engine/engine';
import { newKey } from '@/lib/api';
import { formatNumber } from '@/lib/format';
import { useTakeCandidate } from '@/queries/releases';
import { Duties } from './Duties';
import { NextRuns } from './NextRuns';
import { Ranking } from './Ranking';
import { SignForm } from './SignForm';
import { TradeOff } from './TradeOff';

interface ReleaseBoardProps {
  readonly study: StudyJson;
  readonly evidence: Evidence & { readonly runs: readonly RunJson[] };
  readonly models: readonly { readonly response: ResponseJson; readonly fit: FitJson }[];
  readonly candidates: readonly CandidateJson[];
  readonly whyNot: {
    readonly nominate: string | null;
    readonly addRuns: string | null;
    readonly sign: string | null;
  };
  readonly onAdded: () => void;
  readonly onSigned: () => void;
}

const SHOWN = 6;
type RankBy = 'probability' | 'desirability';

/** Goals, ranked settings, what they trade, what is still open, more runs, and the signature. */
export function ReleaseBoard(props: ReleaseBoardProps) {
  const { study, evidence, models, candidates, whyNot, onAdded, onSigned } = props;
  const [rankBy, setRankBy] = useState<RankBy>('probability');
  const [picked, setPicked] = useState<SettingJson | null>(candidates[0]?.settings ?? null);
  const [isSigning, setIsSigning] = useState(false);
  const takeCandidate = useTakeCandidate(study.id);
  const choices = Object.fromEntries(models.map(({ response, fit }) => [response.key, fit]));
  const request = { ...chooseRequestOf(evidence, choices), rankBy, top: SHOWN };
  const { data: answer, error, isPending } = useQuery(calculation('choose', request));
  const take = (settings: SettingJson) => {
    setPicked(settings);
    takeCandidate.mutate({ settings, note: '', key: newKey() });
  };
  return (
    <>
      <div className="grid gap-4 wide:grid-cols-[minmax(0,1.9fr)_minmax(0,1fr)] items-start">
        <Panel
          name="Ranked settings"
          fact={
            answer
              ? `all ${formatNumber(answer.evaluated, 0)} settable combinations looked at`
              : undefined
          }
          control={
            <Segments
              label="Ranked by"
              value={rankBy}
              options={[
                { value: 'probability', label: 'chance of all goals' },
                { value: 'desirability', label: 'desirability' },
              ]}
              onChange={setRankBy}
            />
          }
          isFlush
        >
          {error && <Notice tone="stop">{error.message}</Notice>}
          {isPending && (
            <div className="p-4">
              <LoadingState what="Looking at every settable setting." />
            </div>
          )}
          {answer && (
            <>
              {answer.reasons.map((reason) => (
                <Notice key={reason}>{reason}</Notice>
              ))}
              <Ranking
                brief={evidence.brief}
                best={answer.best}
                candidates={candidates}
                picked={picked}
                why={whyNot.nominate}
                onPick={setPicked}
                onTake={take}
              />
              <p className="text-2 text-ink-3 px-4 py-3">
                Mark filled: the 95 % interval is clear of the limit; half: the limit lies inside
                it; hollow: the wrong side.{' '}
                {answer.joint === 'independent'
                  ? 'Responses taken as independent.'
                  : answer.joint === 'none'
                    ? ''
                    : 'Each square is one draw from all models together.'}
              </p>
            </>
          )}
          {takeCandidate.error && <Notice tone="stop">{takeCandidate.error.message}</Notice>}
        </Panel>
        <div className="grid gap-4">
          {answer && (
            <TradeOff brief={evidence.brief} tradeOff={answer.tradeOff} candidates={candidates} />
          )}
          <Duties
            study={study}
            fits={models.map(({ fit }) => fit)}
            runs={evidence.runs}
            setting={picked}
          />
        </div>
      </div>
      <div className="grid gap-4 desk:grid-cols-2 items-start">
        {study.progress.releasedAt === null && (
          <NextRuns
            study={study}
            evidence={evidence}
            models={models}
            picked={picked}
            why={whyNot.addRuns}
            onAdded={onAdded}
          />
        )}
        {whyNot.sign !== null ? (
          <Notice>{whyNot.sign}</Notice>
        ) : picked === null ? (
          <Notice>Look at one of the ranked settings to sign it.</Notice>
        ) : isSigning ? (
          <SignForm study={study} setting={picked} onSigned={onSigned} />
        ) : (
          <Panel
            name="Signature"
            fact={`${picked.voltage} kV, ${picked.gap} mm, ${picked.pulses} pulses`}
          >
            <div className="grid gap-3 justify-items-start">
              <p className="reading">
                Signing seals setting, models, predictions and confirmation as they stand now. The
                study takes no further entries after it.
              </p>
              <Button onClick={() => setIsSigning(true)}>Go on to sign</Button>
            </div>
          </Panel>
        )}
      </div>
    </>
  );
}
