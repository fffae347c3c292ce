import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '@/components/Button';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { Cautions } from '@/features/bench/Cautions';
import { ImportPanel } from '@/features/bench/ImportPanel';
import { RunTable } from '@/features/bench/RunTable';
import { StudyFrame } from '@/features/studies/StudyFrame';
import { useActor } from '@/hooks/useActor';
import { runQueries } from '@/queries/runs';
import type { StudyJson } from '@shared/schemas/study';
import { factsOf } from './facts';
import { WithStudy } from './WithStudy';

function Bench({ study }: { readonly study: StudyJson }) {
  const why = studyPolicy.recordRun(useActor(), factsOf(study));
  const { brief, matrix } = study;
  const {
    data: runs,
    error,
    refetch,
  } = useQuery({ ...runQueries.ofStudy(study.id), enabled: matrix !== null });
  const next = runs?.find(({ status }) => status === 'planned');
  return (
    <StudyFrame
      study={study}
      here="bench"
      action={
        why === null &&
        next && (
          <LinkButton to={`/studies/${study.id}/bench/${next.id}`} look="primary">
            Do run {next.number}
          </LinkButton>
        )
      }
    >
      {!matrix || !brief ? (
        <EmptyState
          title="There are no runs yet"
          action={<LinkButton to={`/studies/${study.id}/matrix`}>To the matrix</LinkButton>}
        >
          The bench starts with a frozen matrix: it draws the order and reserves the sample.
        </EmptyState>
      ) : (
        <>
          {why !== null && <Notice>{why}</Notice>}
          {error && <ErrorState error={error} onRetry={() => void refetch()} />}
          {!runs && !error && <LoadingState what="Reading the runs." />}
          {runs && (
            <Panel
              name="Runs"
              fact={`${study.progress.runsRecorded} done, ${study.progress.runsPlanned} open, ${study.progress.runsVoid} void`}
              isFlush
            >
              <RunTable studyId={study.id} brief={brief} runs={runs} />
            </Panel>
          )}
          {why === null && next && <ImportPanel studyId={study.id} />}
          <Cautions />
        </>
      )}
    </StudyFrame>
  );
}

export function BenchPage() {
  return <WithStudy>{(study) => <Bench study={study} />}</WithStudy>;
}
