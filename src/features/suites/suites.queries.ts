import { queryOptions } from '@tanstack/react-query';
import {
  suitePage,
  suiteRevisionPage,
  suiteRevisionView,
  suiteView,
} from '../../../shared/schemas/suites.ts';
import { apiGet, apiGetAll } from '../../lib/api.ts';

const of = (slug: string): string => `/suites/${encodeURIComponent(slug)}`;

export const suiteKeys = {
  all: ['suites'] as const,
  one: (slug: string) => ['suites', slug] as const,
};

export const suitesQuery = queryOptions({
  queryKey: [...suiteKeys.all, 'list'],
  queryFn: ({ signal }) => apiGetAll(suitePage, '/suites', {}, signal),
});

export const suiteQuery = (slug: string) =>
  queryOptions({
    queryKey: suiteKeys.one(slug),
    queryFn: ({ signal }) => apiGet(suiteView, of(slug), signal),
  });

export const suiteRevisionsQuery = (slug: string) =>
  queryOptions({
    queryKey: [...suiteKeys.one(slug), 'revisions'],
    queryFn: ({ signal }) => apiGetAll(suiteRevisionPage, `${of(slug)}/revisions`, {}, signal),
  });

/** A revision with its cases. It never changes, so it is never read twice. */
export const suiteRevisionQuery = (slug: string, revision: number) =>
  queryOptions({
    queryKey: [...suiteKeys.one(slug), 'revisions', revision],
    queryFn: ({ signal }) => apiGet(suiteRevisionView, `${of(slug)}/revisions/${revision}`, signal),
    staleTime: Number.POSITIVE_INFINITY,
  });
