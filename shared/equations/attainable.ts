import { Decimal } from 'decimal.js';
import { exactDecimal } from '../numerics/root-reference.ts';
import { nextDown, nextUp, ulpOf } from '../numerics/ulps.ts';
import { type CompiledDouble, compileDouble } from './double.ts';
import type { Problem } from './problem.ts';

/** Ulps to each side of the rounded root at which the evaluation error is measured. */
const reach = 16;
const exactDigits = 40;
/** Exact doubles near 0 have hundreds of digits; f cannot tell x from x rounded to so many. */
const pointDigits = 120;
/** Largest share of the bracket (of max(1, |r|) without one) that a flat root's width may be. */
const flatShare = 1e-2;

export interface AttainableRoot {
  value: string;
  multiplicity: number;
}

/** Raised with every change that can alter F, so that kept values are measured anew. */
export const attainableVersion = 1;

/** The parameters as binary64, as a solver's equation uses them. */
export function binaryParameters(parameters: Readonly<Record<string, string>>): Record<string, number> {
  return Object.fromEntries(Object.entries(parameters).map(([name, text]) => [name, Number(text)]));
}

function near(root: number): number[] {
  const points = [root];
  let up = root;
  let down = root;
  for (let i = 0; i < reach; i += 1) {
    up = nextUp(up);
    down = nextDown(down);
    points.push(up, down);
  }
  return points;
}

/** η: the largest |f in binary64 − f in decimals| at r rounded and at ±1 … ±16 ulps, where both are defined. */
export function evaluationError(problem: Problem, f: CompiledDouble['f'], root: number): Decimal {
  const exact = problem.value(exactDigits);
  let worst = new Decimal(0);
  for (const x of near(root)) {
    const computed = f(x);
    if (!Number.isFinite(computed)) continue;
    const value = exact(exactDecimal(x).toSignificantDigits(pointDigits));
    if (!value.isFinite()) continue;
    const Wide = Decimal.clone({ precision: exactDigits, minE: -9e15, maxE: 9e15 });
    const error = new Wide(value).minus(exactDecimal(computed)).abs();
    if (error.gt(worst)) worst = error;
  }
  return worst;
}

/**
 * |f⁽ᵐ⁾(r)|/m! from |f(r + h)|/|h|ᵐ at h = ±10⁻¹² |r| (±10⁻¹² where r = 0) at a precision that leaves the
 * cancellation no say; the smaller of the two sides. Relative error about h times the next coefficient.
 * null where f is undefined on both sides.
 */
export function leadingCoefficient(problem: Problem, root: AttainableRoot): Decimal | null {
  const m = root.multiplicity;
  const precision = 12 * (m + 1) + exactDigits;
  const Wide = Decimal.clone({ precision: precision + 20, minE: -9e15, maxE: 9e15 });
  const r = new Wide(root.value);
  const size = (r.isZero() ? new Wide(1) : r.abs()).times('1e-12');
  let least: Decimal | null = null;
  for (const h of [size, size.negated()]) {
    const value = problem.value(precision)(r.plus(h));
    if (!value.isFinite()) continue;
    const coefficient = new Wide(value).abs().div(size.pow(m));
    if (least === null || coefficient.lt(least)) least = coefficient;
  }
  return least;
}

/** Powers beyond this count as flat: no multiplicity that a case may claim comes near it. */
const flatPower = 64;

/**
 * Whether f vanishes at r faster than any power that matters: |f(r ± h)| < 2^−64 |f(r ± 2h)| at
 * h = 10⁻³ max(1, |r|), on both sides. Independent of the scale of f.
 */
export function isFlatRoot(problem: Problem, value: string): boolean {
  const Wide = Decimal.clone({ precision: 60, minE: -9e15, maxE: 9e15 });
  const r = new Wide(value);
  const h = Decimal.max(1, r.abs()).times('1e-3');
  const f = problem.value(60);
  return [h, h.negated()].every((offset) => {
    const close = f(r.plus(offset)).abs();
    const far = f(r.plus(offset.times(2))).abs();
    return far.isFinite() && close.lt(far.times(new Wide(2).pow(-flatPower)));
  });
}

/** Whether |f| stays where it is on a side of r while the distance falls from 10⁻¹² to 10⁻²⁴ |r|. */
function jumps(problem: Problem, value: string): boolean {
  const Wide = Decimal.clone({ precision: 80, minE: -9e15, maxE: 9e15 });
  const r = new Wide(value);
  const unit = r.isZero() ? new Wide(1) : r.abs();
  const f = problem.value(60);
  return [1, -1].some((side) => {
    const far = f(r.plus(unit.times(side * 1e-12))).abs();
    const close = f(r.plus(unit.times(side * 1e-24))).abs();
    return far.isFinite() && close.isFinite() && !far.isZero() && close.times(2).gt(far);
  });
}

/**
 * Half the width of the stretch around r on which binary64 f is exactly 0, at most `most` to each side: doubled
 * outward from half an ulp while f is 0, then halved to nine digits.
 */
function zeroHalfWidth(f: CompiledDouble['f'], root: number, most: number): number {
  const side = (sign: 1 | -1): number => {
    let inside = 0;
    let outside = Math.min(ulpOf(root), most);
    while (f(root + sign * outside) === 0) {
      if (outside >= most) return most;
      inside = outside;
      outside = Math.min(2 * outside, most);
    }
    while (inside > 0 && outside - inside > 1e-9 * outside) {
      const middle = inside + (outside - inside) / 2;
      if (middle === inside || middle === outside) break;
      if (f(root + sign * middle) === 0) inside = middle;
      else outside = middle;
    }
    return inside;
  };
  return f(root) === 0 ? Math.min(most, side(1) / 2 + side(-1) / 2) : 0;
}

/**
 * F, the distance from a root r of multiplicity m below which binary64 evaluation of this form of f cannot
 * tell x from r (absolute, in the unit of x):
 * F = max(ulp(r)/2, (m! η / |f⁽ᵐ⁾(r)|)^(1/m)), with η measured, since the form of f decides it.
 *
 * Where binary64 f is exactly 0 on a stretch around r, F is also at least half its width: f may be 0 far beyond
 * the 16 ulps over which η is measured (x − sin x is 0 below 1e-8 or so, and at r = 0 ulps are subnormal).
 * Where f jumps at r there is no derivative, and F = ulp(r)/2.
 *
 * Flat roots (all derivatives 0): half the width on which binary64 f is exactly 0, at most 1e-2 of the
 * bracket, or 1e-2 max(1, |r|) without one; to be taken once where F is elsewhere taken 16 times.
 *
 * `value`: the certified root; `bracket`: as binary64, or null.
 * Throws RangeError where f is undefined all round the root.
 * Accuracy: tests/shared/certify/attainable.test.ts against closed forms, to a factor of 2.
 * Source: the estimate is standard error analysis of roots (Wilkinson, Rounding Errors in Algebraic
 * Processes, 1963, chapter 2, from memory); the rule for flat roots is our own.
 */
export function attainableAccuracy(
  problem: Problem,
  root: AttainableRoot,
  bracket: readonly [number, number] | null,
): number {
  const { f } = compileDouble(problem.equation, binaryParameters(problem.parameters));
  const rounded = Number(root.value);
  const span = bracket === null ? Math.max(1, Math.abs(rounded)) : bracket[1] - bracket[0];
  const zeroWidth = () => zeroHalfWidth(f, rounded, Math.min(flatShare * span, Number.MAX_VALUE));
  if (isFlatRoot(problem, root.value)) return zeroWidth();
  const coefficient = leadingCoefficient(problem, root);
  if (coefficient === null) throw new RangeError(`f is undefined around ${root.value}`);
  const least = Math.max(ulpOf(rounded) / 2, zeroWidth());
  if (coefficient.isZero() || jumps(problem, root.value)) return least;
  const error = evaluationError(problem, f, rounded);
  const Wide = Decimal.clone({ precision: 30, minE: -9e15, maxE: 9e15 });
  const distance = new Wide(error).div(coefficient).pow(new Wide(1).div(root.multiplicity)).toNumber();
  return Math.max(least, Number.isFinite(distance) ? distance : least);
}
