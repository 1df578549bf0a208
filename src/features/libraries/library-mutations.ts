import { useMutation, useQueryClient } from '@tanstack/react-query';
import {
  type ChangeLibraryBody,
  type CreateLibraryBody,
  libraryView,
} from '../../../shared/schemas/libraries.ts';
import { apiSend } from '../../lib/api.ts';
import { libraryKeys } from './libraries.queries.ts';

export function useCreateLibrary() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: CreateLibraryBody) => apiSend('POST', libraryView, '/libraries', body),
    onSuccess: () => client.invalidateQueries({ queryKey: libraryKeys.all }),
  });
}

export function useChangeLibrary(slug: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: ChangeLibraryBody) =>
      apiSend('PATCH', libraryView, `/libraries/${encodeURIComponent(slug)}`, body),
    onSuccess: (library) => {
      client.setQueryData(libraryKeys.one(slug), library);
      return client.invalidateQueries({ queryKey: libraryKeys.all });
    },
  });
}
