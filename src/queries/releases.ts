import {
  candidateJsonSchema,
  releaseJsonSchema,
  type candidateInputSchema,
  type releaseInputSchema,
} from '@shared/schemas/release';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { api } from '@/lib/api';

export const releaseQueries = {
  candidates: (studyId: number) =>
    queryOptions({
      queryKey: ['studies', studyId, 'candidates'],
      queryFn: ({ signal }) =>
        api.get(`/studies/${studyId}/candidates`, z.array(candidateJsonSchema), signal),
    }),
  ofStudy: (studyId: number) =>
    queryOptions({
      queryKey: ['studies', studyId, 'releases'],
      queryFn: ({ signal }) =>
        api.get(`/studies/${studyId}/releases`, z.array(releaseJsonSchema), signal),
    }),
};

function useReleasesChanged() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: ['studies'] });
}

export function useTakeCandidate(studyId: number) {
  const onSuccess = useReleasesChanged();
  return useMutation({
    mutationFn: ({ key, ...body }: z.input<typeof candidateInputSchema> & { key: string }) =>
      api.create(`/studies/${studyId}/candidates`, body, candidateJsonSchema, key),
    onSuccess,
  });
}

export function useSignRelease(studyId: number) {
  const onSuccess = useReleasesChanged();
  return useMutation({
    mutationFn: ({ key, ...body }: z.input<typeof releaseInputSchema> & { key: string }) =>
      api.create(`/studies/${studyId}/releases`, body, releaseJsonSchema, key),
    onSuccess,
  });
}
