import type { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileDecimal } from '../../../shared/equations/decimal.ts';
import { buildProgram } from '../../../shared/equations/derive.ts';
import { compileDouble } from '../../../shared/equations/double.ts';
import { doubleArithmetic } from '../../../shared/equations/double-arithmetic.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { runProgram } from '../../../shared/equations/program.ts';
import type { Equation } from '../../../shared/equations/tree.ts';
import { exactDecimal } from '../../../shared/numerics/root-reference.ts';
import { anyTree } from './random-tree.ts';

/** Every derivative rule, away from kinks and jumps: equation and points. */
const smooth: [string, number[]][] = [
  ['x^3 - 2*x - 5', [-1.3, 0, 2.1]],
  ['x*exp(x^2) - sin(x)^2 + 3*cos(x) + 5', [-1.2, 0.4]],
  ['(x^2 - 1)/(x^2 + 1) + atan(x) - 0.3', [-2.5, 0.7]],
  ['1/(2 - x) - 3/x', [0.3, -4]],
  ['expm1(x) * log1p(x) * log(x) * log2(x) * log10(x)', [0.4, 3.3]],
  ['sqrt(x + 2) / cbrt(x - 3)', [-1, 2, 5]],
  ['tan(x) * sin(2*x) - cos(x/3)', [-1, 0.8, 4]],
  ['asin(x) - acos(x^2) * atan(3*x)', [-0.6, 0.05, 0.9]],
  ['sinh(x) * tanh(x) - cosh(2*x)', [-1.5, 0.2]],
  ['asinh(3*x) * atanh(x/4) + acosh(x^2 + 2)', [-2, 0.3]],
  ['erf(x) - x*erf(x^2)', [-0.7, 0.1, 1.4]],
  ['hypot(x, 1 - x^2)', [-1.2, 0.4]],
  ['hypot(x, 3) + hypot(2, x^2)', [-1.2, 0.4]],
  ['atan2(x^2 - 2, x - 1) + atan2(2, x) + atan2(x, 2)', [-1.2, 0.4, 3]],
  ['x^x + 2^x - x^pi', [0.3, 2.2]],
  ['(x^2 + 1)^(sin(x)) + e^(x^2)', [-1.1, 0.8]],
  ['x^-3 + (x - 1)^-1 + x^64 + x^-64', [-0.9, 0.95, 1.1]],
  ['x^100 + (x^2)^0.5 + x^0', [-1.02, 0.97]],
  ['(x^3)^(1/3) + x^1.5', [0.2, 3]],
  ['abs(x - 2)^3 + min(x, x^2, 3) * max(2*x, sin(x))', [-1.3, 0.4, 1.5, 2.5]],
  ['x < 0 ? exp(x) : x < 1 ? x^3 : log(x) * x', [-0.4, 0.5, 1.5]],
  ['x * (x > 1 ? sin(x) : cos(x)) + x^2 * sign(x)', [-0.4, 1.5]],
  ['-(-x^2)^3 - +x', [0.4, -1.5]],
];

/** Central differences with step h: errors of order h^2 times higher derivatives. */
function differences(f: (x: Decimal) => Decimal, x: Decimal, h: Decimal) {
  const [below, here, above] = [f(x.minus(h)), f(x), f(x.plus(h))];
  return {
    first: above.minus(below).div(h.times(2)),
    second: above.minus(here.times(2)).plus(below).div(h.times(h)),
  };
}

const digits = 110;
const step = '1e-30';

/** Relative to 1 or the size of the derivative, whichever is greater. */
const gap = (found: Decimal, wanted: Decimal) =>
  found.minus(wanted).abs().toNumber() / Math.max(1, wanted.abs().toNumber());

describe('buildProgram', () => {
  it.each(smooth)('differentiates %s like central differences in decimals', (text, points) => {
    const compiled = compileDecimal(parseEquation(text), {}, digits);
    for (const point of points) {
      const x = compileDecimal(parseEquation('x'), {}, digits)(exactDecimal(point)).value;
      const { first, second } = compiled(x);
      const estimate = differences((at) => compiled(at).value, x, x.times(0).plus(step));
      // Step 1e-30: truncation about 1e-60 times f''' or f'''' (below 1e30 here), rounding 1e-116 / 1e-60.
      expect(gap(estimate.first, first), `first at ${point}`).toBeLessThan(1e-30);
      expect(gap(estimate.second, second), `second at ${point}`).toBeLessThan(1e-30);
    }
  });

  it.each(smooth)('gives derivatives of %s in binary64 that agree with the decimal ones', (text, points) => {
    const equation = parseEquation(text);
    const { f, df, d2f } = compileDouble(equation);
    const compiled = compileDecimal(equation, {}, 40);
    for (const point of points) {
      const { value, first, second } = compiled(exactDecimal(point));
      // At most about 60 operations of at most 2 ulps, at conditions below 100: 60 * 2 * 100 * 2^-53 = 1.3e-12.
      expect(Math.abs(f(point) - value.toNumber())).toBeLessThan(2e-12 * Math.max(1, value.abs().toNumber()));
      expect(Math.abs(df(point) - first.toNumber())).toBeLessThan(
        2e-12 * Math.max(1, first.abs().toNumber()),
      );
      expect(Math.abs(d2f(point) - second.toNumber())).toBeLessThan(
        2e-12 * Math.max(1, second.abs().toNumber()),
      );
    }
  });

  it('differentiates random equations like central differences, wherever those settle', () => {
    const place = fc.integer({ min: -3000, max: 3000 }).map((value) => String(value / 1009));
    let settled = 0;
    fc.assert(
      fc.property(anyTree, place, (tree, x) => {
        const equation: Equation = { text: 'random', tree, variables: ['x'], parameters: ['a'] };
        const compiled = compileDecimal(equation, { a: '0.7' }, 70);
        const { value, first, second } = compiled(x);
        const all = [value, first, second];
        if (all.some((each) => each.isNaN() || each.abs().gt(1e6))) return;
        const f = (at: Decimal) => compiled(at).value;
        const origin = compileDecimal(parseEquation('x'), {}, 70)(x).value;
        const [coarse, fine] = ['1e-15', '1e-17'].map((h) => differences(f, origin, origin.times(0).plus(h)));
        // Near a kink, a jump or a steep place the two steps disagree, and differences say nothing.
        if (!(gap(coarse!.first, fine!.first) < 1e-15 && gap(coarse!.second, fine!.second) < 1e-15)) return;
        settled += 1;
        expect(gap(fine!.first, first)).toBeLessThan(1e-12);
        expect(gap(fine!.second, second)).toBeLessThan(1e-12);
      }),
      { numRuns: 200, seed: 5 },
    );
    expect(settled).toBeGreaterThan(60);
  });

  it('differentiates by the variable that is asked for', () => {
    const equation = parseEquation('x^2 * y + y^3', [], ['x', 'y']);
    const arithmetic = doubleArithmetic({});
    const at = (by: number) =>
      runProgram(buildProgram(equation, arithmetic, [0, 1, 2], by), arithmetic, [2, 5]);
    expect(at(0)).toEqual([145, 20, 10]);
    expect(at(1)).toEqual([145, 79, 30]);
  });
});
