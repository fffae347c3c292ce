import {
  importAnswerSchema,
  recordedRunSchema,
  runJsonSchema,
  type RunRecord,
} from '@shared/schemas/run';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { api } from '@/lib/api';

export const runQueries = {
  ofStudy: (studyId: number) =>
    queryOptions({
      queryKey: ['studies', studyId, 'runs'],
      queryFn: ({ signal }) => api.get(`/studies/${studyId}/runs`, z.array(runJsonSchema), signal),
    }),
};

/** Runs changed, and with them the study's progress, its stock and what its models stand on. */
function useRunsChanged() {
  const client = useQueryClient();
  return async () => {
    await client.invalidateQueries({ queryKey: ['studies'] });
    await client.invalidateQueries({ queryKey: ['samples'] });
  };
}

export function useRecordRun(studyId: number) {
  const changed = useRunsChanged();
  return useMutation({
    mutationFn: ({ runId, record }: { runId: number; record: RunRecord }) =>
      api.put(`/studies/${studyId}/runs/${runId}`, record, recordedRunSchema),
    onSuccess: changed,
  });
}

export function useVoidRun(studyId: number) {
  const changed = useRunsChanged();
  return useMutation({
    mutationFn: ({ runId, ...body }: { runId: number; why: string; version: number }) =>
      api.post(`/studies/${studyId}/runs/${runId}/void`, body, runJsonSchema),
    onSuccess: changed,
  });
}

export interface ImportRequest {
  readonly csv: string;
  readonly fileName: string;
  readonly decimal: 'auto' | 'point' | 'comma';
  readonly accept: boolean;
}

/** Reads a CSV; with `accept` and without problems it is recorded. */
export function useImportRuns(studyId: number) {
  const changed = useRunsChanged();
  return useMutation({
    mutationFn: (input: ImportRequest) =>
      api.post(`/studies/${studyId}/runs/import`, input, importAnswerSchema),
    onSuccess: (answer) => (answer.accepted ? changed() : undefined),
  });
}
