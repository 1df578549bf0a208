import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  referenceRevisionPage,
  referenceRevisionView,
  type SetReferenceBody,
} from '../../../shared/schemas/references.ts';
import { apiGet, apiSend, toQuery } from '../../lib/api.ts';

export const referenceKeys = { all: ['references'] as const };

export interface ReferenceChain {
  library: string;
  suite: string;
  platform: string;
}

/** The newest revision of a chain, or an empty page where nothing has been agreed on yet. */
export const newestReferenceQuery = ({ library, suite, platform }: ReferenceChain) =>
  queryOptions({
    queryKey: [...referenceKeys.all, library, suite, platform],
    queryFn: ({ signal }) =>
      apiGet(
        referenceRevisionPage,
        `/libraries/${encodeURIComponent(library)}/references${toQuery({ suite, platform, limit: 1 })}`,
        signal,
      ),
  });

export function useSetReference(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SetReferenceBody) =>
      apiSend('POST', referenceRevisionView, `/libraries/${encodeURIComponent(library)}/references`, body),
    onSuccess: () => client.invalidateQueries({ queryKey: referenceKeys.all }),
  });
}
