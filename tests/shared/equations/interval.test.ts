import { Decimal } from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compileDecimal } from '../../../shared/equations/decimal.ts';
import { functionTable } from '../../../shared/equations/functions.ts';
import { compileInterval, evaluateInterval, type Interval } from '../../../shared/equations/interval.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import type { Equation } from '../../../shared/equations/tree.ts';
import { decimalReference } from './decimal-reference.ts';
import { anyTree } from './random-tree.ts';

const over = (
  text: string,
  low: string,
  high: string,
  digits = 30,
  parameters: Record<string, string> = {},
) => evaluateInterval(parseEquation(text, Object.keys(parameters)), parameters, low, high, digits);

const numbers = (interval: Interval | null) =>
  interval && [interval.low.toNumber() + 0, interval.high.toNumber() + 0];

/** Whether the enclosures over [low, high] hold f and f' at points in it, computed with many more digits. */
function checkHolds(
  equation: Equation,
  parameters: Record<string, string>,
  low: Decimal,
  high: Decimal,
): void {
  const { value, derivative } = compileInterval(equation, parameters, 25)(low, high);
  if (value === null && derivative === null) return;
  const exact = compileDecimal(equation, parameters, 70);
  for (const share of [0, 0.4, 1]) {
    const x = low.plus(high.minus(low).times(share));
    const truth = exact(x);
    const label = `${equation.text} at ${x} in [${low}, ${high}]`;
    if (value) expect(truth.value.gte(value.low) && truth.value.lte(value.high), `f: ${label}`).toBe(true);
    if (derivative) {
      expect(truth.first.gte(derivative.low) && truth.first.lte(derivative.high), `f': ${label}`).toBe(true);
    }
  }
}

const Wide = Decimal.clone({ defaults: true, precision: 60 });

describe('evaluateInterval', () => {
  it('encloses f and its derivative over an interval', () => {
    const { value, derivative } = over('x^2 - 2', '1.4', '1.5');
    expect(numbers(value)?.[0]).toBeCloseTo(-0.04, 12);
    expect(numbers(value)?.[1]).toBeCloseTo(0.25, 12);
    expect(numbers(derivative)).toEqual([2.8, 3]);
  });

  it('shows a change of sign within 10^-45 of a root', () => {
    // The root of x^3 - 2 x - 5 (Wallis; OEIS A007493, from memory), 2.094551481542326591482386540579302963857…
    // computed to 50 digits with mpmath 1.3.0.
    const root = new Wide('2.0945514815423265914823865405793029638573061056282');
    const below = evaluateInterval(
      parseEquation('x^3-2*x-5'),
      {},
      root.minus('1e-45'),
      root.minus('1e-45'),
      60,
    );
    const above = evaluateInterval(
      parseEquation('x^3-2*x-5'),
      {},
      root.plus('1e-45'),
      root.plus('1e-45'),
      60,
    );
    expect(below.value?.high.isNegative()).toBe(true);
    expect(above.value?.low.isPositive()).toBe(true);
  });

  it('holds every reference value, in an interval of relative width below 10^-37 at 40 digits', () => {
    for (const [text, x, wanted] of decimalReference) {
      const { value } = over(text, x, x, 40);
      const label = `${text} at ${x}`;
      // The reference is rounded to 50 digits, the interval to 40.
      expect(value?.low.lte(wanted) && value.high.gte(wanted), label).toBe(true);
      if (text.startsWith('x^1000')) continue;
      const width = value!.high.minus(value!.low).div(wanted).abs();
      expect(width.lt('1e-37'), label).toBe(true);
    }
  });

  it('moves the ends of every transcendental function outward by more than its rounding', () => {
    for (const [text, x, wanted] of decimalReference) {
      if (!/^\w+\(x\)/.test(text) || text.startsWith('abs')) continue;
      const { value } = over(text, x, x, 20);
      expect(value?.low.lt(wanted) && value.high.gt(wanted), `${text} at ${x}`).toBe(true);
    }
  });

  it('says null where something in the interval is not defined', () => {
    for (const [text, low, high] of [
      ['1/x', '-1', '1'],
      ['1/x', '0', '1'],
      ['x^-2', '-1', '1'],
      ['log(x)', '-0.1', '1'],
      ['log(x)', '0', '1'],
      ['sqrt(x)', '-1', '1'],
      ['asin(x)', '0.9', '1.1'],
      ['acosh(x)', '0.9', '1.1'],
      ['atanh(x)', '0.9', '1'],
      ['tan(x)', '1.5', '1.6'],
      ['x^0.3', '-1', '1'],
      ['x^x', '-1', '1'],
      ['atan2(x, -1)', '-1', '1'],
      ['atan2(x, x)', '-1', '1'],
      ['1 + sqrt(-1)', '1', '2'],
    ] as const) {
      expect(over(text, low, high), text).toEqual({ value: null, derivative: null });
    }
  });

  it('says null for a derivative that has a pole where f has a value', () => {
    expect(over('sqrt(x)', '0', '1').value).not.toBeNull();
    expect(over('sqrt(x)', '0', '1').derivative).toBeNull();
    expect(over('cbrt(x)', '-1', '1').value).not.toBeNull();
    expect(over('cbrt(x)', '-1', '1').derivative).toBeNull();
  });

  it('covers both branches of an undecided condition and gives no derivative', () => {
    const open = over('x < 1 ? x : 5', '0', '2');
    expect(numbers(open.value)).toEqual([0, 5]);
    expect(open.derivative).toBeNull();
    const decided = over('x < 1 ? x : 5', '0', '0.5');
    expect([numbers(decided.value), numbers(decided.derivative)]).toEqual([
      [0, 0.5],
      [1, 1],
    ]);
    expect(over('x < 1 ? x : log(x - 3)', '0', '2').value).toBeNull();
    expect(over('x == 1 ? 2 : 3', '1', '1').value?.high.toNumber()).toBe(2);
    expect(numbers(over('x < 0 and x > 5 ? 2 : 3', '-1', '1').value)).toEqual([3, 3]);
    expect(numbers(over('x < 0 or x >= -1 ? 2 : 3', '-1', '1').value)).toEqual([2, 2]);
  });

  it('gives the hull of both slopes at a kink, and none at a jump', () => {
    expect(numbers(over('abs(x)', '-1', '2').derivative)).toEqual([-1, 1]);
    expect(numbers(over('abs(x)', '-1', '2').value)).toEqual([0, 2]);
    expect(numbers(over('max(x, 3*x)', '-1', '2').derivative)).toEqual([1, 3]);
    expect(numbers(over('sign(x)', '-1', '2').value)).toEqual([-1, 1]);
    expect(over('sign(x)', '-1', '2').derivative).toBeNull();
    expect(numbers(over('sign(x)', '1', '2').derivative)).toEqual([0, 0]);
  });

  it('splits even powers and cosh at 0 and clips waves', () => {
    expect(numbers(over('x^2', '-1', '3').value)?.[0]).toBe(0);
    expect(numbers(over('cosh(x)', '-1', '0.5').value)?.[0]).toBeCloseTo(1, 12);
    expect(numbers(over('sin(x)', '0', '100').value)).toEqual([-1, 1]);
    expect(numbers(over('cos(x)', '-0.1', '0.1').value)?.[1]).toBe(1);
    expect(numbers(over('erf(x)', '9', '30', 20).value)?.[1]).toBe(1);
  });

  it('holds f and its derivative at random points of random intervals for every function', () => {
    let state = 7;
    const random = () => {
      state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
      return state / 2 ** 32;
    };
    for (const entry of functionTable) {
      const list = entry.arguments.length === 2 ? 'x, 1.3*x - 0.7' : 'x';
      const equation = parseEquation(`a * ${entry.name}(${list}) - x`, ['a']);
      for (let round = 0; round < 8; round++) {
        const low = new Wide((random() * 6 - 3).toFixed(9));
        const high = low.plus((random() * 10 ** (-4 * random())).toFixed(9));
        checkHolds(equation, { a: '0.37' }, low, high);
      }
    }
  });

  it('holds f and its derivative at points of random intervals for random equations', () => {
    const place = fc.integer({ min: -40000, max: 40000 }).map((value) => new Wide(value).div(10000));
    const width = fc.constantFrom('0', '1e-20', '1e-6', '0.01', '0.5', '3');
    fc.assert(
      fc.property(anyTree, place, width, (tree, low, size) => {
        const equation = { text: JSON.stringify(tree), tree, variables: ['x'], parameters: ['a'] };
        checkHolds(equation, { a: '1.7' }, low, low.plus(size));
      }),
      { numRuns: 300, seed: 4 },
    );
  });

  it('throws RangeError for ends out of order', () => {
    expect(() => over('x', '2', '1')).toThrow(RangeError);
    expect(() => over('x', 'NaN', '1')).toThrow(RangeError);
  });
});
