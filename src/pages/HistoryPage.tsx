import { useQuery } from '@tanstack/react-query';
import { LinkButton } from '@/components/Button';
import { Panel } from '@/components/Panel';
import { ErrorState, LoadingState } from '@/components/states';
import { HistoryTable } from '@/features/studies/HistoryTable';
import { useTitle } from '@/hooks/useTitle';
import { studyQueries } from '@/queries/studies';
import type { StudyJson } from '@shared/schemas/study';
import { WithStudy } from './WithStudy';

function Trail({ study }: { readonly study: StudyJson }) {
  useTitle(`Trail · ${study.code}`);
  const { data: events, error, refetch } = useQuery(studyQueries.history(study.id));
  return (
    <main className="page">
      <div className="flex items-center gap-4 flex-wrap">
        <h1 className="text-6 flex-1">Trail of {study.code}</h1>
        <LinkButton to={`/studies/${study.id}`}>Back to the study</LinkButton>
      </div>
      <p className="reading">
        Written with each change, in the same transaction; nobody can edit or delete an entry.
      </p>
      {error && <ErrorState error={error} onRetry={() => void refetch()} />}
      {!events && !error && <LoadingState what="Reading the trail." />}
      {events && (
        <Panel name="Events" fact={`${events.length}, newest first`} isFlush>
          <HistoryTable events={events} />
        </Panel>
      )}
    </main>
  );
}

export function HistoryPage() {
  return <WithStudy>{(study) => <Trail study={study} />}</WithStudy>;
}
