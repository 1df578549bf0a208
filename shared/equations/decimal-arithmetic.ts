import type { Decimal } from 'decimal.js';
import { type Arithmetic, simpleExponentOf } from './arithmetic.ts';
import type { DecimalFunctions } from './decimal-functions.ts';
import type { Relation } from './tree.ts';

/** Compares as IEEE 754 does: with NaN every relation but != is false. */
function compareDecimals(relation: Relation, a: Decimal, b: Decimal): boolean {
  switch (relation) {
    case '<':
      return a.lt(b);
    case '<=':
      return a.lte(b);
    case '>':
      return a.gt(b);
    case '>=':
      return a.gte(b);
    case '==':
      return a.eq(b);
    case '!=':
      return !a.eq(b);
  }
}

/** `simpleExponent` of a decimal: the exact value decides, not its nearest binary64 number. */
export function simpleDecimalExponent(value: Decimal): number | null {
  const nearest = value.toNumber();
  return value.eq(nearest) ? simpleExponentOf(nearest) : null;
}

/** Reads the exact decimal text of a parameter. Throws RangeError where it is missing or no decimal number. */
export function readParameter(
  Exact: typeof Decimal,
  parameters: Readonly<Record<string, string>>,
  name: string,
): Decimal {
  const text = Object.hasOwn(parameters, name) ? parameters[name] : undefined;
  if (text === undefined || !/^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/.test(text)) {
    throw new RangeError(`parameter ${name} has no decimal value`);
  }
  const value = new Exact(text);
  if (!value.isFinite() || Math.abs(value.e) > 1e6) throw new RangeError(`parameter ${name} is out of range`);
  return value;
}

/** Decimals as an arithmetic of programs; decimal texts keep their exact value. */
export function decimalArithmetic(
  functions: DecimalFunctions,
  parameters: Readonly<Record<string, string>>,
): Arithmetic<Decimal> {
  const Rounded = functions.Number;
  const check = (value: Decimal) => functions.checked(value);
  const undefinedValue = new Rounded(Number.NaN);
  return {
    number: (text) => new Rounded(text),
    constant: (name) => functions.constant(name),
    parameter: (name) => readParameter(Rounded, parameters, name),
    undefinedValue,
    isUndefined: (value) => value.isNaN(),
    negate: (a) => a.negated(),
    add: (a, b) => check(Rounded.add(a, b)),
    subtract: (a, b) => check(Rounded.sub(a, b)),
    multiply: (a, b) => check(Rounded.mul(a, b)),
    divide: (a, b) => check(Rounded.div(a, b)),
    power: (a, b) => functions.power(a, b),
    integerPower: (a, exponent) => functions.integerPower(a, exponent),
    call: (name, a, b) => functions.call(name, a, b),
    gate: (test, a, b) => ((test === 'notNegative' ? a.gte(0) : a.lt(0) || a.gt(0)) ? b : undefinedValue),
    pick: (a, b, c, d) => {
      if (a.lt(b)) return c;
      if (a.gt(b)) return d;
      return a.eq(b) ? Rounded.add(c, d).div(2) : undefinedValue;
    },
    compare: compareDecimals,
    hull: () => undefinedValue,
    simpleExponent: simpleDecimalExponent,
  };
}
