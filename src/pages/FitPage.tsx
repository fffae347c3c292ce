import { studyPolicy } from '@shared/policies/study';
import type { FitJson } from '@shared/schemas/fit';
import { isComputed } from '@shared/schemas/response';
import type { StudyJson } from '@shared/schemas/study';
import { useQuery } from '@tanstack/react-query';
import type { ComponentProps } from 'react';
import { useSearchParams } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { Segments } from '@/components/Segments';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { FitWorkbench } from '@/features/fit/FitWorkbench';
import { StudyFrame } from '@/features/studies/StudyFrame';
import { useActor } from '@/hooks/useActor';
import { fitQueries } from '@/queries/fits';
import { runQueries } from '@/queries/runs';
import { factsOf } from './facts';
import { WithStudy } from './WithStudy';

interface ReadyProps {
  readonly study: StudyJson;
  readonly evidence: ComponentProps<typeof FitWorkbench>['evidence'];
  readonly fits: readonly FitJson[];
}

/** The workbench of the response in the address. */
function Ready({ study, evidence, fits }: ReadyProps) {
  const why = studyPolicy.fit(useActor(), factsOf(study));
  const [search, setSearch] = useSearchParams();
  const modelled = evidence.brief.responses.filter((response) => !isComputed(response));
  const response = modelled.find(({ key }) => key === search.get('response')) ?? modelled[0];
  if (!response)
    return (
      <EmptyState title="Nothing to model here">
        Every response of this study follows exactly from the settings.
      </EmptyState>
    );
  const kept = fits.find((fit) => fit.responseKey === response.key && fit.isKept) ?? null;
  return (
    <>
      <div className="flex flex-wrap gap-4 items-center">
        <Segments
          label="Response"
          value={response.key}
          options={modelled.map(({ key, name }) => ({ value: key, label: name }))}
          onChange={(key) => setSearch({ response: key }, { replace: true })}
        />
        {study.progress.runsPlanned > 0 && (
          <span className="text-2 text-ink-3">
            {study.progress.runsPlanned} runs are still open: what is fitted now is a look ahead.
          </span>
        )}
      </div>
      <FitWorkbench
        key={`${response.key} ${kept?.id ?? 0}`}
        studyId={study.id}
        evidence={evidence}
        response={response}
        kept={kept}
        why={why}
      />
    </>
  );
}

function Fit({ study }: { readonly study: StudyJson }) {
  const { brief, rig, matrix, progress } = study;
  const hasRuns = matrix !== null;
  const runs = useQuery({ ...runQueries.ofStudy(study.id), enabled: hasRuns });
  const fits = useQuery({ ...fitQueries.ofStudy(study.id), enabled: hasRuns });
  const error = runs.error ?? fits.error;
  const isDone = progress.modelsNeeded > 0 && progress.modelsKept >= progress.modelsNeeded;
  const isReady = brief && rig && runs.data && fits.data;
  return (
    <StudyFrame
      study={study}
      here="fit"
      action={isDone && <LinkButton to={`/studies/${study.id}/map`}>To the map</LinkButton>}
    >
      {error && <ErrorState error={error} />}
      {progress.runsRecorded === 0 && (
        <EmptyState
          title="There is nothing to fit yet"
          action={<LinkButton to={`/studies/${study.id}/bench`}>To the bench</LinkButton>}
        >
          A model needs recorded runs.
        </EmptyState>
      )}
      {hasRuns && !isReady && !error && <LoadingState what="Reading the runs." />}
      {isReady && progress.runsRecorded > 0 && (
        <Ready
          study={study}
          evidence={{ brief, envelope: rig.envelope, runs: runs.data }}
          fits={fits.data}
        />
      )}
    </StudyFrame>
  );
}

export function FitPage() {
  return <WithStudy>{(study) => <Fit study={study} />}</WithStudy>;
}
