import { Decimal } from 'decimal.js';
import { describe, expect, it } from 'vitest';
import {
  attainableAccuracy,
  evaluationError,
  isFlatRoot,
  leadingCoefficient,
} from '../../../shared/equations/attainable.ts';
import { compileDouble } from '../../../shared/equations/double.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { problemOf } from '../../../shared/equations/problem.ts';

const problem = (text: string) => problemOf(parseEquation(text), {});
const accuracy = (text: string, value: string, multiplicity = 1, bracket: [number, number] | null = null) =>
  attainableAccuracy(problem(text), { value, multiplicity }, bracket);
const epsilon = 2 ** -52;

describe('attainableAccuracy', () => {
  it('is half an ulp of the root where f is evaluated well', () => {
    expect(accuracy('x - 3', '3')).toBe(2 * epsilon * 0.5);
    expect(accuracy('(x - 3)^5', '3', 5)).toBe(epsilon);
  });

  it('depends on the form of f: an expanded cube loses two thirds of the digits', () => {
    // η is a few ulps of the largest term, 3: F = η^(1/3) with η between 0.5 and 16 ulps of 1.
    const expanded = accuracy('x^3 - 3*x^2 + 3*x - 1', '1', 3);
    expect(expanded).toBeGreaterThan((0.5 * epsilon) ** (1 / 3) / 2);
    expect(expanded).toBeLessThan((16 * epsilon) ** (1 / 3));
    expect(accuracy('(x - 1)^3', '1', 3)).toBe(epsilon / 2);
  });

  it('sees a stretch of zeros that is wider than the ulps at which the error is measured', () => {
    // 1e6 + (x − 1) rounds to 1e6 while |x − 1| is at most half an ulp of 1e6, 2^-34, to an ulp of 1.
    const value = accuracy('1e6 + (x - 1) - 1e6', '1');
    expect(value).toBeGreaterThan(2 ** -35);
    expect(value).toBeLessThanOrEqual(2 ** -34 + epsilon);
  });

  it('does not change with the scale of f', () => {
    for (const scale of ['1e-300', '1e300']) {
      const ratio =
        accuracy(`${scale}*(x^2 - 2)`, '1.4142135623730950488016887242096980785696718753769') / (epsilon / 2);
      expect(ratio).toBeGreaterThan(0.5);
      expect(ratio).toBeLessThan(4);
    }
  });

  it('follows F = η/|f′| for an ill conditioned simple root', () => {
    // x² − 2x + (1 − 1e-8): terms near 1, so η is 1 to 4 half ulps of 1, and f′ = 2e-4 at 1 + 1e-4.
    const value = accuracy('x^2 - 2*x + 0.99999999', '1.0001');
    expect(value).toBeGreaterThan((0.25 * epsilon) / 2e-4);
    expect(value).toBeLessThan((2 * epsilon) / 2e-4);
  });

  it('is at a root 0 at least half the width on which binary64 f is exactly 0', () => {
    // x − sin x = x³/6 rounds to 0 while x³/6 is below half an ulp of x: x² < 6 · 2^-54, x < 1.8e-8 or more.
    const value = accuracy('x - sin(x)', '0', 3, [-1, 2]);
    expect(value).toBeGreaterThan(5e-9);
    expect(value).toBeLessThan(5e-8);
  });

  it('is for a flat root half the width on which f is 0, at most a hundredth of the bracket', () => {
    const flat = 'x == 0 ? 0 : x/exp(1/x^2)';
    // exp(1/x²) overflows for |x| < 1/sqrt(709.78) = 0.037535; the quotient underflows to 0 a little before.
    const value = accuracy(flat, '0', 1, [-1, 4]);
    expect(value).toBeGreaterThan(0.0366);
    expect(value).toBeLessThan(0.0376);
    expect(accuracy(flat, '0', 1, [-0.1, 0.4])).toBeCloseTo(0.005, 12);
    expect(accuracy(flat, '0')).toBeCloseTo(0.01, 12);
  });

  it('is half an ulp at a jump, where no derivative exists', () => {
    expect(accuracy('x < 3 ? -1 : 1', '3')).toBe(epsilon);
  });
});

describe('evaluationError', () => {
  it('is 0 where every operation is exact', () => {
    expect(evaluationError(problem('x - 3'), compileDouble(parseEquation('x - 3')).f, 3).isZero()).toBe(true);
  });

  it('includes the rounding of decimal constants', () => {
    const text = 'x - 0.1';
    const error = evaluationError(problem(text), compileDouble(parseEquation(text)).f, 0.1);
    // 0.1 as binary64 is 5.55e-18 too large; the subtraction near the root is exact.
    expect(error.toNumber()).toBeCloseTo(5.551115123125783e-18, 30);
  });
});

describe('leadingCoefficient', () => {
  it.each([
    ['x^2 - 4', '2', 1, 4],
    ['(x - 1)^3*exp(x)', '1', 3, Math.E],
    ['1 - cos(x)', '0', 2, 0.5],
    ['x - sin(x)', '0', 3, 1 / 6],
  ])('of %s at %s is |f^(m)|/m!', (text, value, multiplicity, expected) => {
    const found = leadingCoefficient(problem(text), { value, multiplicity }) ?? new Decimal(0);
    expect(found.toNumber() / expected).toBeCloseTo(1, 9);
  });
});

describe('isFlatRoot', () => {
  it('tells roots without a multiplicity from those of high multiplicity, at any scale', () => {
    expect(isFlatRoot(problem('x == 0 ? 0 : exp(-1/x^2)'), '0')).toBe(true);
    expect(isFlatRoot(problem('x == 0 ? 0 : 1e300*x*exp(-1/x^2)'), '0')).toBe(true);
    expect(isFlatRoot(problem('x^19'), '0')).toBe(false);
    expect(isFlatRoot(problem('1e-300*(x - 1)'), '1')).toBe(false);
    expect(isFlatRoot(problem('x*x - 1e300'), '1e150')).toBe(false);
  });
});
