import { buildProgram, type Order } from './derive.ts';
import { doubleArithmetic } from './double-arithmetic.ts';
import { type DoubleFunction, doubleFunctions } from './double-functions.ts';
import { generateSource } from './double-source.ts';
import type { Equation } from './tree.ts';

/** An equation f(x) ready to be evaluated in binary64, with its first and second derivative. */
export interface CompiledDouble {
  f(x: number): number;
  df(x: number): number;
  d2f(x: number): number;
}

/** Throws RangeError unless the equation has one variable. */
export function requireOneVariable(equation: Equation): void {
  if (equation.variables.length !== 1) throw new RangeError('an equation in one variable was expected');
}

/**
 * Compiles an equation to generated code: the fastest way, for a server or a page without a content policy.
 *
 * Real-valued: NaN outside the domain (log of a negative, (-8)^(1/3)), Infinity at a pole or overflow, cbrt
 * real. The exact value of a decimal constant is rounded to binary64 once. Whole powers up to 64 are
 * multiplications by the rule in double-functions.ts, x^0.5 is sqrt(x), e^x is exp(x), other powers are the
 * port's pow. The text of the user never reaches the generated code: numbers are printed anew, names come from
 * our own table and values are called t0, t1, …
 *
 * @param parameters a finite value for each parameter of the equation
 * @throws RangeError where one is missing, or the equation has not exactly one variable
 * Accuracy: each operation is correctly rounded, each function within the ulps that functions.test.ts states.
 * The same bits as interpret.ts, in every engine.
 */
export function compileDouble(
  equation: Equation,
  parameters: Readonly<Record<string, number>> = {},
): CompiledDouble {
  requireOneVariable(equation);
  return {
    f: compile(equation, parameters, 0),
    df: compile(equation, parameters, 1),
    d2f: compile(equation, parameters, 2),
  };
}

function compile(
  equation: Equation,
  parameters: Readonly<Record<string, number>>,
  order: Order,
): (x: number) => number {
  const { source, functions } = generateSource(buildProgram(equation, doubleArithmetic(parameters), [order]));
  // The source holds digits, operators, t0, t1, … and the names of `functions`; nothing in it comes from a user.
  const make: (...given: DoubleFunction[]) => (x: number) => number = new Function(...functions, source).bind(
    null,
  );
  return make(...functions.map((name) => doubleFunctions[name]));
}
