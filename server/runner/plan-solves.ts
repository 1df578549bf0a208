import type { SuiteCase } from '../../shared/schemas/case.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';

/** One solve to do, or a pair that cannot be done: then `why` says so and nothing goes over the wire. */
export interface PlannedSolve {
  solver: number;
  case: number;
  /** Index of the start list; null where the solver takes a bracket alone or the case has no list. */
  start: number | null;
  bracket: readonly [number, number] | null;
  starts: readonly number[];
  why: string | null;
}

/** All solves of a run in their fixed order: case by case, so that an equation is read once. */
export function planSolves(
  solvers: readonly SolverDeclaration[],
  cases: readonly SuiteCase[],
): PlannedSolve[] {
  return cases.flatMap((suiteCase, at) =>
    solvers.flatMap((solver, index) => planPair(solver, index, suiteCase, at)),
  );
}

function planPair(
  solver: SolverDeclaration,
  index: number,
  suiteCase: SuiteCase,
  at: number,
): PlannedSolve[] {
  const bracket =
    suiteCase.bracket && ([Number(suiteCase.bracket[0]), Number(suiteCase.bracket[1])] as const);
  const base = { solver: index, case: at, start: null, bracket: null, starts: [], why: null };
  const refuse = (why: string, start: number | null = null): PlannedSolve => ({ ...base, start, why });
  if (solver.takes === 'point')
    return [refuse('the solver takes the point of a system; the case is one equation')];
  if (solver.uses.includes('jac')) return [refuse('the solver uses a Jacobian; the case is one equation')];
  if (solver.takes === 'bracket') {
    return bracket ? [{ ...base, bracket }] : [refuse('the solver takes a bracket; the case offers none')];
  }
  if (solver.takes === 'both' && !bracket)
    return [refuse('the solver takes a bracket; the case offers none')];
  const kept = solver.takes === 'both' ? bracket : null;
  const ends = solver.starts === 2 && bracket ? bracket : null;
  if (suiteCase.starts.length === 0) {
    if (ends) return [{ ...base, bracket: kept, starts: ends }];
    return [refuse(`the solver takes ${countStarts(solver.starts)}; the case offers none`)];
  }
  let areEndsTaken = false;
  return suiteCase.starts.flatMap((list, start): PlannedSolve[] => {
    if (list.length >= solver.starts) {
      const starts = list.slice(0, solver.starts).map(Number);
      return [{ ...base, start, bracket: kept, starts }];
    }
    if (!ends)
      return [refuse(`the solver takes ${countStarts(solver.starts)}; the list has ${list.length}`, start)];
    // Every short list would give the bracket's ends again: the same solve, which counts once.
    if (areEndsTaken) return [];
    areEndsTaken = true;
    return [{ ...base, start, bracket: kept, starts: ends }];
  });
}

function countStarts(count: number): string {
  return count === 1 ? 'one start' : `${count} starts`;
}
