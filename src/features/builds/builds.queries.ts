import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { buildPage, buildView, type RegisterBuildBody } from '../../../shared/schemas/builds.ts';
import { apiGet, apiGetAll, apiSend } from '../../lib/api.ts';

export const buildKeys = {
  all: ['builds'] as const,
  ofLibrary: (library: string) => ['builds', 'library', library] as const,
};

/** Builds of a library, newest first as the server gives them. */
export const buildsQuery = (library: string) =>
  queryOptions({
    queryKey: buildKeys.ofLibrary(library),
    queryFn: ({ signal }) =>
      apiGetAll(buildPage, `/libraries/${encodeURIComponent(library)}/builds`, {}, signal),
  });

export const buildQuery = (id: number) =>
  queryOptions({
    queryKey: [...buildKeys.all, id],
    queryFn: ({ signal }) => apiGet(buildView, `/builds/${id}`, signal),
  });

export function useRegisterBuild(library: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: RegisterBuildBody) =>
      apiSend('POST', buildView, `/libraries/${encodeURIComponent(library)}/builds`, body),
    onSuccess: () => client.invalidateQueries({ queryKey: buildKeys.all }),
  });
}
