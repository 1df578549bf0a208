import type { FunctionName } from './functions.ts';
import type { Relation } from './tree.ts';

/** Named constants of equations and of their derivatives. */
export type ProgramConstant = 'pi' | 'e' | 'ln2' | 'ln10' | 'twoOverSqrtPi';

/** Functions that a program calls, with one argument or (atan2, hypot, min, max) two. */
export type CallName = Exclude<FunctionName, 'pow'>;

/** Operations on values. The number of operands follows from the kind; only calls differ by name. */
export type Operation =
  | { kind: 'negate' | 'add' | 'subtract' | 'multiply' | 'divide' | 'power' }
  /** a^n for a whole n other than 0 and 1. */
  | { kind: 'integerPower'; exponent: number }
  | { kind: 'call'; name: CallName }
  /** (a, b): b where a >= 0 (or a != 0), undefined elsewhere; keeps derivatives inside the domain. */
  | { kind: 'gate'; test: 'notNegative' | 'notZero' }
  /** (a, b, c, d): c where a < b, d where a > b, the mean of c and d where a = b: slopes of min, max, abs. */
  | { kind: 'pick' };

/** One kind of numbers (binary64, decimals, intervals) as the programs of equations need it. */
export interface Arithmetic<Value> {
  number(text: string): Value;
  constant(name: ProgramConstant): Value;
  parameter(name: string): Value;
  /** One value for “not defined”. */
  readonly undefinedValue: Value;
  isUndefined(value: Value): boolean;
  negate(a: Value): Value;
  add(a: Value, b: Value): Value;
  subtract(a: Value, b: Value): Value;
  multiply(a: Value, b: Value): Value;
  divide(a: Value, b: Value): Value;
  power(a: Value, b: Value): Value;
  integerPower(a: Value, exponent: number): Value;
  call(name: CallName, a: Value, b: Value | undefined): Value;
  gate(test: 'notNegative' | 'notZero', a: Value, b: Value): Value;
  pick(a: Value, b: Value, whenLess: Value, whenGreater: Value): Value;
  /** undefined where the values do not decide it. */
  compare(relation: Relation, a: Value, b: Value): boolean | undefined;
  /** A value that covers both, where a condition is undecided. */
  hull(a: Value, b: Value): Value;
  /** The exact value where it is a whole number of magnitude at most 64, or one half; otherwise null. */
  simpleExponent(value: Value): number | null;
}

/** Largest whole exponent that is evaluated by multiplications instead of the general power. */
export const largestMultipliedExponent = 64;

/** `simpleExponent` of a binary64 number. */
export function simpleExponentOf(value: number): number | null {
  const isSmallWhole = Number.isInteger(value) && Math.abs(value) <= largestMultipliedExponent;
  return isSmallWhole || value === 0.5 ? value + 0 : null;
}

/** Applies one operation to its operands. */
export function applyOperation<Value>(
  arithmetic: Arithmetic<Value>,
  operation: Operation,
  operands: readonly Value[],
): Value {
  const a = operands[0]!;
  const b = operands[1]!;
  switch (operation.kind) {
    case 'negate':
      return arithmetic.negate(a);
    case 'add':
      return arithmetic.add(a, b);
    case 'subtract':
      return arithmetic.subtract(a, b);
    case 'multiply':
      return arithmetic.multiply(a, b);
    case 'divide':
      return arithmetic.divide(a, b);
    case 'power':
      return arithmetic.power(a, b);
    case 'integerPower':
      return arithmetic.integerPower(a, operation.exponent);
    case 'call':
      return arithmetic.call(operation.name, a, operands[1]);
    case 'gate':
      return arithmetic.gate(operation.test, a, b);
    case 'pick':
      return arithmetic.pick(a, b, operands[2]!, operands[3]!);
  }
}
