import { queryOptions } from '@tanstack/react-query';
import { buildPage, buildView } from '../../../shared/schemas/builds.ts';
import { apiGet, apiGetAll } from '../../lib/api.ts';

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
