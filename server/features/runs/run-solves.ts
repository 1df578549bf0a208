import type { SolveView } from '../../../shared/schemas/runs.ts';
import type { CaseRow } from '../suites/suites.repo.ts';
import type { SuitesService } from '../suites/suites.service.ts';
import { presentSolve, type SolveNames } from './runs.present.ts';
import type { RunRow, RunSolverRow, RunsRepo } from './runs.repo.ts';
import type { SolveRow, SolvesRepo } from './solves.repo.ts';

/** A run's solvers and cases both ways: from key to name and from name to key. */
export interface RunKeys {
  solvers: RunSolverRow[];
  cases: CaseRow[];
  names: SolveNames;
  positionOf: ReadonlyMap<string, number>;
  caseIdOf: ReadonlyMap<string, number>;
}

/** Reads solves with the names that stand behind their keys. */
export function createRunSolves(deps: { runs: RunsRepo; solves: SolvesRepo; suites: SuitesService }) {
  function keysOf(run: RunRow): RunKeys {
    const solvers = deps.runs.readSolvers(run.id);
    const cases = deps.suites.casesOf(run.revisionId);
    return {
      solvers,
      cases,
      names: {
        solvers: new Map(solvers.map((solver) => [solver.position, solver.name])),
        cases: new Map(cases.map((row) => [row.id, row.case.id])),
      },
      positionOf: new Map(solvers.map((solver) => [solver.name, solver.position])),
      caseIdOf: new Map(cases.map((row) => [row.case.id, row.id])),
    };
  }

  return {
    keysOf,
    /** Every solve of a run, by solver, case and start. */
    readAll(run: RunRow, keys: RunKeys = keysOf(run)): SolveView[] {
      return deps.solves.readRun(run.id).map((row) => presentSolve(row, keys.names));
    },
    /** Presents rows that may come from several runs. */
    createPresenter(findRun: (id: number) => RunRow): (row: SolveRow, runId: number) => SolveView {
      const known = new Map<number, SolveNames>();
      return (row, runId) => {
        let names = known.get(runId);
        if (!names) {
          names = keysOf(findRun(runId)).names;
          known.set(runId, names);
        }
        return presentSolve(row, names);
      };
    },
  };
}

export type RunSolves = ReturnType<typeof createRunSolves>;
