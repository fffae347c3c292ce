import { fitRequestSchema } from '@shared/schemas/calc/fit';
import type { FitJson } from '@shared/schemas/fit';
import type { ResponseJson } from '@shared/schemas/response';
import type { RunJson } from '@shared/schemas/run';
import type { StudyJson } from '@shared/schemas/study';
import { fitRequestOf, type Evidence } from '@shared/study/requests';
import { useQueries, useQuery } from '@tanstack/react-query';
import { calculation } from '@/engine/engine';
import { mapModelOf, type MapModel } from '@/features/map/mapModel';
import { fitQueries } from '@/queries/fits';
import { runQueries } from '@/queries/runs';

export interface KeptModels {
  readonly evidence: (Evidence & { readonly runs: readonly RunJson[] }) | null;
  /** Of each response that has one; computed here anew from the runs. */
  readonly models: readonly MapModel[];
  readonly isPending: boolean;
  readonly error: Error | null;
}

/** The kept models of a study with the evidence they stand on. */
export function useKeptModels(study: StudyJson): KeptModels {
  const { brief, rig, matrix } = study;
  const enabled = matrix !== null;
  const runs = useQuery({ ...runQueries.ofStudy(study.id), enabled });
  const fits = useQuery({ ...fitQueries.ofStudy(study.id), enabled });
  const evidence =
    brief && rig && runs.data ? { brief, envelope: rig.envelope, runs: runs.data } : null;
  const kept: { response: ResponseJson; fit: FitJson }[] = evidence
    ? evidence.brief.responses.flatMap((response) => {
        const fit = fits.data?.find((each) => each.isKept && each.responseKey === response.key);
        return fit ? [{ response, fit }] : [];
      })
    : [];
  const answers = useQueries({
    queries: kept.map(({ response, fit }) =>
      calculation(
        'fit',
        evidence ? fitRequestSchema.parse(fitRequestOf(evidence, response, fit)) : null,
      ),
    ),
  });
  const models = kept.flatMap(({ response, fit }, i) => {
    const answer = answers[i]?.data;
    return evidence && answer ? [mapModelOf(evidence, response, fit, answer)] : [];
  });
  return {
    evidence,
    models,
    isPending: enabled && (!evidence || !fits.data || answers.some(({ isPending }) => isPending)),
    error: runs.error ?? fits.error ?? answers.find(({ error }) => error)?.error ?? null,
  };
}
