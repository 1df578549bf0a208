import { Decimal } from 'decimal.js';
import { exactDecimal } from '../numerics/root-reference.ts';
import { certainSign, changesSign, isUniqueSimple } from './certify-interval.ts';
import { type Problem, problemOf } from './problem.ts';
import { refineRoot } from './refine-root.ts';
import type { Equation } from './tree.ts';

const digits = 40;
/** Newton's method is given up once it is so many radii away: it seldom comes back. */
const strayFactor = 100;
const mostHalvings = 160;
/** After so many halvings |f| at the ends has to have fallen to less than half, or it is no root. */
const shrinkEvery = 16;
/** Precisions tried: the second helps where f is far smaller than its terms, as at roots of odd multiplicity. */
const precisions = [80, 200] as const;

function within(root: Decimal, x: Decimal, radius: Decimal): boolean {
  const Wide = Decimal.clone({ precision: 120 });
  return new Wide(root).minus(x).abs().lte(radius);
}

/** A root at `root` by sign change or interval Newton over ± 10^−40 |root|, if one of them holds. */
function isCertified(problem: Problem, root: Decimal, precision: number): boolean {
  const unit = new Decimal(10).pow(-digits);
  const h = root.isZero() ? unit : root.abs().times(unit);
  return changesSign(problem, root, h, precision) === 'yes' || isUniqueSimple(problem, root, h, precision);
}

/** Magnitude of f at x in decimals, for telling roots from poles and jumps early. */
function size(problem: Problem, x: Decimal): Decimal {
  return problem.value(precisions[0])(x).abs();
}

/**
 * Halves [x − radius, x + radius] down to 10^−42 of the root where the signs at its ends differ for certain.
 * `doubtful`: more digits may help. `no`: they cannot, f has no change of sign, or does not shrink towards it.
 */
function bisect(
  problem: Problem,
  x: Decimal,
  radius: Decimal,
  precision: number,
): Decimal | 'doubtful' | 'no' {
  const Wide = Decimal.clone({ precision: 120, minE: -9e15, maxE: 9e15 });
  let low = new Wide(x).minus(radius);
  let high = new Wide(x).plus(radius);
  const left = certainSign(problem, low, precision);
  const right = certainSign(problem, high, precision);
  if (left === 0) return low;
  if (right === 0) return high;
  if (left === null || right === null) return 'doubtful';
  if (left === right) return 'no';
  let before = Decimal.max(size(problem, low), size(problem, high));
  for (let step = 1; step <= mostHalvings; step += 1) {
    const middle = low.plus(high).div(2);
    if (high.minus(low).lte(middle.abs().times('1e-42'))) return middle;
    const sign = certainSign(problem, middle, precision);
    if (sign === 0) return middle;
    if (sign === null) return 'doubtful';
    if (sign === left) low = middle;
    else high = middle;
    if (step % shrinkEvery !== 0) continue;
    const now = Decimal.max(size(problem, low), size(problem, high));
    if (!now.times(2).lt(before)) return 'no';
    before = now;
  }
  return 'no';
}

/**
 * A certified root of f within `radius` of x as a decimal of 40 digits, or null where none was certified: by
 * Newton's method in decimals from x, else by halving, each followed by the certificates of certify.ts. Roots
 * of even multiplicity and flat roots are not found. Never throws; bounded work, a few milliseconds for most
 * equations and less than a second for awkward ones.
 */
export function certifyNear(
  equation: Equation,
  parameters: Readonly<Record<string, string>>,
  x: number,
  radius: number,
): string | null {
  if (!Number.isFinite(x) || !Number.isFinite(radius) || radius < 0) return null;
  const problem = problemOf(equation, parameters);
  const Wide = Decimal.clone({ precision: 120, minE: -9e15, maxE: 9e15 });
  const start = new Wide(exactDecimal(x));
  const reach = new Wide(exactDecimal(radius));
  try {
    const refined = refineRoot(problem, start, digits, reach.times(strayFactor));
    if ('root' in refined && within(refined.root, start, reach)) {
      const root = new Wide(refined.root.toSignificantDigits(digits + 5));
      for (const precision of precisions) if (isCertified(problem, root, precision)) return root.toString();
    }
    for (const precision of precisions) {
      const found = bisect(problem, start, reach, precision);
      if (found === 'no') return null;
      if (found === 'doubtful') continue;
      const root = new Wide(found.toSignificantDigits(digits + 5));
      if (within(root, start, reach) && isCertified(problem, root, precision)) return root.toString();
    }
    return null;
  } catch {
    // Arguments beyond what decimals can carry (sin of 1e2000 and the like): no root is certified there.
    return null;
  }
}
