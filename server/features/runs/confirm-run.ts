import type { SolveView } from '../../../shared/schemas/runs.ts';
import { type SolveRecord, solveKey } from '../../../shared/schemas/solve.ts';

/** What a solve is compared with: enough to tell whether it did the same thing. */
export type BaseSolves = ReadonlyMap<string, Pick<SolveRecord, 'outcome' | 'pathHash'>>;

/** Nothing was tried, so there is nothing to repeat. */
function wasTried(solve: SolveRecord): boolean {
  return solve.outcome !== 'not applicable' && !solve.remarks.some((remark) => remark.code === 'not tried');
}

/**
 * The solves whose steadiness matters. `differing`: those that did something else than their counterpart
 * (another path or root, or the same judged otherwise); a difference is only worth a word where it comes
 * again. A solve without a counterpart differs from nothing.
 */
export function solvesToConfirm(
  solves: SolveView[],
  which: 'differing' | 'all' | 'none',
  base: BaseSolves | null,
): SolveView[] {
  if (which === 'none') return [];
  return solves.filter((solve) => {
    if (!wasTried(solve)) return false;
    if (which === 'all') return true;
    const counterpart = base?.get(solveKey(solve));
    if (counterpart === undefined) return false;
    return counterpart.pathHash !== solve.pathHash || counterpart.outcome !== solve.outcome;
  });
}
