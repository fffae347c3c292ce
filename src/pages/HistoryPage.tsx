import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { Button, LinkButton } from '@/components/Button';
import { Panel } from '@/components/Panel';
import { ErrorState, LoadingState } from '@/components/states';
import { HistoryTable } from '@/features/studies/HistoryTable';
import { useTitle } from '@/hooks/useTitle';
import { runQueries } from '@/queries/runs';
import { studyQueries } from '@/queries/studies';
import type { StudyJson } from '@shared/schemas/study';
import { WithStudy } from './WithStudy';

function Trail({ study }: { readonly study: StudyJson }) {
  useTitle(`Trail · ${study.code}`);
  const trail = useInfiniteQuery(studyQueries.history(study.id));
  const { error } = trail;
  const events = trail.data?.pages.flat();
  const { data: runs } = useQuery(runQueries.ofStudy(study.id));
  const runNumbers = new Map((runs ?? []).map(({ id, number }) => [id, number]));
  return (
    <main className="page">
      <div className="flex items-center gap-4 flex-wrap">
        <h1 className="text-6 flex-1">Trail of {study.code}</h1>
        <LinkButton to={`/studies/${study.id}`}>Back to the study</LinkButton>
      </div>
      <p className="reading">
        Written with each change, in the same transaction; nobody can edit or delete an entry.
      </p>
      {error && <ErrorState error={error} onRetry={() => void trail.refetch()} />}
      {!events && !error && <LoadingState what="Reading the trail." />}
      {events && (
        <Panel
          name="Events"
          fact={`${trail.hasNextPage ? 'the newest ' : ''}${events.length}`}
          isFlush
        >
          <HistoryTable events={events} runNumbers={runNumbers} />
        </Panel>
      )}
      {trail.hasNextPage && (
        <Button isBusy={trail.isFetchingNextPage} onClick={() => void trail.fetchNextPage()}>
          Show older events
        </Button>
      )}
    </main>
  );
}

export function HistoryPage() {
  return <WithStudy>{(study) => <Trail study={study} />}</WithStudy>;
}
