import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildProgram } from '../../../shared/equations/derive.ts';
import { compileDouble } from '../../../shared/equations/double.ts';
import { doubleArithmetic } from '../../../shared/equations/double-arithmetic.ts';
import { doubleFunctions } from '../../../shared/equations/double-functions.ts';
import { generateSource } from '../../../shared/equations/double-source.ts';
import { functionTable } from '../../../shared/equations/functions.ts';
import { interpretDouble } from '../../../shared/equations/interpret.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import type { Equation } from '../../../shared/equations/tree.ts';
import { anyTree } from './random-tree.ts';

const compile = (text: string, parameters: Record<string, number> = {}) =>
  compileDouble(parseEquation(text, Object.keys(parameters)), parameters);

const points = [
  -800,
  -8,
  -2.3,
  -1,
  -0.5,
  -1e-9,
  -0,
  0,
  5e-324,
  1e-9,
  0.3,
  0.5,
  1,
  1.7,
  2,
  3,
  20,
  800,
  1e200,
  NaN,
];

describe('compileDouble', () => {
  it('evaluates an equation with its parameters', () => {
    const { f, df, d2f } = compile('a*x^n - b', { a: 2, n: 3, b: -0.5 });
    expect([f(2), df(2), d2f(2)]).toEqual([16.5, 24, 24]);
  });

  it('takes hundreds of parameters', () => {
    const parameters = Object.fromEntries(Array.from({ length: 150 }, (_, index) => [`p${index}`, index]));
    const text = Object.keys(parameters)
      .map((name) => `${name}*x`)
      .join('+');
    expect(compile(text, parameters).f(2)).toBe(150 * 149);
  });

  it('refuses a missing or non-finite parameter, also one that objects inherit, and a system', () => {
    const equation = parseEquation('a*x', ['a']);
    expect(() => compileDouble(equation, {})).toThrow(RangeError);
    expect(() => compileDouble(equation, { a: Infinity })).toThrow(RangeError);
    expect(() => compileDouble(parseEquation('constructor*x', ['constructor']), {})).toThrow(RangeError);
    expect(() => compileDouble(parseEquation('x*y', [], ['x', 'y']))).toThrow(RangeError);
  });

  it('is real-valued: undefined outside the domain, with derivatives undefined there too', () => {
    const outside: [string, number][] = [
      ['log(x)', -1],
      ['log2(x)', -1],
      ['log10(x)', -1],
      ['log1p(x)', -2],
      ['sqrt(x)', -1],
      ['asin(x)', 1.5],
      ['acos(x)', -1.5],
      ['acosh(x)', -2],
      ['acosh(x)', 0.5],
      ['atanh(x)', 2],
      ['x^0.5', -4],
      ['x^1.5', -4],
      ['x^(1/3)', -8],
      ['x^x', -1.5],
      ['x + log(-2)', 1],
      ['x + (-8)^(1/3)', 1],
    ];
    for (const [text, x] of outside) {
      const { f, df, d2f } = compile(text);
      expect([f(x), df(x), d2f(x)], `${text} at ${x}`).toEqual([NaN, NaN, NaN]);
    }
  });

  it('has real cube roots with real derivatives below 0', () => {
    const { f, df, d2f } = compile('cbrt(x)');
    // f' = x^(-2/3) / 3 = 1/12 and f'' = -2 x^(-5/3) / 9 = 1/144 at x = -8.
    expect(f(-8)).toBe(-2);
    expect(df(-8)).toBeCloseTo(1 / 12, 15);
    expect(d2f(-8)).toBeCloseTo(1 / 144, 15);
  });

  it('gives exact derivatives of whole powers at 0 and at negative bases', () => {
    const square = compile('x^2');
    expect([square.f(0), square.df(0), square.d2f(0)]).toEqual([0, 0, 2]);
    const cube = compile('x^3');
    expect([cube.f(-2), cube.df(-2), cube.d2f(-2)]).toEqual([-8, 12, -12]);
    const inverse = compile('x^-2');
    expect([inverse.f(-2), inverse.df(-2), inverse.d2f(-2)]).toEqual([0.25, 0.25, 0.375]);
    const high = compile('x^100');
    expect([high.f(-1), high.df(-1), high.d2f(-1)]).toEqual([1, -100, 9900]);
    const fixed = compile('x^n', { n: 1 });
    expect([fixed.f(-2), fixed.df(-2), fixed.d2f(-2)]).toEqual([-2, 1, 0]);
    expect(compile('x^0').f(0)).toBe(1);
  });

  it('takes the mean of both slopes at a kink and none at a jump', () => {
    const size = compile('abs(x)');
    expect([size.df(-3), size.df(0), size.df(3)]).toEqual([-1, 0, 1]);
    expect(compile('x*abs(x)').df(0)).toBe(0);
    expect(compile('max(x, 3*x)').df(0)).toBe(2);
    expect(compile('min(x, 3*x)').df(-1)).toBe(3);
    const sign = compile('sign(x)');
    expect([sign.f(-3), sign.f(0), sign.f(3), sign.df(3), sign.df(0)]).toEqual([-1, 0, 1, 0, NaN]);
  });

  it('evaluates only the branch that holds, and differentiates it', () => {
    const { f, df, d2f } = compile('x < 0 ? x^2 : x < 1 ? 2*x : sqrt(x)');
    expect([f(-3), df(-3), d2f(-3)]).toEqual([9, -6, 2]);
    expect([f(0), df(0), d2f(0)]).toEqual([0, 2, 0]);
    expect([f(4), df(4), d2f(4)]).toEqual([2, 0.25, -1 / 32]);
  });

  it('treats a relation with an undefined side as false', () => {
    expect(compile('log(x) < 0 ? 1 : 2').f(-1)).toBe(2);
    expect(compile('log(x) != 0 ? 1 : 2').f(-1)).toBe(1);
    expect(compile('x > 0 and not (x >= 2) or x == -1 ? 1 : 0').f(-1)).toBe(1);
  });

  it('multiplies whole powers by one fixed rule', () => {
    const x = 1.1;
    const square = x * x;
    const fourth = square * square;
    const eighth = fourth * fourth;
    expect(compile('x^3').f(x)).toBe(square * x);
    expect(compile('x^4').f(x)).toBe(fourth);
    expect(compile('x^6').f(x)).toBe(square * x * (square * x));
    expect(compile('x^9').f(x)).toBe(eighth * x);
    expect(compile('x^-3').f(x)).toBe(1 / (square * x));
    expect(compile('x^64').f(x)).toBe(((eighth ** 2) ** 2) ** 2);
  });

  it('turns x^0.5 into sqrt, e^x into exp and other powers into pow', () => {
    expect(compile('x^0.5').f(3)).toBe(Math.sqrt(3));
    expect(compile('e^x').f(3.3)).toBe(doubleFunctions.exp(3.3, 0));
    expect(compile('x^65').f(1.1)).toBe(doubleFunctions.pow(1.1, 65));
    expect(compile('x^(1/3)').f(1.1)).toBe(doubleFunctions.pow(1.1, 1 / 3));
    expect(compile('2^x').f(1.1)).toBe(doubleFunctions.pow(2, 1.1));
  });

  it('puts nothing of the user into the generated code', () => {
    const equation = parseEquation(
      'secret_name * x + 0.1000 + max(x, other)',
      ['secret_name', 'other'],
      ['x'],
    );
    const arithmetic = doubleArithmetic({ secret_name: 1.5, other: -2 });
    const { source } = generateSource(buildProgram(equation, arithmetic, [0, 1, 2]));
    expect(source).not.toMatch(/secret|other|1000|\bx\b/);
    const words = new Set(source.match(/[a-zA-Z]\w*/g));
    const allowed = /^(use|strict|return|function|const|let|if|else|NaN|Infinity|t\d+(_\d+)?|e\d*)$/;
    const unknown = [...words].filter((word) => !allowed.test(word) && !(word in doubleFunctions));
    expect(unknown).toEqual([]);
  });

  it('does not compute a second derivative for the first, nor the value where it is not needed', () => {
    const equation = parseEquation('sin(x) + exp(x^2)');
    const arithmetic = doubleArithmetic({});
    expect(generateSource(buildProgram(equation, arithmetic, [0])).functions).toEqual(['sin', 'exp']);
    expect(generateSource(buildProgram(equation, arithmetic, [1])).functions).toEqual(['cos', 'exp']);
    const lines = (order: 0 | 1 | 2) =>
      generateSource(buildProgram(equation, arithmetic, [order])).source.split('\n').length;
    expect(lines(1)).toBeLessThan(lines(2));
  });
});

describe('interpretDouble', () => {
  const same = (equation: Equation, parameters: Record<string, number>, arguments_: readonly number[]) => {
    const generated = compileDouble(equation, parameters);
    const interpreted = interpretDouble(equation, parameters);
    let compared = 0;
    for (const x of arguments_) {
      for (const kind of ['f', 'df', 'd2f'] as const) {
        const [found, wanted] = [interpreted[kind](x), generated[kind](x)];
        // Asserting each of some hundred thousand pairs would take longer than computing them.
        if (!Object.is(found, wanted)) expect(found, `${equation.text} ${kind} at ${x}`).toBe(wanted);
        compared += 1;
      }
    }
    expect(compared).toBe(3 * arguments_.length);
  };

  it('gives the same bits as the generated code for every function', () => {
    for (const entry of functionTable) {
      const list = entry.arguments.length === 2 ? '1.5*x - 1, x^2' : '1.5*x - 1';
      same(parseEquation(`x * ${entry.name}(${list})`), {}, points);
    }
  });

  it('gives the same bits as the generated code for every whole power', () => {
    for (let exponent = -66; exponent <= 66; exponent++)
      same(parseEquation('x^n', ['n']), { n: exponent }, points);
  });

  it('gives the same bits as the generated code for random equations', () => {
    fc.assert(
      fc.property(anyTree, fc.double({ min: -5, max: 5 }), (tree, a) => {
        same({ text: 'random', tree, variables: ['x'], parameters: ['a'] }, { a }, points);
      }),
      { numRuns: 600, seed: 3 },
    );
  });
});
