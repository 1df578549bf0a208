import type { Comparison, Pair } from '../../../shared/comparison/comparison.ts';
import type { ComparisonView, PairView } from '../../../shared/schemas/comparisons.ts';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import type { Side } from './comparable.ts';

/** Rows of solves: a comparison hands back the very records that it was given. */
export type SolveIds = ReadonlyMap<SolveRecord, number>;

export function presentComparison(
  names: { library: string; suite: string; allowances: number },
  sides: { reference: Side; candidate: Side },
  comparison: Comparison,
): ComparisonView {
  const { verdict, reasons, exact, breaches, totals, overall, changes, notCompared } = comparison;
  return {
    ...names,
    reference: sides.reference.view,
    candidate: sides.candidate.view,
    verdict,
    reasons,
    exact,
    breaches,
    totals: totals.map((one) => ({ ...one, uses: [...one.uses] })),
    overall,
    changes,
    pairs: comparison.pairs.length,
    notApplicable: comparison.notApplicable.length,
    notCompared,
  };
}

function presentSide(solve: SolveRecord | null, ids: SolveIds): SolveView | null {
  if (solve === null) return null;
  const id = ids.get(solve);
  if (id === undefined) throw new RangeError('A pair has a solve that neither side has');
  return { ...solve, id };
}

export function presentPair(pair: Pair, ids: SolveIds): PairView {
  return {
    ...pair,
    traits: [...pair.traits],
    reference: presentSide(pair.reference, ids),
    candidate: presentSide(pair.candidate, ids),
  };
}
