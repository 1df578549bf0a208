import type { SuiteCase } from '../schemas/case.ts';
import type { SolveRecord } from '../schemas/solve.ts';
import { nearestRoot } from './digits.ts';
import { rootReference } from './root-reference.ts';

/**
 * Index of the root that a solve is measured against: the one it went to, else the allowed one nearest to its
 * last finite x (`lastX`; NaN where there is none: the first). Null where the case has no certified root.
 */
export function rootOfSolve(
  solve: Pick<SolveRecord, 'nearest'>,
  suiteCase: Pick<SuiteCase, 'roots'>,
  lastX: number,
): number | null {
  if (solve.nearest !== null && suiteCase.roots[solve.nearest] !== undefined) return solve.nearest;
  const allowed = suiteCase.roots.flatMap((root, index) => (root.allowed ? [{ root, index }] : []));
  const candidates = allowed.length > 0 ? allowed : suiteCase.roots.map((root, index) => ({ root, index }));
  const near = nearestRoot(
    lastX,
    candidates.map(({ root }) => rootReference(root.value)),
  );
  return candidates[near?.index ?? 0]?.index ?? null;
}
