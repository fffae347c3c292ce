import { mayRelease, studyPolicy } from '@shared/policies/study';
import { isComputed } from '@shared/schemas/response';
import type { StudyJson } from '@shared/schemas/study';
import { useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { LinkButton } from '@/components/Button';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { ReleaseBoard } from '@/features/release/ReleaseBoard';
import { SignedRelease } from '@/features/release/SignedRelease';
import { StudyFrame } from '@/features/studies/StudyFrame';
import { useActor } from '@/hooks/useActor';
import { releaseQueries } from '@/queries/releases';
import { useUser } from '@/queries/session';
import { factsOf } from './facts';
import { useKeptModels } from './useKeptModels';
import { WithStudy } from './WithStudy';

function Release({ study }: { readonly study: StudyJson }) {
  const actor = useActor();
  const { lab } = useUser();
  const navigate = useNavigate();
  const { evidence, models, isPending, error } = useKeptModels(study);
  const candidates = useQuery(releaseQueries.candidates(study.id));
  const releases = useQuery(releaseQueries.ofStudy(study.id));
  const facts = factsOf(study);
  const missing = (study.brief?.responses ?? []).filter(
    (response) =>
      response.aim !== 'observe' &&
      !isComputed(response) &&
      !models.some((model) => model.response.key === response.key),
  );
  const keptBy = models.map(({ fit }) => fit.by.id);
  const whySign =
    studyPolicy.sign(actor, facts) ??
    mayRelease(actor, { twoPersonRule: lab.twoPersonRule, keptBy });
  const isLoading = (isPending || !candidates.data || !releases.data) && !error;
  return (
    <StudyFrame study={study} here="release">
      {error && <ErrorState error={error} />}
      {isLoading && <LoadingState what="Reading models and candidates." />}
      {releases.data?.map((release) => (
        <SignedRelease key={release.id} release={release} />
      ))}
      {!isLoading && missing.length > 0 && (
        <EmptyState
          title="The models come first"
          action={<LinkButton to={`/studies/${study.id}/fit`}>To the fit</LinkButton>}
        >
          {missing.length === 1
            ? `${missing[0]?.name ?? ''} has a goal but no kept model yet.`
            : `${missing.map(({ name }) => name).join(', ')} have goals but no kept models yet.`}
        </EmptyState>
      )}
      {!isLoading && missing.length === 0 && evidence && candidates.data && (
        <ReleaseBoard
          study={study}
          evidence={evidence}
          models={models}
          candidates={candidates.data}
          whyNot={{
            nominate: studyPolicy.nominate(actor, facts),
            addRuns: studyPolicy.addRuns(actor, facts),
            sign: whySign,
          }}
          onAdded={() => void navigate(`/studies/${study.id}/bench`)}
          onSigned={() => window.scrollTo({ top: 0 })}
        />
      )}
    </StudyFrame>
  );
}

export function ReleasePage() {
  return <WithStudy>{(study) => <Release study={study} />}</WithStudy>;
}
