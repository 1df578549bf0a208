import type { Decimal } from 'decimal.js';
import { compileDecimal, type DecimalValues } from './decimal.ts';
import { compileInterval, type IntervalValues } from './interval.ts';
import type { Equation } from './tree.ts';

/** Most digits that the decimal evaluators carry. */
export const mostDigits = 400;

/** An equation with the exact decimal values of its parameters: one function of x, at any precision. */
export interface Problem {
  readonly equation: Equation;
  readonly parameters: Readonly<Record<string, string>>;
  /** f, f′ and f″ in decimals; what is made for one precision is kept. */
  decimal(digits: number): (x: Decimal) => DecimalValues;
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

export function problemOf(equation: Equation, parameters: Readonly<Record<string, string>>): Problem {
  return {
    equation,
    parameters,
    decimal: kept((digits) => compileDecimal(equation, parameters, digits)),
    interval: kept((digits) => compileInterval(equation, parameters, digits)),
  };
}
