import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { EqualityDot } from '../../components/charts/equality-plot.tsx';

const mostNames = 4;

/** Pairs that both sides solved and whose cost can be drawn, of one solver or of all. */
export function comparablePairs(pairs: readonly PairView[], solver: string): PairView[] {
  return pairs.filter(
    ({ reference, candidate, ...pair }) =>
      (solver === '' || pair.solver === solver) &&
      reference?.outcome === 'solved' &&
      candidate?.outcome === 'solved' &&
      reference.evaluations > 0 &&
      candidate.evaluations > 0,
  );
}

/**
 * A dot for each pair of costs, with how many pairs lie on it; equal ones first, so that those that differ
 * are drawn over them. The few that lie furthest from the line are named.
 */
export function costDots(pairs: readonly PairView[]): EqualityDot[] {
  const at = new Map<string, EqualityDot & { names: string[] }>();
  for (const pair of pairs) {
    const x = pair.reference?.evaluations ?? 0;
    const y = pair.candidate?.evaluations ?? 0;
    const key = `${x} ${y}`;
    const dot = at.get(key) ?? { x, y, count: 0, name: null, names: [] };
    dot.count += 1;
    dot.names.push(`${pair.solver} on ${pair.case}`);
    at.set(key, dot);
  }
  const away = ({ x, y }: EqualityDot): number => Math.abs(Math.log(y / x));
  const dots = [...at.values()].toSorted((a, b) => away(a) - away(b));
  // Less than a fifth more or fewer is no outlier, however few others there are.
  const named = dots.filter((dot) => away(dot) > Math.log(1.2)).slice(-mostNames);
  return dots.map((dot) => {
    const { names, ...plain } = dot;
    if (!named.includes(dot)) return plain;
    const [first = '', ...others] = names;
    return { ...plain, name: others.length === 0 ? first : `${first} and ${others.length} more` };
  });
}

export interface DotCounts {
  above: number;
  on: number;
  below: number;
}

/** How many pairs the candidate made dearer, left as they were and made cheaper. */
export function countSides(pairs: readonly PairView[]): DotCounts {
  const counts = { above: 0, on: 0, below: 0 };
  for (const { reference, candidate } of pairs) {
    const more = (candidate?.evaluations ?? 0) - (reference?.evaluations ?? 0);
    counts[more > 0 ? 'above' : more < 0 ? 'below' : 'on'] += 1;
  }
  return counts;
}
