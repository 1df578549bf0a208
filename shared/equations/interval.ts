import type { Decimal } from 'decimal.js';
import type { Arithmetic } from './arithmetic.ts';
import { requireDigits } from './decimal.ts';
import { readParameter, simpleDecimalExponent } from './decimal-arithmetic.ts';
import { buildProgram } from './derive.ts';
import { requireOneVariable } from './double.ts';
import { type Interval, Intervals } from './interval-functions.ts';
import { runProgram } from './program.ts';
import type { Equation, Relation } from './tree.ts';

export type { Interval };

/** Enclosures of f and of f' over an interval; null where one is not defined or not decided. */
export interface IntervalValues {
  value: Interval | null;
  derivative: Interval | null;
}

/**
 * Makes enclosures of f and f' over intervals, for many intervals.
 *
 * Interval arithmetic with outward rounding (Moore, Kearfott and Cloud, Introduction to Interval Analysis,
 * SIAM 2009; cited from memory); f' by the rules of derive.ts in the same arithmetic. An undecided condition
 * gives the hull of both branches for the value and null for the derivative, since f may jump. At the kinks of
 * abs, min and max the derivative is the hull of both slopes (a generalised derivative: the mean value theorem
 * holds with it, so an interval Newton step does too). A divisor that contains 0, or an argument that leaves the
 * domain of a function anywhere in the interval, gives null.
 *
 * @param digits precision of the ends, 1 to 400
 * @throws RangeError for digits out of range, a parameter without a decimal value, not exactly one variable, or
 * ends that are not in order
 */
export function compileInterval(
  equation: Equation,
  parameters: Readonly<Record<string, string>>,
  digits: number,
): (low: Decimal | string, high: Decimal | string) => IntervalValues {
  requireOneVariable(equation);
  requireDigits(digits);
  const intervals = new Intervals(digits);
  const arithmetic = intervalArithmetic(intervals, parameters);
  const program = buildProgram(equation, arithmetic, [0, 1]);
  return (low, high) => {
    const [from, to] = [new intervals.Down(low), new intervals.Up(high)];
    if (!from.lte(to)) throw new RangeError('the low end lies above the high end');
    const [value, derivative] = runProgram(program, arithmetic, [intervals.checked(from, to)]);
    // Where the value is open, as across the cut of atan2, f may jump, whatever the formal derivative says.
    return { value: value ?? null, derivative: value ? (derivative ?? null) : null };
  };
}

/** Enclosures of f and f' over one interval: see `compileInterval`. */
export function evaluateInterval(
  equation: Equation,
  parameters: Readonly<Record<string, string>>,
  low: Decimal | string,
  high: Decimal | string,
  digits: number,
): IntervalValues {
  return compileInterval(equation, parameters, digits)(low, high);
}

/** true or false only where every pair of values from the two intervals agrees on it. */
function compareIntervals(relation: Relation, a: Interval, b: Interval): boolean | undefined {
  switch (relation) {
    case '<':
      return a.high.lt(b.low) ? true : a.low.gte(b.high) ? false : undefined;
    case '<=':
      return a.high.lte(b.low) ? true : a.low.gt(b.high) ? false : undefined;
    case '>':
      return compareIntervals('<', b, a);
    case '>=':
      return compareIntervals('<=', b, a);
    case '==':
      if (a.high.lt(b.low) || a.low.gt(b.high)) return false;
      return a.low.eq(a.high) && b.low.eq(b.high) ? true : undefined;
    case '!=': {
      const isEqual = compareIntervals('==', a, b);
      return isEqual === undefined ? undefined : !isEqual;
    }
  }
}

function intervalArithmetic(
  intervals: Intervals,
  parameters: Readonly<Record<string, string>>,
): Arithmetic<Interval | null> {
  const point = (value: Decimal) => intervals.point(value);
  return {
    number: (text) => point(new intervals.Down(text)),
    constant: (name) => {
      const value = intervals.functions.constant(name);
      return intervals.widen(value, value);
    },
    parameter: (name) => point(readParameter(intervals.Down, parameters, name)),
    undefinedValue: null,
    isUndefined: (value) => value === null,
    negate: (a) => a && { low: a.high.negated(), high: a.low.negated() },
    add: (a, b) => a && b && intervals.add(a, b),
    subtract: (a, b) => a && b && intervals.subtract(a, b),
    multiply: (a, b) => a && b && intervals.multiply(a, b),
    divide: (a, b) => a && b && intervals.divide(a, b),
    power: (a, b) => a && b && intervals.power(a, b),
    integerPower: (a, exponent) => {
      const raise = (value: Decimal) => intervals.functions.integerPower(value, exponent);
      return a && intervals.integerPower(a, raise, exponent < 0);
    },
    call: (name, a, b) => (a === null || b === null ? null : intervals.call(name, a, b)),
    gate: (test, a, b) => {
      if (a === null) return null;
      return (test === 'notNegative' ? a.low.gte(0) : !intervals.contains(a, 0)) ? b : null;
    },
    pick: (a, b, whenLess, whenGreater) => {
      if (a === null || b === null) return null;
      if (a.high.lt(b.low)) return whenLess;
      if (a.low.gt(b.high)) return whenGreater;
      return whenLess && whenGreater && intervals.hull(whenLess, whenGreater);
    },
    compare: (relation, a, b) => (a && b ? compareIntervals(relation, a, b) : undefined),
    hull: (a, b) => a && b && intervals.hull(a, b),
    simpleExponent: (value) => {
      return value?.low.eq(value.high) ? simpleDecimalExponent(value.low) : null;
    },
  };
}
