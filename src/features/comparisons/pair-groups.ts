import { gravity } from '../../../shared/comparison/change.ts';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { Change } from '../../../shared/schemas/words.ts';

export interface PairFilter {
  text: string;
  /** Changes that are shown; empty means all but `same`. */
  changes: readonly string[];
  sort: 'gravity' | 'suite';
}

/** Pairs that have the words in solver, case or trait. */
export function matchText(pairs: readonly PairView[], text: string): PairView[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return [...pairs];
  return pairs.filter((pair) => {
    const haystack = [pair.solver, pair.case, ...pair.traits].join(' ').toLowerCase();
    return words.every((word) => haystack.includes(word));
  });
}

export interface PairGroup {
  change: Change;
  pairs: PairView[];
}

const costOf = (pair: PairView): number => Math.abs(pair.difference ?? 0);

/** By the gravest change, gravest first; within a group the dearest first, or as the suite has them. */
export function groupPairs(pairs: readonly PairView[], filter: PairFilter): PairGroup[] {
  const isShown = (pair: PairView): boolean => {
    if (filter.changes.length === 0) return pair.change !== 'same';
    return (
      filter.changes.includes(pair.change) || pair.others.some((other) => filter.changes.includes(other))
    );
  };
  const left = matchText(pairs, filter.text).filter(isShown);
  return gravity.flatMap((change) => {
    const own = left.filter((pair) => pair.change === change);
    if (own.length === 0) return [];
    return [
      { change, pairs: filter.sort === 'gravity' ? own.toSorted((a, b) => costOf(b) - costOf(a)) : own },
    ];
  });
}

/** How many pairs have each change, others included, in order of gravity. */
export function countWords(pairs: readonly PairView[]): { change: Change; count: number }[] {
  return gravity.flatMap((change) => {
    const count = pairs.filter((pair) => pair.change === change).length;
    return count === 0 ? [] : [{ change, count }];
  });
}
