import { queryOptions } from '@tanstack/react-query';
import { comparisonView, pairPage } from '../../../shared/schemas/comparisons.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { apiGet, apiGetAll, toQuery } from '../../lib/api.ts';

/** What a candidate is compared with, as the addresses have it: `run:12` or `reference:3`. */
export function readBase(text: string): RunBase | null {
  const match = /^(run|reference):([1-9]\d*)$/.exec(text);
  if (match === null) return null;
  const id = Number(match[2]);
  return match[1] === 'run' ? { kind: 'run', run: id } : { kind: 'reference', revision: id };
}

export function writeBase(base: RunBase): string {
  return base.kind === 'run' ? `run:${base.run}` : `reference:${base.revision}`;
}

function sides(candidate: number, base: RunBase) {
  return base.kind === 'run' ? { candidate, reference: base.run } : { candidate, revision: base.revision };
}

export const comparisonKeys = { all: ['comparisons'] as const };

export const comparisonQuery = (candidate: number, base: RunBase) =>
  queryOptions({
    queryKey: [...comparisonKeys.all, candidate, writeBase(base)],
    queryFn: ({ signal }) => apiGet(comparisonView, `/comparisons${toQuery(sides(candidate, base))}`, signal),
  });

/** Every pair, in the suite's order: filters and folding happen in the browser. */
export const pairsQuery = (candidate: number, base: RunBase) =>
  queryOptions({
    queryKey: [...comparisonKeys.all, candidate, writeBase(base), 'pairs'],
    queryFn: ({ signal }) =>
      apiGetAll(pairPage, '/comparisons/pairs', { ...sides(candidate, base), sort: 'suite' }, signal),
  });
