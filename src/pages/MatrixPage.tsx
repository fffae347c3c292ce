import { studyPolicy } from '@shared/policies/study';
import { useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { Notice } from '@/components/Notice';
import { EmptyState, LoadingState } from '@/components/states';
import { FreezeAction } from '@/features/matrix/FreezeAction';
import { FrozenMatrix } from '@/features/matrix/FrozenMatrix';
import { PlanComparison } from '@/features/matrix/PlanComparison';
import { usePlans } from '@/features/matrix/usePlans';
import { StudyFrame } from '@/features/studies/StudyFrame';
import { useActor } from '@/hooks/useActor';
import { runQueries } from '@/queries/runs';
import type { StudyJson } from '@shared/schemas/study';
import { factsOf } from './facts';
import { WithStudy } from './WithStudy';

function Comparing({
  study,
  brief,
  rig,
}: {
  readonly study: StudyJson;
  readonly brief: NonNullable<StudyJson['brief']>;
  readonly rig: NonNullable<StudyJson['rig']>;
}) {
  const navigate = useNavigate();
  const why = studyPolicy.freeze(useActor(), factsOf(study));
  const plans = usePlans(study, brief, rig.envelope);
  return (
    <StudyFrame
      study={study}
      here="matrix"
      action={
        why === null && (
          <FreezeAction
            study={study}
            plans={plans}
            onFrozen={() => void navigate(`/studies/${study.id}/bench`)}
          />
        )
      }
    >
      {why !== null && <Notice>{why}</Notice>}
      <PlanComparison study={study} brief={brief} envelope={rig.envelope} plans={plans} />
    </StudyFrame>
  );
}

function Frozen({
  study,
  matrix,
}: {
  readonly study: StudyJson;
  readonly matrix: NonNullable<StudyJson['matrix']>;
}) {
  const { data: runs } = useQuery(runQueries.ofStudy(study.id));
  return (
    <StudyFrame study={study} here="matrix">
      {runs ? (
        <FrozenMatrix matrix={matrix} runs={runs} />
      ) : (
        <LoadingState what="Reading the runs." />
      )}
    </StudyFrame>
  );
}

function Matrix({ study }: { readonly study: StudyJson }) {
  const { brief, rig, matrix } = study;
  if (matrix) return <Frozen study={study} matrix={matrix} />;
  if (brief && rig) return <Comparing study={study} brief={brief} rig={rig} />;
  return (
    <StudyFrame study={study} here="matrix">
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
    </StudyFrame>
  );
}

export function MatrixPage() {
  return <WithStudy>{(study) => <Matrix study={study} />}</WithStudy>;
}
