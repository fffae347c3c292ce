import type { StudySummaryJson } from '@shared/schemas/study';
import { STAGES, type Stage } from '@shared/schemas/stage';
import type { Station } from '@/components/StageLine';

export const STAGE_NAMES: Readonly<Record<Stage, string>> = {
  brief: 'Brief',
  matrix: 'Matrix',
  bench: 'Bench',
  fit: 'Fit',
  map: 'Map',
  release: 'Release',
};

function factOf(stage: Stage, { progress }: StudySummaryJson): string | undefined {
  const { runsPlanned, runsRecorded, runsVoid, blocks, modelsKept, modelsNeeded, candidates } =
    progress;
  switch (stage) {
    case 'matrix':
      return runsPlanned + runsRecorded + runsVoid > 0
        ? `${runsPlanned + runsRecorded + runsVoid} runs`
        : undefined;
    case 'bench':
      return runsRecorded > 0
        ? `${runsRecorded} done${runsPlanned > 0 ? `, ${runsPlanned} open` : ''}${blocks > 1 ? `, block ${blocks}` : ''}`
        : undefined;
    case 'fit':
      return modelsNeeded > 0 && modelsKept > 0
        ? `${modelsKept} of ${modelsNeeded} models`
        : undefined;
    case 'release':
      return progress.releasedAt
        ? 'signed'
        : candidates > 0
          ? `${candidates} candidates`
          : undefined;
    default:
      return undefined;
  }
}

/** The six stations of a study; a study that looped back keeps what it walked before half-filled. */
export function stationsOf(study: StudySummaryJson): Station[] {
  const now = STAGES.indexOf(study.progress.stage);
  const isSigned = study.progress.releasedAt !== null;
  const hasLooped = study.progress.stage === 'bench' && study.progress.modelsKept > 0;
  return STAGES.map((stage, i): Station => {
    const fact = factOf(stage, study);
    const state = isSigned || i < now ? 'done' : i === now ? 'now' : hasLooped ? 'half' : 'next';
    return {
      key: stage,
      name: STAGE_NAMES[stage],
      to: `/studies/${study.id}/${stage}`,
      state,
      ...(fact === undefined ? {} : { fact }),
    };
  });
}
