import { type QueryClient, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import {
  demoPeopleList,
  meView,
  type SignUpBody,
  type setUpBody,
  setUpView,
  type signInBody,
} from '../../../shared/schemas/people.ts';
import { aboutView } from '../../../shared/schemas/site.ts';
import { apiDo, apiGet, apiSend } from '../../lib/api.ts';
import { paths } from '../../paths.ts';

export const sessionKeys = { all: ['session'] as const, me: ['session', 'me'] as const };

/** Who is signed in, with the roles; `person` is null where nobody is. */
export const meQuery = queryOptions({
  queryKey: sessionKeys.me,
  queryFn: ({ signal }) => apiGet(meView, '/me', signal),
  staleTime: 60_000,
});

export const aboutQuery = queryOptions({
  queryKey: [...sessionKeys.all, 'about'],
  queryFn: ({ signal }) => apiGet(aboutView, '/about', signal),
  staleTime: 300_000,
});

export const setUpQuery = queryOptions({
  queryKey: [...sessionKeys.all, 'set-up'],
  queryFn: ({ signal }) => apiGet(setUpView, '/setup', signal),
});

export const demoPeopleQuery = queryOptions({
  queryKey: [...sessionKeys.all, 'demo-people'],
  queryFn: async ({ signal }) => (await apiGet(demoPeopleList, '/demo/people', signal)).items,
  // While the demo is being put in place there are none yet.
  refetchInterval: ({ state }) => (state.data?.length === 0 ? 2000 : false),
});

/** What one person has read is nobody else's. */
function forgetWhatWasRead(client: QueryClient): void {
  client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== sessionKeys.all[0] });
  client.removeQueries({ queryKey: aboutQuery.queryKey, type: 'inactive' });
}

/** The session is over, as the server says or the person wished. */
export function forgetPerson(client: QueryClient): void {
  client.setQueryData(meQuery.queryKey, { person: null });
  forgetWhatWasRead(client);
}

/** Something that ends with somebody being signed in; then it is asked who that is. */
function useEntering<Body, Result>(enter: (body: Body) => Promise<Result>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (body: Body) => {
      const result = await enter(body);
      const me = await apiGet(meView, '/me');
      forgetWhatWasRead(client);
      client.setQueryData(meQuery.queryKey, me);
      return result;
    },
  });
}

const entered = z.strictObject({ isSignedIn: z.boolean() });

export const useSignIn = () =>
  useEntering((body: z.output<typeof signInBody>) => apiDo('POST', '/auth/sign-in/email', body));

export const useDemoSignIn = () =>
  useEntering((person: string) => apiDo('POST', '/demo/sign-in', { person }));

export const useSetUp = () =>
  useEntering((body: z.output<typeof setUpBody>) => apiSend('POST', entered, '/setup', body));

/** With an invitation one is signed in at once; without, a mail has to prove the address. */
export const useSignUp = () =>
  useEntering((body: SignUpBody) => apiSend('POST', entered, '/auth/sign-up/email', body));

export function useSignOut(afterwards: (client: QueryClient) => void = forgetPerson) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => apiDo('POST', '/auth/sign-out'),
    onSuccess: () => afterwards(client),
  });
}

/** Leaves by loading the door anew: nothing that was read stays in the browser, and whoever comes next starts afresh. */
export function leaveByTheDoor(): void {
  window.location.assign(paths.signIn());
}

/** Reads again who is signed in: a role or a name may be another one. */
export function useReadMeAgain(): () => Promise<void> {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: sessionKeys.me });
}

export const useAskForReset = () =>
  useMutation({ mutationFn: (email: string) => apiDo('POST', '/auth/request-password-reset', { email }) });

export const useResetPassword = () =>
  useMutation({
    mutationFn: (body: { token: string; password: string }) => apiDo('POST', '/auth/reset-password', body),
  });

export const useConfirmAddress = () =>
  useMutation({ mutationFn: (token: string) => apiDo('POST', '/auth/verify-email', { token }) });

export const useAskForConfirmation = () =>
  useMutation({ mutationFn: (email: string) => apiDo('POST', '/auth/send-verification-email', { email }) });
