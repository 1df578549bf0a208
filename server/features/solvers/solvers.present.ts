import type { SolverView } from '../../../shared/schemas/libraries.ts';
import { toIso } from '../present-time.ts';
import type { SolverRow } from './solvers.repo.ts';

export function presentSolver(row: SolverRow): SolverView {
  const { name, declared, declaration, buildId, updatedAt } = row;
  return { name, declared, declaration, build: buildId, updatedAt: toIso(updatedAt) };
}
