import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { Notice } from '@/components/Notice';
import { Wordmark } from '@/components/Wordmark';
import { PracticeTag } from '@/components/PracticeTag';
import { EmptyState, ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { RunSheet } from '@/features/bench/RunSheet';
import { useActor } from '@/hooks/useActor';
import { useNumberParam } from '@/hooks/useNumberParam';
import { useTitle } from '@/hooks/useTitle';
import { runQueries } from '@/queries/runs';
import type { StudyJson } from '@shared/schemas/study';
import { factsOf } from './facts';
import { WithStudy } from './WithStudy';

function RunOf({ study }: { readonly study: StudyJson }) {
  const runId = useNumberParam('runId');
  const navigate = useNavigate();
  const why = studyPolicy.recordRun(useActor(), factsOf(study));
  const [warnings, setWarnings] = useState<readonly string[] | null>(null);
  const { data: runs, error, refetch } = useQuery(runQueries.ofStudy(study.id));
  const run = runs?.find(({ id }) => id === runId);
  useTitle(run ? `Run ${run.number} · ${study.code}` : study.code);
  const { brief, rig } = study;
  const back = `/studies/${study.id}/bench`;
  const frame = (content: React.ReactNode) => (
    // dark by default at the bench, whatever the desk prefers
    <div data-theme="dark" className="min-h-screen bg-paper text-ink">
      <header className="bench-bar">
        <Link to="/" aria-label="Cragline, to the start">
          <Wordmark height={30} isMarkOnly />
        </Link>
        <Link to={back} className="link">
          All runs
        </Link>
        <div className="flex-1">
          <h1 className="text-5 font-mark">
            Run {run?.number ?? ''} of {runs?.length ?? ''}
          </h1>
          <div className="text-2 text-ink-2">
            {study.code} · block {run?.block ?? ''} · bags of {brief?.batchMassG ?? ''} g
          </div>
        </div>
        {study.isSimulated && <PracticeTag isShort />}
      </header>
      <main>{content}</main>
    </div>
  );
  if (why !== null)
    return frame(
      <div className="p-6">
        <ForbiddenState why={why} action={<LinkButton to={back}>To the runs</LinkButton>} />
      </div>,
    );
  if (error)
    return frame(
      <div className="p-6">
        <ErrorState error={error} onRetry={() => void refetch()} />
      </div>,
    );
  if (!runs || !brief || !rig)
    return frame(
      <div className="p-6">
        <LoadingState what="Reading the run." />
      </div>,
    );
  if (!run || run.status === 'void')
    return frame(
      <div className="p-6">
        <EmptyState
          title={run ? 'This run is void' : 'There is no such run'}
          action={<LinkButton to={back}>To the runs</LinkButton>}
        >
          {run?.voidReason ?? 'The address may be mistyped.'}
        </EmptyState>
      </div>,
    );
  const at = runs.indexOf(run);
  const first = runs.find(({ status }) => status === 'planned');
  const next = runs.find(({ id, status }) => status === 'planned' && id !== run.id);
  if (warnings)
    return frame(
      <div className="p-6 grid gap-4">
        <Notice claim={`Run ${run.number} is recorded.`}>The server has it.</Notice>
        {warnings.map((warning) => (
          <Notice key={warning} tone="caution">
            {warning}
          </Notice>
        ))}
        <div className="flex flex-wrap gap-4">
          {next && (
            <LinkButton to={`${back}/${next.id}`} look="primary" size="bench">
              On to run {next.number}
            </LinkButton>
          )}
          <LinkButton to={back} size="bench">
            To all runs
          </LinkButton>
        </div>
      </div>,
    );
  return frame(
    <RunSheet
      key={run.id}
      study={study}
      brief={brief}
      envelope={rig.envelope}
      run={run}
      before={runs[at - 1] ?? null}
      firstNumber={first?.number ?? null}
      onRecorded={(heard) => {
        if (heard.length > 0 || next) setWarnings(heard);
        else void navigate(back);
      }}
    />,
  );
}

export function RunPage() {
  // a new address is a new run: nothing of the one before may show
  const runId = useNumberParam('runId');
  return <WithStudy>{(study) => <RunOf key={runId} study={study} />}</WithStudy>;
}
