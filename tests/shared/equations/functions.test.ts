import { describe, expect, it } from 'vitest';
import type { CallName } from '../../../shared/equations/arithmetic.ts';
import { decimalFunctions } from '../../../shared/equations/decimal-functions.ts';
import {
  doubleFunctions,
  integerPower,
  pickDouble,
  ulpBounds,
} from '../../../shared/equations/double-functions.ts';

import { functionTable } from '../../../shared/equations/functions.ts';
import { exactDecimal } from '../../../shared/numerics/root-reference.ts';

/** 45 digits: the reference's own error, below 10^-42, counts for nothing in ulps. */
const decimals = decimalFunctions(45);
const exact = (value: number) => new decimals.Number(exactDecimal(value));

function randomNumbers(seed: number): () => number {
  let state = seed;
  const step = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state;
  };
  return () => ((step() >>> 5) * 2 ** 26 + (step() >>> 6)) / 2 ** 53;
}

const random = randomNumbers(11);
const between = (low: number, high: number) => () => low + (high - low) * random();
/** Either sign, magnitude 10^low to 10^high. */
const spread = (low: number, high: number) => () => (random() < 0.5 ? -1 : 1) * 10 ** between(low, high)();
const positive = (low: number, high: number) => () => 10 ** between(low, high)();

/** Where each function is compared; half of the points each. */
const domains: Record<Exclude<CallName, 'sqrt' | 'abs' | 'sign' | 'min' | 'max'> | 'pow', (() => number)[]> =
  {
    exp: [between(-10, 10), between(-700, 700)],
    expm1: [spread(-10, 0), between(-5, 50)],
    log: [positive(-300, 300), between(0.5, 2)],
    log1p: [spread(-10, -0.01), positive(-1, 10)],
    log2: [positive(-300, 300), between(0.5, 2)],
    log10: [positive(-300, 300), between(0.5, 2)],
    cbrt: [spread(-300, 300), between(-10, 10)],
    sin: [between(-3.2, 3.2), spread(1, 15)],
    cos: [between(-3.2, 3.2), spread(1, 15)],
    tan: [between(-1.57, 1.57), spread(1, 15)],
    asin: [between(-1, 1), spread(-8, -1)],
    acos: [between(-1, 1), () => 1 - 10 ** between(-8, 0)()],
    atan: [between(-5, 5), spread(-8, 8)],
    atan2: [between(-5, 5), spread(-8, 8)],
    sinh: [between(-5, 5), spread(-8, 2.8)],
    cosh: [between(-5, 5), between(-700, 700)],
    tanh: [between(-3, 3), spread(-8, 1.2)],
    asinh: [between(-5, 5), spread(-8, 8)],
    acosh: [between(1, 5), positive(0, 8)],
    atanh: [between(-1, 1), spread(-8, -0.01)],
    hypot: [between(-5, 5), spread(-8, 8)],
    erf: [between(-6, 6), spread(-8, 0.7)],
    pow: [between(0.01, 5), positive(-20, 20)],
  };

/** Distance between neighbouring binary64 numbers at a value. */
function ulpAt(value: number): number {
  const exponent = Math.floor(Math.log2(Math.abs(value)));
  const power = 2 ** exponent <= Math.abs(value) ? exponent : exponent - 1;
  return 2 ** (Math.max(power, -1022) - 52);
}

describe('functionTable', () => {
  it('names every function once, with at least one argument and a meaning', () => {
    const names = functionTable.map((entry) => entry.name);
    expect(new Set(names).size).toBe(names.length);
    expect(Object.keys(doubleFunctions).toSorted()).toEqual(names.toSorted());
    for (const entry of functionTable) {
      expect(entry.arguments.length).toBeGreaterThan(0);
      expect(entry.meaning).not.toBe('');
    }
  });
});

describe('doubleFunctions', () => {
  it.each(Object.entries(domains))('%s stays within its stated ulps of the decimal value', (name, draws) => {
    if (!(name in doubleFunctions)) throw new Error(name);
    const call = Object.entries(doubleFunctions).find(([key]) => key === name)![1];
    const bound = Object.entries(ulpBounds).find(([key]) => key === name)![1];
    const entry = functionTable.find((candidate) => candidate.name === name)!;
    let compared = 0;
    for (const draw of draws) {
      for (let round = 0; round < 50; round++) {
        const a = draw();
        const b = name === 'pow' ? between(-8, 8)() : draw();
        const found = call(a, b);
        const truth =
          entry.name === 'pow'
            ? decimals.power(exact(a), exact(b))
            : decimals.call(entry.name, exact(a), entry.arguments.length === 2 ? exact(b) : undefined);
        const error = exact(found).minus(truth).abs().toNumber() / ulpAt(truth.toNumber());
        expect(error, `${name}(${a}, ${b})`).toBeLessThanOrEqual(bound);
        compared += 1;
      }
    }
    expect(compared).toBe(100);
  });

  it('rounds sqrt correctly and returns abs, sign, min and max exactly', () => {
    for (let round = 0; round < 100; round++) {
      const a = positive(-300, 300)();
      const error = exact(Math.sqrt(a)).minus(exact(a).sqrt()).abs().toNumber() / ulpAt(Math.sqrt(a));
      expect(error).toBeLessThanOrEqual(0.5);
      const b = spread(-3, 3)();
      expect(doubleFunctions.abs(b, 0)).toBe(b < 0 ? -b : b);
      expect(doubleFunctions.sign(b, 0)).toBe(b < 0 ? -1 : 1);
    }
    expect([doubleFunctions.min(-2, 3), doubleFunctions.min(3, -2), doubleFunctions.min(NaN, 1)]).toEqual([
      -2,
      -2,
      NaN,
    ]);
    expect([doubleFunctions.max(-2, 3), doubleFunctions.max(3, -2), doubleFunctions.max(1, NaN)]).toEqual([
      3,
      3,
      NaN,
    ]);
  });
});

describe('integerPower', () => {
  it('stays within its stated relative error', () => {
    const u = 2 ** -53;
    for (let exponent = 2; exponent <= 64; exponent++) {
      for (const sign of [1, -1]) {
        const base = between(0.5, 2)();
        const truth = decimals.integerPower(exact(base), sign * exponent);
        const found = exact(integerPower(base, sign * exponent));
        // (1 + u)^k - 1 with k roundings is k u up to a term of order u^2.
        const bound = (sign > 0 ? exponent - 1 : exponent) * u * 1.000001;
        expect(found.minus(truth).div(truth).abs().toNumber()).toBeLessThanOrEqual(bound);
      }
    }
  });
});

describe('pickDouble', () => {
  it('takes the third or fourth value by the order of the first two, and their mean at a tie', () => {
    expect(pickDouble(1, 2, 10, 20)).toBe(10);
    expect(pickDouble(2, 1, 10, 20)).toBe(20);
    expect(pickDouble(1, 1, 10, 20)).toBe(15);
    expect(pickDouble(NaN, 1, 10, 20)).toBeNaN();
  });
});
