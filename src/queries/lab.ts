import {
  customerJsonSchema,
  invitationJsonSchema,
  labJsonSchema,
  personJsonSchema,
  type PersonInput,
  type Role,
} from '@shared/schemas/account';
import { rigJsonSchema, sieveStackJsonSchema, type EnvelopeJson } from '@shared/schemas/rig';
import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { api } from '@/lib/api';

export const labQueries = {
  rigs: () =>
    queryOptions({
      queryKey: ['rigs'],
      queryFn: ({ signal }) => api.get('/rigs', z.array(rigJsonSchema), signal),
    }),
  sieveStacks: () =>
    queryOptions({
      queryKey: ['sieve-stacks'],
      queryFn: ({ signal }) => api.get('/sieve-stacks', z.array(sieveStackJsonSchema), signal),
    }),
  customers: () =>
    queryOptions({
      queryKey: ['customers'],
      queryFn: ({ signal }) => api.get('/customers', z.array(customerJsonSchema), signal),
    }),
  people: () =>
    queryOptions({
      queryKey: ['people'],
      queryFn: ({ signal }) => api.get('/people', z.array(personJsonSchema), signal),
    }),
  lab: () =>
    queryOptions({
      queryKey: ['lab'],
      queryFn: ({ signal }) => api.get('/lab', labJsonSchema, signal),
    }),
};

/** A mutation after which the named lists are read anew. */
function useLabMutation<Input, Answer>(
  mutationFn: (input: Input) => Promise<Answer>,
  ...lists: string[]
) {
  const client = useQueryClient();
  return useMutation({
    mutationFn,
    onSuccess: () =>
      Promise.all(lists.map((list) => client.invalidateQueries({ queryKey: [list] }))),
  });
}

export const useRegisterCustomer = () =>
  useLabMutation(
    ({ name, key }: { name: string; key: string }) =>
      api.create('/customers', { name }, customerJsonSchema, key),
    'customers',
  );

export const useInvitePerson = () =>
  useLabMutation(
    ({ body, key }: { body: PersonInput; key: string }) =>
      api.create('/people', body, invitationJsonSchema, key),
    'people',
  );

export const useInviteAgain = () =>
  useLabMutation(
    (personId: number) => api.post(`/people/${personId}/invitation`, {}, invitationJsonSchema),
    'people',
  );

export const useChangePerson = () =>
  useLabMutation(
    ({ id, ...body }: { id: number; roles: Role[]; isActive: boolean; version: number }) =>
      api.put(`/people/${id}`, body, personJsonSchema),
    'people',
  );

export const useChangeLab = () =>
  useLabMutation(
    (body: { twoPersonRule: boolean; version: number }) => api.put('/lab', body, labJsonSchema),
    'lab',
  );

export const useReviseEnvelope = (rigId: number) =>
  useLabMutation(
    ({ key, ...body }: { envelope: EnvelopeJson; why: string; revision: number; key: string }) =>
      api.create(`/rigs/${rigId}/envelopes`, body, rigJsonSchema, key),
    'rigs',
  );
