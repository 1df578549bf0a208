import { type Arithmetic, type ProgramConstant, simpleExponentOf } from './arithmetic.ts';
import { doubleFunctions, integerPower, pickDouble } from './double-functions.ts';
import type { Relation } from './tree.ts';

/** The nearest binary64 numbers; twoOverSqrtPi is 2 / sqrt(pi) = 1.1283791670955125738961589031215451… */
const constants: Readonly<Record<ProgramConstant, number>> = {
  pi: Math.PI,
  e: Math.E,
  ln2: Math.LN2,
  ln10: Math.LN10,
  twoOverSqrtPi: 1.1283791670955126,
};

/** Compares as IEEE 754 does: with NaN every relation but != is false. */
export function compareDoubles(relation: Relation, a: number, b: number): boolean {
  switch (relation) {
    case '<':
      return a < b;
    case '<=':
      return a <= b;
    case '>':
      return a > b;
    case '>=':
      return a >= b;
    case '==':
      return a === b;
    case '!=':
      return a !== b;
  }
}

/** Binary64 as an arithmetic of programs. Throws RangeError for a parameter without a finite value. */
export function doubleArithmetic(parameters: Readonly<Record<string, number>>): Arithmetic<number> {
  return {
    number: Number,
    constant: (name) => constants[name],
    parameter: (name) => {
      const value = Object.hasOwn(parameters, name) ? parameters[name] : undefined;
      if (value === undefined || !Number.isFinite(value)) {
        throw new RangeError(`parameter ${name} has no finite value`);
      }
      return value;
    },
    undefinedValue: Number.NaN,
    isUndefined: Number.isNaN,
    negate: (a) => -a,
    add: (a, b) => a + b,
    subtract: (a, b) => a - b,
    multiply: (a, b) => a * b,
    divide: (a, b) => a / b,
    power: doubleFunctions.pow,
    integerPower,
    call: (name, a, b) => (b === undefined ? doubleFunctions[name](a, 0) : doubleFunctions[name](a, b)),
    gate: (test, a, b) => ((test === 'notNegative' ? a >= 0 : a < 0 || a > 0) ? b : Number.NaN),
    pick: pickDouble,
    compare: compareDoubles,
    hull: () => Number.NaN,
    simpleExponent: simpleExponentOf,
  };
}
