import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  allowanceRevisionPage,
  allowanceRevisionView,
  type SetAllowancesBody,
} from '../../../shared/schemas/allowance-revisions.ts';
import { apiGetAll, apiSend } from '../../lib/api.ts';

const of = (library: string): string => `/libraries/${encodeURIComponent(library)}/allowances`;

/** All allowances that a library ever set, newest first. */
export const allowanceRevisionsQuery = (library: string) =>
  queryOptions({
    queryKey: ['allowances', library, 'revisions'] as const,
    queryFn: ({ signal }) => apiGetAll(allowanceRevisionPage, `${of(library)}/revisions`, {}, signal),
  });

export function useSetAllowances(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SetAllowancesBody) => apiSend('PUT', allowanceRevisionView, of(library), body),
    // Every verdict rests on them.
    onSuccess: () => client.invalidateQueries(),
  });
}
