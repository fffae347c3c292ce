import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { LinkButton } from '@/components/Button';
import { Notice } from '@/components/Notice';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { BriefEditor } from '@/features/brief/BriefEditor';
import { BriefSummary } from '@/features/brief/BriefSummary';
import { StudyFrame } from '@/features/studies/StudyFrame';
import { useActor } from '@/hooks/useActor';
import { labQueries } from '@/queries/lab';
import type { StudyJson } from '@shared/schemas/study';
import { factsOf } from './facts';
import { WithStudy } from './WithStudy';

function Brief({ study }: { readonly study: StudyJson }) {
  const why = studyPolicy.editBrief(useActor(), factsOf(study));
  const [isSaved, setIsSaved] = useState(false);
  const rigs = useQuery(labQueries.rigs());
  const stacks = useQuery(labQueries.sieveStacks());
  const error = rigs.error ?? stacks.error;
  return (
    <StudyFrame
      study={study}
      here="brief"
      action={
        study.brief &&
        study.progress.stage === 'matrix' && (
          <LinkButton to={`/studies/${study.id}/matrix`} look={isSaved ? 'primary' : 'secondary'}>
            Compare the plans
          </LinkButton>
        )
      }
    >
      {error && <ErrorState error={error} />}
      {why !== null && <Notice>{why}</Notice>}
      {isSaved && <Notice claim="Saved.">The Brief is kept; the plans can be compared.</Notice>}
      {why !== null && study.brief && <BriefSummary brief={study.brief} />}
      {why !== null && !study.brief && (
        <EmptyState title="The Brief is not written yet">
          A researcher or a lead writes down what may vary, and what the product should be.
        </EmptyState>
      )}
      {why === null &&
        (rigs.data && stacks.data ? (
          <BriefEditor
            study={study}
            rigs={rigs.data}
            stacks={stacks.data}
            onSaved={() => setIsSaved(true)}
          />
        ) : (
          <LoadingState what="Reading rigs and sieves." />
        ))}
    </StudyFrame>
  );
}

export function BriefPage() {
  return <WithStudy>{(study) => <Brief study={study} />}</WithStudy>;
}
