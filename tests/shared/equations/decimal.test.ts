import { Decimal } from 'decimal.js';
import { describe, expect, it } from 'vitest';
import { compileDecimal, evaluateDecimal } from '../../../shared/equations/decimal.ts';
import { decimalFunctions } from '../../../shared/equations/decimal-functions.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { decimalReference } from './decimal-reference.ts';

const evaluate = (text: string, x: string, digits = 50, parameters: Record<string, string> = {}) =>
  evaluateDecimal(parseEquation(text, Object.keys(parameters)), parameters, x, digits);

const Wide = Decimal.clone({ defaults: true, precision: 120 });

/** Relative difference of two decimals. */
function relative(found: Decimal, wanted: Decimal | string): number {
  const truth = new Wide(wanted);
  return truth.isZero() ? found.abs().toNumber() : new Wide(found).minus(truth).div(truth).abs().toNumber();
}

describe('evaluateDecimal', () => {
  it.each(decimalReference)('gives %s at %s to 50 digits', (text, x, wanted) => {
    // The reference is rounded to 50 digits: half a unit there is 5e-50 of a number starting with 1.
    expect(relative(evaluate(text, x).value, wanted)).toBeLessThan(5.1e-50);
  });

  it.each([20, 100, 400])('keeps its accuracy at %i digits', (digits) => {
    for (const [text, x] of decimalReference) {
      if (digits === 400 && !/exp|sin|erf|log1p|asinh/.test(text)) continue;
      const [low, high] = [
        evaluate(text, x, digits).value,
        evaluate(text, x, Math.min(digits + 20, 400)).value,
      ];
      if (digits < 400) {
        const Wider = Decimal.clone({ defaults: true, precision: digits + 60 });
        const gap = new Wider(low).minus(high).abs().div(high.abs());
        expect(gap.lt(`1e-${digits + 6}`), `${text} at ${x}`).toBe(true);
      } else expect(relative(low, evaluate(text, x, 80).value), `${text} at ${x}`).toBeLessThan(1e-85);
    }
  });

  it('reads constants and parameters as exact decimals', () => {
    expect(evaluate('0.1 + 0.2 - 0.3', '0').value.isZero()).toBe(true);
    expect(evaluate('a*x', '3', 50, { a: '0.1' }).value.toString()).toBe('0.3');
    expect(evaluate('x', '0.1').value.toString()).toBe('0.1');
  });

  it('gives derivatives by the same rules', () => {
    // f = x^3 - a x: f' = 3 x^2 - a, f'' = 6 x.
    const { first, second } = evaluate('x^3 - a*x', '1.1', 40, { a: '0.3' });
    expect([first.toString(), second.toString()]).toEqual(['3.33', '6.6']);
    expect(evaluate('cbrt(x)', '-8').first.times(12).toNumber()).toBeCloseTo(1, 15);
    expect(evaluate('x^2', '0').second.toNumber()).toBe(2);
  });

  it('says NaN outside the domain and at poles', () => {
    for (const [text, x] of [
      ['log(x)', '0'],
      ['sqrt(x)', '-1'],
      ['1/x', '0'],
      ['x^-2', '0'],
      ['x^(1/3)', '-8'],
      ['asin(x)', '1.01'],
      ['acosh(x)', '0.99'],
      ['atanh(x)', '1'],
      ['atan2(x, x)', '0'],
    ] as const) {
      expect(evaluate(text, x).value.isNaN(), text).toBe(true);
    }
    expect(evaluate('log(x)', '-1').first.isNaN()).toBe(true);
  });

  it('decides that a general power of a negative base is real only for a whole exponent', () => {
    expect(evaluate('x^n', '-1.01', 50, { n: '65' }).value.isNegative()).toBe(true);
    expect(evaluate('x^n', '-1.01', 50, { n: '1000' }).value.isPositive()).toBe(true);
    expect(evaluate('x^n', '-1.01', 50, { n: '10000000' }).value.isPositive()).toBe(true);
    expect(evaluate('x^n', '-1.01', 50, { n: '10000001' }).value.isNegative()).toBe(true);
    expect(evaluate('x^n', '-1.01', 50, { n: '70000000.5' }).value.isNaN()).toBe(true);
  });

  it.each([
    '9^9^9^9^9*x',
    'exp(exp(exp(exp(x))))',
    'sin(1e300^9*x)',
    'sin(exp(exp(x^2)))',
    'x^x^x^x^x^x^x',
    'cosh(exp(x^3))',
    'sinh(1e300*x)',
    'tanh(1e-300*x) + tanh(1e300*x)',
    'asinh(exp(exp(x)))',
    '(1e308^64)^64*x',
    'x^1e300 + x^-1e300',
    'expm1(1e-300*x)',
    'log1p(1e-300*x)',
    'log2(exp(exp(2*x))) - log10(exp(exp(2*x)))',
    'erf(1e300*x) + erf(1e-300*x)',
    'hypot(exp(x^4), exp(exp(x)))',
    `${'exp('.repeat(60)}x${')'.repeat(60)}`,
  ])('comes back from %s', (text) => {
    const compiled = compileDecimal(parseEquation(text), {}, 100);
    for (const x of ['3', '12', '-5.5', '1e100', `0.${'3'.repeat(380)}`]) {
      const { value } = compiled(x);
      expect(value.isNaN() || Math.abs(value.e) <= 1e9).toBe(true);
    }
  });

  it('leaves the settings of decimal.js as they were, also after refusing', () => {
    const before = [Decimal.precision, Decimal.rounding];
    evaluate('sin(1e300*x)', '1', 400);
    evaluate('sin(exp(exp(9*x)))', '1', 200);
    expect([Decimal.precision, Decimal.rounding]).toEqual(before);
    expect(new Decimal(1).div(3).toString()).toBe('0.33333333333333333333');
    expect(decimalFunctions(60).Number.precision).toBe(60);
  });

  it('throws RangeError for digits out of range and for parameters that are no decimal numbers', () => {
    const equation = parseEquation('a*x', ['a']);
    for (const digits of [0, 401, 1.5, NaN]) {
      expect(() => evaluateDecimal(equation, { a: '1' }, '1', digits)).toThrow(RangeError);
    }
    for (const a of ['0x10', 'NaN', 'Infinity', '', '1e9999999999999999', '1,5']) {
      expect(() => evaluateDecimal(equation, { a }, '1', 20), a).toThrow(RangeError);
    }
    expect(() => evaluateDecimal(equation, {}, '1', 20)).toThrow(RangeError);
  });
});
