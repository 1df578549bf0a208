import { infiniteQueryOptions } from '@tanstack/react-query';
import { auditPage } from '../../../shared/schemas/audit.ts';
import { apiGet, apiGetAll, toQuery } from '../../lib/api.ts';

/** Who did what, newest first; of one library, or of everything. */
export const auditQuery = (library: string | undefined) =>
  infiniteQueryOptions({
    queryKey: ['audit', library ?? null] as const,
    queryFn: ({ pageParam, signal }) =>
      apiGet(auditPage, `/audit-log${toQuery({ limit: 100, library, cursor: pageParam })}`, signal),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
  });

/** All of it, for a file. */
export const readWholeAudit = (library: string | undefined) =>
  apiGetAll(auditPage, '/audit-log', library === undefined ? {} : { library });
