import { studyPolicy } from '@shared/policies/study';
import { isComputed } from '@shared/schemas/response';
import type { StudyJson } from '@shared/schemas/study';
import { useQuery } from '@tanstack/react-query';
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

function Fit({ study }: { readonly study: StudyJson }) {
  const why = studyPolicy.fit(useActor(), factsOf(study));
  const [search, setSearch] = useSearchParams();
  const { brief, rig, matrix } = study;
  const hasRuns = matrix !== null;
  const runs = useQuery({ ...runQueries.ofStudy(study.id), enabled: hasRuns });
  const fits = useQuery({ ...fitQueries.ofStudy(study.id), enabled: hasRuns });
  const error = runs.error ?? fits.error;
  const modelled = brief?.responses.filter((response) => !isComputed(response)) ?? [];
  const response = modelled.find(({ key }) => key === search.get('response')) ?? modelled[0];
  const recorded = runs.data?.filter(({ status }) => status === 'recorded').length ?? 0;
  const isDone =
    study.progress.modelsNeeded > 0 && study.progress.modelsKept >= study.progress.modelsNeeded;
  return (
    <StudyFrame
      study={study}
      here="fit"
      action={isDone && <LinkButton to={`/studies/${study.id}/map`}>To the map</LinkButton>}
    >
      {error && <ErrorState error={error} />}
      {(!hasRuns || (runs.data && recorded === 0)) && (
        <EmptyState
          title="There is nothing to fit yet"
          action={<LinkButton to={`/studies/${study.id}/bench`}>To the bench</LinkButton>}
        >
          A model needs recorded runs.
        </EmptyState>
      )}
      {hasRuns && (!runs.data || !fits.data) && !error && <LoadingState what="Reading the runs." />}
      {brief && rig && response && runs.data && fits.data && recorded > 0 && (
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
                {study.progress.runsPlanned} runs are still open: what is fitted now is a look
                ahead.
              </span>
            )}
          </div>
          <FitWorkbench
            key={`${response.key} ${fits.data.find((fit) => fit.responseKey === response.key && fit.isKept)?.id ?? 0}`}
            studyId={study.id}
            evidence={{ brief, envelope: rig.envelope, runs: runs.data }}
            response={response}
            kept={fits.data.find((fit) => fit.responseKey === response.key && fit.isKept) ?? null}
            why={why}
          />
        </>
      )}
    </StudyFrame>
  );
}

export function FitPage() {
  return <WithStudy>{(study) => <Fit study={study} />}</WithStudy>;
}
