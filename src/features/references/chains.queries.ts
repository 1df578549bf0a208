import { queryOptions } from '@tanstack/react-query';
import { referenceRevisionPage } from '../../../shared/schemas/references.ts';
import { apiGetAll } from '../../lib/api.ts';

/** Every revision of the reference results of a library, of all its suites and platforms. */
export const referenceChainsQuery = (library: string) =>
  queryOptions({
    queryKey: ['references', library, 'all'] as const,
    queryFn: ({ signal }) =>
      apiGetAll(referenceRevisionPage, `/libraries/${encodeURIComponent(library)}/references`, {}, signal),
  });
