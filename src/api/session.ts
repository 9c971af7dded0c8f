/** Who one is: session, sign-in, registration, passwords. */
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { sessionSchema } from '../../shared/contracts/people.ts';
import type { Registration, Session, SignIn } from '../../shared/contracts/people.ts';
import { keys } from './queryClient.ts';
import { command, rememberCsrfToken, request } from './request.ts';

function keepToken(session: Session): Session {
  rememberCsrfToken(session.csrfToken);
  return session;
}

export const sessionQuery = queryOptions({
  queryKey: keys.session,
  queryFn: async ({ signal }) =>
    keepToken(await request(sessionSchema, '/api/session', { signal })),
  staleTime: 60_000,
});

/** The session; `person` is null for a visitor. */
export function useSession() {
  return useQuery(sessionQuery);
}

export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (body: SignIn) =>
      keepToken(await request(sessionSchema, '/api/session', { method: 'POST', body })),
    onSuccess: (session) => {
      client.clear();
      client.setQueryData(keys.session, session);
    },
  });
}

/** Ends the session and forgets everything that was read in it. */
export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => command('/api/session', { method: 'DELETE' }),
    onSuccess: async () => {
      client.clear();
      await client.fetchQuery(sessionQuery);
    },
  });
}

export function useRegister() {
  return useMutation({
    mutationFn: (body: Registration) => command('/api/registrations', { method: 'POST', body }),
  });
}

export function useConfirmEmail() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (token: string) =>
      command('/api/email-confirmations', { method: 'POST', body: { token } }),
    onSuccess: () => client.invalidateQueries({ queryKey: keys.session }),
  });
}

export function useRequestPasswordReset() {
  return useMutation({
    mutationFn: (email: string) =>
      command('/api/password-resets', { method: 'POST', body: { email } }),
  });
}

export function useResetPassword(token: string) {
  return useMutation({
    mutationFn: (password: string) =>
      command(`/api/password-resets/${encodeURIComponent(token)}`, {
        method: 'PUT',
        body: { password },
      }),
  });
}
