import { Decimal } from 'decimal.js';
import { guardDigits } from './certify-interval.ts';
import type { Problem } from './problem.ts';

const firstDigits = 30;
const mostSteps = 14;

/**
 * Newton's method in decimals from `start`, with twice the digits at each step up to `digits` and a guard.
 * Returns the root, or the reason why none was reached: a derivative of 0, a step that leaves the domain, no
 * end within 14 steps, or a step further from the start than `stray` where that is given.
 */
export function refineRoot(
  problem: Problem,
  start: Decimal,
  digits: number,
  stray: Decimal | null = null,
): { root: Decimal; isExact: boolean } | { reason: string } {
  const most = digits + guardDigits;
  const Full = Decimal.clone({ precision: most + 10, minE: -9e15, maxE: 9e15 });
  let x = new Full(start);
  let working = Math.min(most, Math.max(firstDigits, start.precision() + 10));
  for (let step = 0; step < mostSteps; step += 1) {
    const { value, first } = problem.decimal(working)(x);
    if (value.isZero()) {
      // Zero at few digits may be cancellation; it counts once it holds at all of them.
      if (working === most) return { root: x, isExact: true };
      working = most;
      continue;
    }
    if (!value.isFinite()) return { reason: `f is undefined at ${x.toSignificantDigits(20).toString()}` };
    if (!first.isFinite() || first.isZero()) return { reason: 'the derivative is 0 or undefined there' };
    const move = new Full(value).div(first);
    x = x.minus(move);
    if (stray !== null && x.minus(start).abs().gt(stray))
      return { reason: "Newton's method strays from there" };
    const isSettled = move.isZero() || move.abs().lte(x.abs().times(new Full(10).pow(-(digits + 8))));
    if (isSettled && working === most) return { root: x, isExact: false };
    working = Math.min(most, working * 2);
  }
  return { reason: "Newton's method does not settle there" };
}
