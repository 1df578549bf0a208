import type { Decimal } from 'decimal.js';
import { compileDecimal, type DecimalValues } from './decimal.ts';
import { decimalArithmetic } from './decimal-arithmetic.ts';
import { decimalFunctions } from './decimal-functions.ts';
import { buildProgram } from './derive.ts';
import { compileInterval, type IntervalValues } from './interval.ts';
import { runProgram } from './program.ts';
import type { Equation } from './tree.ts';

/** Most digits that the decimal evaluators carry. */
export const mostDigits = 400;
/** Carried beyond the digits asked for, as in compileDecimal. */
const guardDigits = 10;

/** An equation with the exact decimal values of its parameters: one function of x, at any precision. */
export interface Problem {
  readonly equation: Equation;
  readonly parameters: Readonly<Record<string, string>>;
  /** f, f′ and f″ in decimals; what is made for one precision is kept. */
  decimal(digits: number): (x: Decimal) => DecimalValues;
  /** f alone, which costs a fraction of all three where powers are slow; likewise. */
  value(digits: number): (x: Decimal) => Decimal;
  /** Enclosures of f and f′; likewise. */
  interval(digits: number): (low: Decimal, high: Decimal) => IntervalValues;
}

function kept<Made>(make: (digits: number) => Made): (digits: number) => Made {
  const made = new Map<number, Made>();
  return (digits) => {
    const known = made.get(digits);
    if (known !== undefined) return known;
    const fresh = make(Math.min(digits, mostDigits));
    made.set(digits, fresh);
    return fresh;
  };
}

/** As compileDecimal, without derivatives. */
function compileValue(
  problem: Pick<Problem, 'equation' | 'parameters'>,
  digits: number,
): (x: Decimal) => Decimal {
  const functions = decimalFunctions(digits + guardDigits);
  const arithmetic = decimalArithmetic(functions, problem.parameters);
  const program = buildProgram(problem.equation, arithmetic, [0]);
  return (x) => {
    const [value] = runProgram(program, arithmetic, [functions.checked(new functions.Number(x))]);
    return value ?? arithmetic.undefinedValue;
  };
}

export function problemOf(equation: Equation, parameters: Readonly<Record<string, string>>): Problem {
  return {
    equation,
    parameters,
    decimal: kept((digits) => compileDecimal(equation, parameters, digits)),
    value: kept((digits) => compileValue({ equation, parameters }, digits)),
    interval: kept((digits) => compileInterval(equation, parameters, digits)),
  };
}
