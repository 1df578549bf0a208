import type { ReferenceEntryView, ReferenceRevisionView } from '../../../shared/schemas/references.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import { toIso } from '../present-time.ts';
import type { SolveRow } from '../runs/solves.repo.ts';
import type { EntryRow, NamedReference } from './references.repo.ts';

export function presentReference({ revision, chain, library, suite }: NamedReference): ReferenceRevisionView {
  const { id, number, parentId, runId, reason, changed, createdAt, createdBy } = revision;
  return {
    id,
    library,
    suite,
    platform: chain.platform,
    number,
    parent: parentId,
    run: runId,
    reason,
    createdAt: toIso(createdAt),
    createdBy,
    changed,
  };
}

export function presentEntry(
  row: EntryRow,
  presentSolve: (row: SolveRow, runId: number) => SolveView,
): ReferenceEntryView {
  const [solver, caseName, start, since, run, reason, decidedBy, decidedAt, ...rest] = row;
  const solveRow: SolveRow = rest;
  return {
    solver,
    case: caseName,
    start: start < 0 ? null : start,
    solve: presentSolve(solveRow, run),
    run,
    since,
    reason,
    decidedBy,
    decidedAt: toIso(decidedAt),
  };
}
