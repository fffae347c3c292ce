import type { StudyFacts } from '@shared/policies/study';
import type { StudyJson } from '@shared/schemas/study';

/** What the policies ask about a study. */
export function factsOf({ progress, matrix }: StudyJson): StudyFacts {
  return {
    stage: progress.stage,
    isFrozen: matrix !== null,
    isReleased: progress.releasedAt !== null,
  };
}
