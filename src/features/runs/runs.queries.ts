import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { AppError } from '../../../shared/errors.ts';
import {
  type RunsQuery,
  runDetail,
  runPage,
  runView,
  type StartRunBody,
  solveDetail,
  solvePage,
} from '../../../shared/schemas/runs.ts';
import { type StripEvent, solveStripList } from '../../../shared/schemas/strips.ts';
import { apiGet, apiGetAll, apiSend } from '../../lib/api.ts';
import { createBatch } from '../../lib/batch.ts';

export const runKeys = {
  all: ['runs'] as const,
  one: (id: number) => ['runs', id] as const,
};

export type RunFilter = Pick<RunsQuery, 'library' | 'build' | 'suite' | 'status'>;

/** Runs, newest first as the server gives them. */
export const runsQuery = (filter: RunFilter) =>
  queryOptions({
    queryKey: [...runKeys.all, 'list', filter],
    queryFn: ({ signal }) => apiGetAll(runPage, '/runs', filter, signal),
  });

export const runQuery = (id: number) =>
  queryOptions({
    queryKey: runKeys.one(id),
    queryFn: ({ signal }) => apiGet(runDetail, `/runs/${id}`, signal),
  });

/** Every solve of a run: the table of a run is narrowed and sorted in the browser. */
export const solvesQuery = (run: number) =>
  queryOptions({
    queryKey: [...runKeys.one(run), 'solves'],
    queryFn: ({ signal }) => apiGetAll(solvePage, `/runs/${run}/solves`, {}, signal),
  });

export function useStartRun() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: StartRunBody) => apiSend('POST', runView, '/runs', body),
    onSuccess: () => client.invalidateQueries({ queryKey: runKeys.all }),
  });
}

export function useCancelRun(id: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => apiSend('POST', runView, `/runs/${id}/cancel`),
    onSuccess: () => client.invalidateQueries({ queryKey: runKeys.one(id) }),
  });
}

/** A solve with its path. It never changes once it is stored. */
export const solveQuery = (id: number) =>
  queryOptions({
    queryKey: ['solves', id] as const,
    queryFn: ({ signal }) => apiGet(solveDetail, `/solves/${id}`, signal),
    staleTime: Number.POSITIVE_INFINITY,
  });

/** Tables ask for hundreds of strips at once; they are read together, as many as an address holds. */
const readStrip = createBatch<{ events: StripEvent[] | null }>(
  {
    most: 200,
    waitMs: 15,
    async load(ids) {
      const { items } = await apiGet(solveStripList, `/strips?solves=${ids.join(',')}`);
      return new Map(items.map(({ solve, events }) => [solve, { events }]));
    },
  },
  () => new AppError('not_found', 'This solve is no longer there.'),
);

/** The digit strip of a solve. It never changes once it is stored. */
export const stripQuery = (solve: number) =>
  queryOptions({
    queryKey: ['strips', solve] as const,
    queryFn: () => readStrip(solve),
    staleTime: Number.POSITIVE_INFINITY,
  });

export function useRunAgain(id: number) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => apiSend('POST', runView, `/runs/${id}/again`),
    onSuccess: () => client.invalidateQueries({ queryKey: runKeys.all }),
  });
}
