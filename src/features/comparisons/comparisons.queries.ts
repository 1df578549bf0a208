import { queryOptions } from '@tanstack/react-query';
import { codeDiffView } from '../../../shared/schemas/code-diff.ts';
import { comparisonView, type ExportFormat, pairPage } from '../../../shared/schemas/comparisons.ts';
import { profileView } from '../../../shared/schemas/profiles.ts';
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

/** What changed in the source between the builds of the two sides. */
export const codeDiffQuery = (candidate: number, base: RunBase) =>
  queryOptions({
    queryKey: [...comparisonKeys.all, candidate, writeBase(base), 'code'],
    queryFn: ({ signal }) =>
      apiGet(codeDiffView, `/comparisons/code-diff${toQuery(sides(candidate, base))}`, signal),
    staleTime: 300_000,
  });

/** Performance profiles of the two sides; an empty solver means all together. */
export const profileQuery = (candidate: number, base: RunBase, solver: string) =>
  queryOptions({
    queryKey: [...comparisonKeys.all, candidate, writeBase(base), 'profile', solver],
    queryFn: ({ signal }) =>
      apiGet(profileView, `/comparisons/profile${toQuery({ ...sides(candidate, base), solver })}`, signal),
  });

/** Address of the comparison as a file. */
export function exportHref(candidate: number, base: RunBase, format: ExportFormat): string {
  return `/api/comparisons/export${toQuery({ ...sides(candidate, base), format })}`;
}
