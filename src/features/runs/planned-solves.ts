import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';

/**
 * How many solves a solver makes of a case: one for a bracket or where nothing fits, else one for each start
 * list that is long enough; all shorter ones together give the bracket's ends once.
 */
export function countPlanned(solver: SolverDeclaration, suiteCase: SuiteCase): number {
  if (solver.takes === 'point' || solver.takes === 'bracket' || solver.uses.includes('jac')) return 1;
  if (solver.takes === 'both' && suiteCase.bracket === null) return 1;
  if (suiteCase.starts.length === 0) return 1;
  const fitting = suiteCase.starts.filter((list) => list.length >= solver.starts).length;
  const short = suiteCase.starts.length - fitting;
  const areEndsTaken = solver.starts === 2 && suiteCase.bracket !== null;
  return fitting + (areEndsTaken ? Math.min(1, short) : short);
}
