import {
  studyJsonSchema,
  studySummarySchema,
  type BriefInput,
  type StudyJson,
} from '@shared/schemas/study';
import type { PlanInput, Purpose } from '@shared/schemas/matrix';
import type { SettingJson } from '@shared/schemas/setPoint';
import { auditEventJsonSchema } from '@shared/schemas/history';
import {
  infiniteQueryOptions,
  queryOptions,
  useMutation,
  useQueryClient,
} from '@tanstack/react-query';
import { z } from 'zod';
import { api } from '@/lib/api';

export const studyQueries = {
  all: () =>
    queryOptions({
      queryKey: ['studies'],
      queryFn: ({ signal }) => api.get('/studies', z.array(studySummarySchema), signal),
    }),
  one: (studyId: number) =>
    queryOptions({
      queryKey: ['studies', studyId],
      queryFn: ({ signal }) => api.get(`/studies/${studyId}`, studyJsonSchema, signal),
    }),
  /** Newest first, a hundred at a time; each page goes on before the last event of the one before. */
  history: (studyId: number) =>
    infiniteQueryOptions({
      queryKey: ['studies', studyId, 'history'],
      initialPageParam: null as number | null,
      queryFn: ({ signal, pageParam }) =>
        api.get(
          `/studies/${studyId}/history${pageParam === null ? '' : `?before=${pageParam}`}`,
          z.array(auditEventJsonSchema),
          signal,
        ),
      getNextPageParam: (page) => (page.length < EVENTS_A_PAGE ? null : (page.at(-1)?.id ?? null)),
    }),
};

const EVENTS_A_PAGE = 100;

/** A study's page came back from a write: it is the newest, and its lists are not. */
export function useStudyChanged() {
  const client = useQueryClient();
  return async (study: StudyJson) => {
    client.setQueryData(studyQueries.one(study.id).queryKey, study);
    await client.invalidateQueries({ queryKey: ['studies'] });
    await client.invalidateQueries({ queryKey: ['samples'] });
  };
}

export function useOpenStudy() {
  const changed = useStudyChanged();
  return useMutation({
    mutationFn: (input: {
      body: { title: string; sampleId: number; question: string };
      key: string;
    }) => api.create('/studies', input.body, studyJsonSchema, input.key),
    onSuccess: changed,
  });
}

export function useSaveBrief(studyId: number) {
  const changed = useStudyChanged();
  return useMutation({
    mutationFn: (input: { brief: BriefInput; version: number }) =>
      api.put(`/studies/${studyId}/brief`, input, studyJsonSchema),
    onSuccess: changed,
  });
}

export function useFreezeMatrix(studyId: number) {
  const changed = useStudyChanged();
  return useMutation({
    mutationFn: (input: { plan: PlanInput; version: number; key: string }) =>
      api.create(
        `/studies/${studyId}/matrix`,
        { plan: input.plan, version: input.version },
        studyJsonSchema,
        input.key,
      ),
    onSuccess: changed,
  });
}

export interface AddedRuns {
  readonly purpose: Exclude<Purpose, 'matrix'>;
  readonly settings: readonly SettingJson[];
  readonly why: string;
  readonly version: number;
}

export function useAddRuns(studyId: number) {
  const changed = useStudyChanged();
  return useMutation({
    mutationFn: ({ key, ...body }: AddedRuns & { key: string }) =>
      api.create(`/studies/${studyId}/added-runs`, body, studyJsonSchema, key),
    onSuccess: changed,
  });
}
