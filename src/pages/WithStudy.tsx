import type { StudyJson } from '@shared/schemas/study';
import { useQuery } from '@tanstack/react-query';
import type { ReactElement } from 'react';
import { LinkButton } from '@/components/Button';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { useNumberParam } from '@/hooks/useNumberParam';
import { ApiError } from '@/lib/api';
import { studyQueries } from '@/queries/studies';

interface WithStudyProps {
  readonly children: (study: StudyJson) => ReactElement;
}

/** Loads the study of the address; its page needs to know only the study. */
export function WithStudy({ children }: WithStudyProps) {
  const studyId = useNumberParam('studyId');
  const isNumber = Number.isFinite(studyId);
  const { data, error, refetch } = useQuery({ ...studyQueries.one(studyId), enabled: isNumber });
  if (!isNumber || (error instanceof ApiError && error.status === 404))
    return (
      <main className="page">
        <EmptyState
          title="There is no such study"
          action={<LinkButton to="/">To the studies</LinkButton>}
        >
          The address may be mistyped, or the study belongs to another lab.
        </EmptyState>
      </main>
    );
  if (error && !data)
    return (
      <main className="page">
        <ErrorState error={error} onRetry={() => void refetch()} />
      </main>
    );
  if (!data)
    return (
      <main className="page">
        <LoadingState what="Reading the study." />
      </main>
    );
  return children(data);
}
