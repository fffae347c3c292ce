import { LinkButton } from '@/components/Button';
import { EmptyState, ErrorState, LoadingState } from '@/components/states';
import { MapBoard } from '@/features/map/MapBoard';
import { StudyFrame } from '@/features/studies/StudyFrame';
import type { StudyJson } from '@shared/schemas/study';
import { useKeptModels } from './useKeptModels';
import { WithStudy } from './WithStudy';

function Map({ study }: { readonly study: StudyJson }) {
  const { evidence, models, isPending, error } = useKeptModels(study);
  return (
    <StudyFrame
      study={study}
      here="map"
      action={
        models.length > 0 && (
          <LinkButton to={`/studies/${study.id}/release`} look="primary">
            Rank the settings
          </LinkButton>
        )
      }
    >
      {error && <ErrorState error={error} />}
      {isPending && !error && <LoadingState what="Reading the models." />}
      {!isPending && models.length === 0 && (
        <EmptyState
          title="There is no map yet"
          action={<LinkButton to={`/studies/${study.id}/fit`}>To the fit</LinkButton>}
        >
          A map needs a kept model: the analyst keeps one for each response.
        </EmptyState>
      )}
      {evidence && models.length > 0 && <MapBoard evidence={evidence} models={models} />}
    </StudyFrame>
  );
}

export function MapPage() {
  return <WithStudy>{(study) => <Map study={study} />}</WithStudy>;
}
