import { Decimal } from 'decimal.js';
import type { Problem } from './problem.ts';

/** Digits carried beyond those to be certified, for cancellation within f. */
export const guardDigits = 40;

/** −1, 0 or 1 where outward rounding leaves no doubt; null where it does, or f is undefined. */
export function certainSign(problem: Problem, x: Decimal, digits: number): -1 | 0 | 1 | null {
  const { value } = problem.interval(digits)(x, x);
  if (value === null) return null;
  if (value.low.gt(0)) return 1;
  if (value.high.lt(0)) return -1;
  return value.low.isZero() && value.high.isZero() ? 0 : null;
}

/**
 * Certificate A: f changes sign over [x − h, x + h], both signs certain by outward rounding, and |f| shrinks
 * to at most a half on both sides between a distance of 10²⁰ h and h, which neither a pole nor a jump does.
 * Source: Bolzano's theorem; Neumaier, Interval Methods for Systems of Equations, 1990 (from memory).
 */
export function changesSign(
  problem: Problem,
  x: Decimal,
  h: Decimal,
  digits: number,
): 'yes' | 'no' | 'pole or jump' {
  const precise = Decimal.clone({ precision: digits + 20 });
  const ends = [new precise(x).minus(h), new precise(x).plus(h)] as const;
  const left = certainSign(problem, ends[0], digits);
  const right = certainSign(problem, ends[1], digits);
  if (left === null || right === null || left * right !== -1) return 'no';
  const f = problem.value(digits);
  const wide = h.times('1e20');
  const far = [new precise(x).minus(wide), new precise(x).plus(wide)] as const;
  for (const side of [0, 1] as const) {
    const close = f(ends[side]).abs();
    const distant = f(far[side]).abs();
    if (!close.isFinite()) return 'pole or jump';
    if (distant.isFinite() && close.times(2).gt(distant)) return 'pole or jump';
  }
  return 'yes';
}

/**
 * Certificate B: interval Newton, N(X) = mid − f(mid)/f′(X) inside the interior of X = [x − h, x + h]: exactly
 * one root in X, and it is simple. Every quotient is rounded outward.
 * Source: Moore 1966; Moore, Kearfott and Cloud, Introduction to Interval Analysis, SIAM 2009 (from memory).
 */
export function isUniqueSimple(problem: Problem, x: Decimal, h: Decimal, digits: number): boolean {
  const settings = { precision: digits, minE: -9e15, maxE: 9e15 };
  const Down = Decimal.clone({ ...settings, rounding: Decimal.ROUND_FLOOR });
  const Up = Decimal.clone({ ...settings, rounding: Decimal.ROUND_CEIL });
  const low = new Up(x).minus(h);
  const high = new Down(x).plus(h);
  const slope = problem.interval(digits)(low, high).derivative;
  const middle = problem.interval(digits)(x, x).value;
  if (slope === null || middle === null || !slope.low.isFinite() || !slope.high.isFinite()) return false;
  if (slope.low.lte(0) && slope.high.gte(0)) return false;
  const pairs = [
    [middle.low, slope.low],
    [middle.low, slope.high],
    [middle.high, slope.low],
    [middle.high, slope.high],
  ] as const;
  const most = Decimal.max(...pairs.map(([a, b]) => new Up(a).div(b).toString()));
  const least = Decimal.min(...pairs.map(([a, b]) => new Down(a).div(b).toString()));
  return new Down(x).minus(most).gt(low) && new Up(x).minus(least).lt(high);
}
