import type {
  RunBase,
  RunDetail,
  RunProgress,
  RunSolverView,
  RunView,
  SolveView,
} from '../../../shared/schemas/runs.ts';
import { outcomeCode, wordOf } from '../../db/codes.ts';
import { toIso, toIsoOrNull } from '../present-time.ts';
import type { NamedRun, OutcomeCount, RunRow, RunSolverRow } from './runs.repo.ts';
import { type SolveValues, valuesToSolve } from './solve-row.ts';
import type { SolveRow } from './solves.repo.ts';

const outcomeOf = wordOf(outcomeCode);

export function presentBase(run: RunRow): RunBase | null {
  if (run.baseRunId !== null) return { kind: 'run', run: run.baseRunId };
  if (run.baseReferenceId !== null) return { kind: 'reference', revision: run.baseReferenceId };
  return null;
}

export function presentProgress(run: RunRow): RunProgress {
  const { planned, stored, solved, toConfirm, confirmed, unsteady, evaluations } = run;
  return { planned, stored, solved, toConfirm, confirmed, unsteady, evaluations };
}

export function presentRun({ run, library, build, suite }: NamedRun): RunView {
  const { id, status, phase, reason, settings, createdBy, elapsedMs } = run;
  return {
    id,
    library,
    build,
    suite,
    status,
    phase,
    reason,
    settings,
    against: presentBase(run),
    progress: presentProgress(run),
    createdAt: toIso(run.createdAt),
    createdBy,
    startedAt: toIsoOrNull(run.startedAt),
    finishedAt: toIsoOrNull(run.finishedAt),
    elapsedMs,
  };
}

function presentRunSolver(solver: RunSolverRow, counts: OutcomeCount[]): RunSolverView {
  const view: RunSolverView = {
    declaration: solver.declaration,
    outcomes: {},
    stored: 0,
    evaluations: 0,
    evaluationsSolved: 0,
    repeated: 0,
    unsteady: 0,
  };
  for (const count of counts) {
    const outcome = outcomeOf(count.outcome);
    view.outcomes[outcome] = count.stored;
    view.stored += count.stored;
    view.evaluations += count.evaluations;
    if (outcome === 'solved') view.evaluationsSolved = count.evaluations;
    view.repeated += count.repeated;
    view.unsteady += count.unsteady;
  }
  return view;
}

export function presentRunDetail(
  named: NamedRun,
  solvers: RunSolverRow[],
  counts: OutcomeCount[],
): RunDetail {
  const { environment, adapterText, log } = named.run;
  const views = solvers.map((solver) =>
    presentRunSolver(
      solver,
      counts.filter((count) => count.solver === solver.position),
    ),
  );
  return { ...presentRun(named), environment, adapterText, log, solvers: views };
}

/** The names behind the keys of a run's solves. */
export interface SolveNames {
  solvers: ReadonlyMap<number, string>;
  cases: ReadonlyMap<number, string>;
}

export function presentSolve(row: SolveRow, names: SolveNames): SolveView {
  const [id, position, caseId, start, ...values] = row;
  const solver = names.solvers.get(position);
  const caseName = names.cases.get(caseId);
  if (solver === undefined || caseName === undefined)
    throw new RangeError(`Solve ${id} has a solver or case that its run does not have`);
  const rest: SolveValues = values;
  return { id, ...valuesToSolve({ solver, case: caseName, start }, rest) };
}
