import { queryOptions } from '@tanstack/react-query';
import { kitList } from '../../../shared/schemas/kits.ts';
import { apiGet } from '../../lib/api.ts';

/** The adapter kits of this server. They change with its version alone. */
export const kitsQuery = queryOptions({
  queryKey: ['kits'],
  queryFn: ({ signal }) => apiGet(kitList, '/kits', signal),
  staleTime: Number.POSITIVE_INFINITY,
});

export const kitHref = (name: string): string => `/api/kits/${encodeURIComponent(name)}.tar.gz`;
