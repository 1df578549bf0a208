import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { type MakeTokenBody, madeTokenView, tokenList } from '../../../shared/schemas/tokens.ts';
import { apiDo, apiGet, apiSend } from '../../lib/api.ts';

const of = (library: string): string => `/libraries/${encodeURIComponent(library)}/tokens`;

export const tokenKeys = { ofLibrary: (library: string) => ['tokens', library] as const };

export const tokensQuery = (library: string) =>
  queryOptions({
    queryKey: tokenKeys.ofLibrary(library),
    queryFn: async ({ signal }) => (await apiGet(tokenList, of(library), signal)).items,
  });

/** The answer holds the token itself, the only time that it is shown. */
export function useMakeToken(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: MakeTokenBody) => apiSend('POST', madeTokenView, of(library), body),
    onSuccess: () => client.invalidateQueries({ queryKey: tokenKeys.ofLibrary(library) }),
    // What it answers is a secret: it is not kept once the page is left.
    gcTime: 0,
  });
}

export function useRevokeToken(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: number) => apiDo('DELETE', `${of(library)}/${id}`),
    onSuccess: () => client.invalidateQueries({ queryKey: tokenKeys.ofLibrary(library) }),
  });
}
