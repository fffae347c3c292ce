import {
  customerSampleSchema,
  sampleDetailSchema,
  sampleJsonSchema,
  type SampleInput,
} from '@shared/schemas/sample';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { api } from '@/lib/api';

export const sampleQueries = {
  all: () =>
    queryOptions({
      queryKey: ['samples'],
      queryFn: ({ signal }) => api.get('/samples', z.array(sampleJsonSchema), signal),
    }),
  one: (sampleId: number) =>
    queryOptions({
      queryKey: ['samples', sampleId],
      queryFn: ({ signal }) => api.get(`/samples/${sampleId}`, sampleDetailSchema, signal),
    }),
  mine: () =>
    queryOptions({
      queryKey: ['my-samples'],
      queryFn: ({ signal }) => api.get('/my-samples', z.array(customerSampleSchema), signal),
    }),
};

export function useRegisterSample() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ body, key }: { body: SampleInput; key: string }) =>
      api.create('/samples', body, sampleDetailSchema, key),
    onSuccess: () => client.invalidateQueries({ queryKey: ['samples'] }),
  });
}

export interface StockEntryInput {
  readonly kind: 'received' | 'lost' | 'returned';
  readonly massG: number;
  readonly note: string;
}

export function useEnterStock(sampleId: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ body, key }: { body: StockEntryInput; key: string }) =>
      api.create(`/samples/${sampleId}/stock`, body, sampleDetailSchema, key),
    onSuccess: () => client.invalidateQueries({ queryKey: ['samples'] }),
  });
}
