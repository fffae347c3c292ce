import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { EmptyState, LoadingState } from '@/components/states';
import { FrozenMatrix } from '@/features/matrix/FrozenMatrix';
import { PlanComparison } from '@/features/matrix/PlanComparison';
import { StudyFrame } from '@/features/studies/StudyFrame';
import { useActor } from '@/hooks/useActor';
import { runQueries } from '@/queries/runs';
import type { StudyJson } from '@shared/schemas/study';
import { factsOf } from './facts';
import { WithStudy } from './WithStudy';

function Matrix({ study }: { readonly study: StudyJson }) {
  const navigate = useNavigate();
  const why = studyPolicy.freeze(useActor(), factsOf(study));
  const { brief, rig, matrix } = study;
  const { data: runs } = useQuery({ ...runQueries.ofStudy(study.id), enabled: matrix !== null });
  return (
    <StudyFrame study={study} here="matrix">
      {!brief || !rig ? (
        <EmptyState
          title="The Brief comes first"
          action={
            <LinkButton to={`/studies/${study.id}/brief`} look="primary">
              Write the Brief
            </LinkButton>
          }
        >
          A plan needs to know what may vary, on which rig, and what the product should be.
        </EmptyState>
      ) : matrix ? (
        runs ? (
          <FrozenMatrix matrix={matrix} runs={runs} />
        ) : (
          <LoadingState what="Reading the runs." />
        )
      ) : (
        <PlanComparison
          study={study}
          brief={brief}
          rig={rig}
          why={why}
          onFrozen={() => void navigate(`/studies/${study.id}/bench`)}
        />
      )}
    </StudyFrame>
  );
}

export function MatrixPage() {
  return <WithStudy>{(study) => <Matrix study={study} />}</WithStudy>;
}
