import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  type ChangePersonBody,
  peoplePage,
  personView,
  sessionList,
} from '../../../shared/schemas/people.ts';
import { type OutboxQuery, outboxMailView, outboxPage } from '../../../shared/schemas/site.ts';
import { apiDo, apiGet, apiSend, toQuery } from '../../lib/api.ts';

export const peopleKeys = {
  all: ['people'] as const,
  outbox: ['outbox'] as const,
  // Under the session, whose end takes them along.
  sessions: ['session', 'places'] as const,
};

export const peopleQuery = (text: string) =>
  infiniteQueryOptions({
    queryKey: [...peopleKeys.all, text],
    queryFn: ({ pageParam, signal }) =>
      apiGet(peoplePage, `/people${toQuery({ limit: 100, text, cursor: pageParam })}`, signal),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
  });

export function useChangePerson() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, ...body }: ChangePersonBody & { id: string }) =>
      apiSend('PATCH', personView, `/people/${encodeURIComponent(id)}`, body),
    onSettled: () => client.invalidateQueries({ queryKey: peopleKeys.all }),
  });
}

export const outboxQuery = (state: OutboxQuery['state']) =>
  infiniteQueryOptions({
    queryKey: [...peopleKeys.outbox, state ?? null],
    queryFn: ({ pageParam, signal }) =>
      apiGet(outboxPage, `/site/outbox${toQuery({ limit: 100, state, cursor: pageParam })}`, signal),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
  });

export function useRetryMail() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: number) => apiSend('POST', outboxMailView, `/site/outbox/${id}/retry`),
    onSettled: () => client.invalidateQueries({ queryKey: peopleKeys.outbox }),
  });
}

/** Where one is signed in. */
export const placesQuery = queryOptions({
  queryKey: peopleKeys.sessions,
  queryFn: async ({ signal }) => (await apiGet(sessionList, '/account/sessions', signal)).items,
});

export function useEndSession() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) => apiDo('DELETE', `/account/sessions/${encodeURIComponent(id)}`),
    onSettled: () => client.invalidateQueries({ queryKey: peopleKeys.sessions }),
  });
}

export const useSignOutEverywhere = () =>
  useMutation({ mutationFn: () => apiDo('POST', '/account/sign-out-everywhere') });

export const useRename = () =>
  useMutation({ mutationFn: (name: string) => apiDo('PATCH', '/account', { name }) });

export function useChangePassword() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { current: string; next: string }) => apiDo('POST', '/account/password', body),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleKeys.sessions }),
  });
}
