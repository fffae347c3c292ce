import { invitationSubjectSchema, sessionJsonSchema, type UserJson } from '@shared/schemas/account';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { api, keepAccessToken, refreshSession } from '@/lib/api';

/** Who is signed in; null: nobody. Asked once when the page opens, from the refresh cookie. */
export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: refreshSession,
  staleTime: Infinity,
  gcTime: Infinity,
  retry: 1,
});

export function useSession(): UserJson | null {
  return useQuery(sessionQuery).data ?? null;
}

/** The signed-in person, on pages that are only shown to one. */
export function useUser(): UserJson {
  const user = useSession();
  if (!user) throw new Error('A page for signed-in people was shown to nobody.');
  return user;
}

function useOpened() {
  const client = useQueryClient();
  return (session: z.output<typeof sessionJsonSchema>) => {
    // nothing of the person before may show
    client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== 'session' });
    keepAccessToken(session.accessToken);
    client.setQueryData(sessionQuery.queryKey, session.user);
  };
}

export function useSignIn() {
  const onSuccess = useOpened();
  return useMutation({
    mutationFn: (body: { email: string; password: string }) =>
      api.post('/auth/sign-in', body, sessionJsonSchema),
    onSuccess,
  });
}

export function useAcceptInvitation() {
  const onSuccess = useOpened();
  return useMutation({
    mutationFn: (body: { token: string; password: string }) =>
      api.post('/auth/accept-invitation', body, sessionJsonSchema),
    onSuccess,
  });
}

export const invitationQuery = (token: string) =>
  queryOptions({
    queryKey: ['invitation', token],
    queryFn: () => api.post('/auth/invitation', { token }, invitationSubjectSchema),
    retry: false,
  });

export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (everywhere: boolean) => api.post('/auth/sign-out', { everywhere }, z.object({})),
    onSettled: () => {
      keepAccessToken(null);
      client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== 'session' });
      client.setQueryData(sessionQuery.queryKey, null);
    },
  });
}
