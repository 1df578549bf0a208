import type { Decimal } from 'decimal.js';
import { decimalArithmetic } from './decimal-arithmetic.ts';
import { decimalFunctions, largestPrecision } from './decimal-functions.ts';
import { buildProgram } from './derive.ts';
import { requireOneVariable } from './double.ts';
import { runProgram } from './program.ts';
import type { Equation } from './tree.ts';

/** Value, first and second derivative; NaN where the equation is not defined there or out of range. */
export interface DecimalValues {
  value: Decimal;
  first: Decimal;
  second: Decimal;
}

/** Digits carried beyond those asked for, against the rounding of the steps on the way. */
const guardDigits = 10;

/**
 * Makes f, f' and f'' in decimals, for many points.
 *
 * The exact decimal texts of the equation and its parameters define the function; nothing passes through
 * binary64. Derivatives by the rules in derive.ts.
 *
 * @param digits significant digits of the working precision, 1 to 400
 * @throws RangeError for digits out of range, a parameter without a decimal value, not exactly one variable
 * Accuracy: each step has a relative error below 10^(-digits - 6); where terms cancel, as near a root, digits are
 * lost in proportion. For a guaranteed enclosure use evaluateInterval. Never throws for a point, never hangs.
 */
export function compileDecimal(
  equation: Equation,
  parameters: Readonly<Record<string, string>>,
  digits: number,
): (x: Decimal | string) => DecimalValues {
  requireOneVariable(equation);
  requireDigits(digits);
  const functions = decimalFunctions(digits + guardDigits);
  const arithmetic = decimalArithmetic(functions, parameters);
  const program = buildProgram(equation, arithmetic, [0, 1, 2]);
  return (x) => {
    const [value, first, second] = runProgram(program, arithmetic, [
      functions.checked(new functions.Number(x)),
    ]);
    return { value: value!, first: first!, second: second! };
  };
}

/** f, f' and f'' at one point: see `compileDecimal`. */
export function evaluateDecimal(
  equation: Equation,
  parameters: Readonly<Record<string, string>>,
  x: Decimal | string,
  digits: number,
): DecimalValues {
  return compileDecimal(equation, parameters, digits)(x);
}

/** Throws RangeError unless `digits` is a whole number from 1 to 400. */
export function requireDigits(digits: number): void {
  if (!Number.isInteger(digits) || digits < 1 || digits > largestPrecision) {
    throw new RangeError(`digits is a whole number from 1 to ${largestPrecision}`);
  }
}
