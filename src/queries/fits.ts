import { fitJsonSchema, type FitInput } from '@shared/schemas/fit';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { api } from '@/lib/api';

export const fitQueries = {
  ofStudy: (studyId: number) =>
    queryOptions({
      queryKey: ['studies', studyId, 'fits'],
      queryFn: ({ signal }) => api.get(`/studies/${studyId}/fits`, z.array(fitJsonSchema), signal),
    }),
};

export function useKeepFit(studyId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ key, ...body }: FitInput & { key: string }) =>
      api.create(`/studies/${studyId}/fits`, body, fitJsonSchema, key),
    onSuccess: () => client.invalidateQueries({ queryKey: ['studies'] }),
  });
}
