import type { OrderEstimate } from '../schemas/solve.ts';
import { lnFloorFactor } from './order-window.ts';

export type MethodClass = 'one-point' | 'memory' | 'bracketing' | null;

export interface RawCheck {
  status: Extract<
    OrderEstimate['status'],
    'left the domain' | 'diverged' | 'cycle' | 'stopped moving' | 'not enough steps'
  >;
  period: number | null;
}

/** Growth that counts as divergence, relative to 1 + |x₀|. Common practice, no source. */
const growth = 1e8;
/** Closeness of x's that counts as having come back, relative to 1 + |x|. Common practice, no source. */
const closeness = 1e-10;
const longestNearPeriod = 8;

/**
 * What the iterates themselves show before any order is looked for: left the domain, diverged, or a cycle.
 *
 * A cycle is exact where the whole state comes back: one x for a one-point method, three x's in a row for
 * others (their state is at most three points in all common methods; a bracket that repeats has shrunk no
 * more). A near-cycle comes back to within 1e-10 (1 + |x|) for three full periods of 2 to 8 while it moves by
 * over a hundred times that in between (a slowly converging run comes back, too, but does not move).
 * Only iterates above 16 times the rounding floor count: next to the root every method goes round in circles.
 * Returns null where nothing is wrong.
 */
export function rawCheck(
  iterates: readonly number[],
  lnErrors: readonly (number | null)[],
  lnFloor: number,
  methodClass: MethodClass,
): RawCheck | null {
  if (iterates.some((x) => !Number.isFinite(x))) return { status: 'left the domain', period: null };
  if (hasDiverged(iterates)) return { status: 'diverged', period: null };
  const above = lnErrors.map((value) => value !== null && value > lnFloor + lnFloorFactor);
  const period = exactPeriod(iterates, above, methodClass) ?? nearPeriod(iterates, above);
  return period === null ? null : { status: 'cycle', period };
}

/** Whether the iterates stand still at an x that is not the root: three equal in a row, or two for one-point. */
export function hasStopped(
  iterates: readonly number[],
  lnErrors: readonly (number | null)[],
  lnFloor: number,
  methodClass: MethodClass,
): boolean {
  const needed = methodClass === 'one-point' ? 2 : 3;
  const last = iterates.at(-1);
  const lnLast = lnErrors.at(-1);
  if (last === undefined || lnLast === null || lnLast === undefined) return false;
  if (!(lnLast > lnFloor + lnFloorFactor) || iterates.length < needed) return false;
  return iterates.slice(-needed).every((x) => x === last);
}

function hasDiverged(iterates: readonly number[]): boolean {
  const sizes = iterates.map(Math.abs);
  const [first, last] = [sizes[0], sizes.at(-1)];
  if (first === undefined || last === undefined || sizes.length < 4) return false;
  if (!(last > growth * (1 + first))) return false;
  return sizes.slice(-3).every((size, i) => size > (sizes.at(-4 + i) ?? Number.POSITIVE_INFINITY));
}

/** Earlier visits of one x that are looked at, newest first: enough for any cycle, and bounded for any path. */
const visitsLookedAt = 16;

function exactPeriod(
  iterates: readonly number[],
  above: readonly boolean[],
  methodClass: MethodClass,
): number | null {
  const depth = methodClass === 'one-point' ? 1 : 3;
  // A Map takes −0 and 0 for the same x, as they are. Before each index: the visit of the same x before it.
  const newest = new Map<number, number>();
  const before: number[] = [];
  for (let k = depth - 1; k < iterates.length; k += 1) {
    if (!above[k]) continue;
    const x = iterates[k] ?? 0;
    let earlier = newest.get(x) ?? -1;
    before[k] = earlier;
    newest.set(x, k);
    for (let looked = 0; earlier >= 0 && looked < visitsLookedAt; looked += 1) {
      if (isSameState(iterates, earlier, k, depth)) {
        const period = k - earlier;
        if (period >= 2 && x !== iterates[k - 1]) return period;
        break;
      }
      earlier = before[earlier] ?? -1;
    }
  }
  return null;
}

function isSameState(iterates: readonly number[], i: number, j: number, depth: number): boolean {
  for (let back = 1; back < depth; back += 1) if (iterates[i - back] !== iterates[j - back]) return false;
  return true;
}

function nearPeriod(iterates: readonly number[], above: readonly boolean[]): number | null {
  for (let period = 2; period <= longestNearPeriod; period += 1) {
    let run = 0;
    for (let k = 0; k + period < iterates.length; k += 1) {
      const x = iterates[k] ?? 0;
      const next = iterates[k + 1] ?? 0;
      const later = iterates[k + period] ?? 0;
      const scale = closeness * (1 + Math.abs(x));
      const isBack = Math.abs(later - x) <= scale && Math.abs(next - x) > 100 * scale;
      run = isBack && above[k] && above[k + period] ? run + 1 : 0;
      // Three full periods in all: the first is compared with the second and the second with the third.
      if (run >= 2 * period) return period;
    }
  }
  return null;
}
