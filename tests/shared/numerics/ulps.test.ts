import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bitsOf, nextDown, nextUp, orderKey, ulpDistance, ulpOf } from '../../../shared/numerics/ulps.ts';

const anyDouble = fc.double({ noNaN: true });

describe('ulpDistance', () => {
  // Counted by hand from the binary64 format, and 0.1 + 0.2 against 0.3 is common knowledge.
  it.each([
    [1, 1 + 2 ** -52, 1n],
    [1, 1 - 2 ** -53, 1n],
    [-0, 0, 0n],
    [-5e-324, 5e-324, 2n],
    [Number.MAX_VALUE, Number.POSITIVE_INFINITY, 1n],
    [1, 2, 4503599627370496n],
    [0, 1, 4607182418800017408n],
    [0.1 + 0.2, 0.3, 1n],
    [Math.PI, 3.141592653589794, 2n],
    [1e-300, -1e-300, 237244095778645682n],
  ])('%d and %d lie %s steps apart', (a, b, steps) => {
    expect(ulpDistance(a, b)).toBe(steps);
    expect(ulpDistance(b, a)).toBe(steps);
  });

  it('has no answer where one side is NaN', () => {
    expect(ulpDistance(Number.NaN, 1)).toBeUndefined();
    expect(ulpDistance(1, Number.NaN)).toBeUndefined();
  });
});

describe('orderKey', () => {
  it('orders keys as the values are ordered', () => {
    fc.assert(
      fc.property(anyDouble, anyDouble, (a, b) => {
        const [left, right] = [orderKey(a) ?? 0n, orderKey(b) ?? 0n];
        expect(a < b).toBe(left < right);
        expect(a === b).toBe(left === right);
      }),
      { seed: 7 },
    );
  });
});

describe('ulpOf', () => {
  it.each([
    [1, 2 ** -52],
    [-1, 2 ** -52],
    [2 - 2 ** -52, 2 ** -52],
    [2, 2 ** -51],
    [0, 2 ** -1074],
    [5e-324, 2 ** -1074],
    [2 ** -1022, 2 ** -1074],
    [2 ** -1021, 2 ** -1073],
    [Number.MAX_VALUE, 2 ** 971],
  ])('is a power of two by the exponent of %f', (t, unit) => {
    expect(ulpOf(t)).toBe(unit);
  });

  it('is the gap to the next double above, for positive numbers', () => {
    const positive = fc.double({ noNaN: true, min: 0, max: 1e308 });
    fc.assert(
      fc.property(positive, (t) => {
        expect(nextUp(t) - t).toBe(ulpOf(t));
      }),
      { seed: 8 },
    );
  });

  it('is NaN where t is not finite', () => {
    expect(ulpOf(Number.POSITIVE_INFINITY)).toBeNaN();
    expect(ulpOf(Number.NaN)).toBeNaN();
  });
});

describe('nextUp and nextDown', () => {
  it('go one key up and one key down and undo each other', () => {
    const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
    fc.assert(
      fc.property(finite, (x) => {
        expect(orderKey(nextUp(x))).toBe((orderKey(x) ?? 0n) + 1n);
        expect(orderKey(nextDown(x))).toBe((orderKey(x) ?? 0n) - 1n);
      }),
      { seed: 9 },
    );
  });

  it('stay at the ends', () => {
    expect(nextUp(Number.POSITIVE_INFINITY)).toBe(Number.POSITIVE_INFINITY);
    expect(nextDown(Number.NEGATIVE_INFINITY)).toBe(Number.NEGATIVE_INFINITY);
    expect(nextUp(Number.MAX_VALUE)).toBe(Number.POSITIVE_INFINITY);
    expect(nextUp(Number.NaN)).toBeNaN();
    expect(nextUp(-0)).toBe(5e-324);
    expect(nextUp(-5e-324)).toBe(-0);
  });
});

describe('bitsOf', () => {
  it('tells −0 from 0 and gives every NaN the same bits', () => {
    expect(bitsOf(-0)).not.toBe(bitsOf(0));
    expect(bitsOf(Number.NaN)).toBe(bitsOf(-Number.NaN));
    expect(bitsOf(1)).toBe(0x3ff0000000000000n);
  });
});
