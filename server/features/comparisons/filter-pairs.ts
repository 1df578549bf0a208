import type { Pair } from '../../../shared/comparison/comparison.ts';
import type { PairsQuery } from '../../../shared/schemas/comparisons.ts';
import { changes } from '../../../shared/schemas/words.ts';

type Filter = Pick<PairsQuery, 'solver' | 'change' | 'trait' | 'case' | 'text'>;

export function filterPairs(pairs: readonly Pair[], filter: Filter): Pair[] {
  const text = filter.text?.trim().toLowerCase() ?? '';
  const wanted = filter.change && new Set(filter.change);
  return pairs.filter(
    (pair) =>
      (filter.solver === undefined || pair.solver === filter.solver || pair.formerly === filter.solver) &&
      (filter.trait === undefined || pair.traits.includes(filter.trait)) &&
      (filter.case === undefined || pair.case === filter.case) &&
      (text === '' || pair.case.toLowerCase().includes(text) || pair.solver.toLowerCase().includes(text)) &&
      (wanted === undefined || wanted.has(pair.change) || pair.others.some((change) => wanted.has(change))),
  );
}

const gravity = new Map(changes.map((change, index) => [change, index]));

/** Largest first; pairs without the figure come last. */
function byFigure(figure: (pair: Pair) => number | null): (a: Pair, b: Pair) => number {
  return (a, b) => {
    const [left, right] = [figure(a), figure(b)];
    if (left === null || right === null) return Number(left === null) - Number(right === null);
    return right - left;
  };
}

const orders: Record<PairsQuery['sort'], ((a: Pair, b: Pair) => number) | null> = {
  /** As the comparison has them: by solver, case and start. */
  suite: null,
  gravity: (a, b) => (gravity.get(a.change) ?? 0) - (gravity.get(b.change) ?? 0),
  difference: byFigure((pair) => pair.difference),
  digits: byFigure((pair) => (pair.digits === null ? null : -pair.digits)),
};

/** Sorting is stable: what is equal stays in the order of the suite. */
export function sortPairs(pairs: Pair[], sort: PairsQuery['sort']): Pair[] {
  const order = orders[sort];
  return order === null ? pairs : pairs.toSorted(order);
}
