import { queryOptions } from '@tanstack/react-query';
import { allowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import { libraryPage, libraryView, solverList } from '../../../shared/schemas/libraries.ts';
import { apiGet, apiGetAll } from '../../lib/api.ts';

const of = (slug: string): string => `/libraries/${encodeURIComponent(slug)}`;

export const libraryKeys = {
  all: ['libraries'] as const,
  one: (slug: string) => ['libraries', slug] as const,
};

export const librariesQuery = queryOptions({
  queryKey: [...libraryKeys.all, 'list'],
  queryFn: ({ signal }) => apiGetAll(libraryPage, '/libraries', {}, signal),
});

export const libraryQuery = (slug: string) =>
  queryOptions({
    queryKey: libraryKeys.one(slug),
    queryFn: ({ signal }) => apiGet(libraryView, of(slug), signal),
  });

export const solversQuery = (slug: string) =>
  queryOptions({
    queryKey: [...libraryKeys.one(slug), 'solvers'],
    queryFn: async ({ signal }) => (await apiGet(solverList, `${of(slug)}/solvers`, signal)).items,
  });

export const allowancesQuery = (slug: string) =>
  queryOptions({
    queryKey: [...libraryKeys.one(slug), 'allowances'],
    queryFn: ({ signal }) => apiGet(allowanceRevisionView, `${of(slug)}/allowances`, signal),
  });
