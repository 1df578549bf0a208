import type { ComparableCase, ComparableRun } from '../../../shared/comparison/comparison.ts';
import type { ComparisonView } from '../../../shared/schemas/comparisons.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';
import type { ReferencesService } from '../references/references.service.ts';
import type { RunKeys, RunSolves } from '../runs/run-solves.ts';
import { presentSolve } from '../runs/runs.present.ts';
import type { RunRow } from '../runs/runs.repo.ts';
import { isFinal, type RunsService } from '../runs/runs.service.ts';

/** One side of a comparison, with what the page says about it. */
export interface Side {
  run: ComparableRun & { solves: SolveView[] };
  view: ComparisonView['candidate'];
  libraryId: number;
  suiteId: number;
  /** False while results can still come in. */
  isSettled: boolean;
}

export interface SideDeps {
  runs: RunsService;
  runSolves: RunSolves;
  references: ReferencesService;
}

/** A run whose environment is not known has not begun, and has no results whose arithmetic matters. */
const notBegun = 'not begun';

export function loadRunSide(deps: SideDeps, id: number): Side {
  const row = deps.runs.requireRun(id);
  const { build, status } = deps.runs.get(id);
  const keys = deps.runSolves.keysOf(row);
  const solves = deps.runSolves.readAll(row, keys);
  const label = `${build.label}, run ${id}`;
  return {
    run: {
      solves,
      solvers: keys.solvers.map((solver) => solver.declaration),
      cases: keys.cases.map((item) => item.case),
      fingerprint: row.environment?.fingerprint ?? notBegun,
      label,
    },
    view: { label, run: id, revision: null, build, status, solves: solves.length },
    libraryId: row.libraryId,
    suiteId: row.suiteId,
    isSettled: isFinal({ status }),
  };
}

/**
 * The reference results as of a revision, put together from the runs that their entries come from. Of each
 * solver and each case the newest entry says how it was declared and what it was; an entry that was made
 * with the case as it was before says nothing about the case as it is, and is left out.
 */
export function loadReferenceSide(deps: SideDeps, id: number): Side {
  const { chain, revision, rows } = deps.references.readRows(id);
  const known = new Map<number, { run: RunRow; keys: RunKeys; cases: Map<string, ComparableCase> }>();
  const sourceOf = (runId: number) => {
    let source = known.get(runId);
    if (!source) {
      const run = deps.runs.requireRun(runId);
      const keys = deps.runSolves.keysOf(run);
      source = { run, keys, cases: new Map(keys.cases.map((item) => [item.case.id, item.case])) };
      known.set(runId, source);
    }
    return source;
  };

  const solvers = new Map<string, { since: number; declaration: SolverDeclaration }>();
  const cases = new Map<string, { since: number; case: ComparableCase }>();
  for (const [solver, name, , since, runId] of rows) {
    const source = sourceOf(runId);
    const position = source.keys.positionOf.get(solver);
    const declaration = position === undefined ? undefined : source.keys.solvers[position]?.declaration;
    if (declaration && since > (solvers.get(solver)?.since ?? 0)) solvers.set(solver, { since, declaration });
    const found = source.cases.get(name);
    if (found && since > (cases.get(name)?.since ?? 0)) cases.set(name, { since, case: found });
  }
  const solves: SolveView[] = [];
  const fingerprints = new Set<string>();
  for (const [, name, , , runId, , , , ...solveRow] of rows) {
    const source = sourceOf(runId);
    if (source.cases.get(name)?.hash !== cases.get(name)?.case.hash) continue;
    solves.push(presentSolve(solveRow, source.keys.names));
    fingerprints.add(source.run.environment?.fingerprint ?? notBegun);
  }
  const label = `reference ${revision.number}`;
  return {
    run: {
      solves,
      solvers: [...solvers.values()].map((entry) => entry.declaration),
      cases: [...cases.values()].map((entry) => entry.case),
      // Entries from different arithmetic are in one with nobody.
      fingerprint: [...fingerprints].sort().join('+'),
      label,
    },
    view: { label, run: revision.runId, revision: id, build: null, status: null, solves: solves.length },
    libraryId: chain.libraryId,
    suiteId: chain.suiteId,
    isSettled: true,
  };
}
