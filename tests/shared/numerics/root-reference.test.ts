import Decimal from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exactDecimal, rootReference, signedError } from '../../../shared/numerics/root-reference.ts';
import { nextDown, nextUp, ulpOf } from '../../../shared/numerics/ulps.ts';

const Exact = Decimal.clone({ precision: 1300, toExpNeg: -1e9, toExpPos: 1e9 });

/** The error by exact decimal subtraction, rounded to 80 digits. */
function errorInDecimals(x: number, text: string): Decimal {
  return new Exact(exactDecimal(x)).minus(text).toSignificantDigits(80);
}

/** Deviation in units in the last place of the error itself. */
function ulpsOff(x: number, text: string): number {
  const found = signedError(x, rootReference(text));
  const exact = errorInDecimals(x, text);
  return Math.abs(Number(exactDecimal(found).minus(exact))) / ulpOf(Number(exact.toString()));
}

// Square root of 2, Wallis' cubic, a scaled tiny and a huge root, subnormal roots, 0, powers of two and just
// below (where the gap between doubles changes), and numbers that binary64 holds exactly.
const roots = [
  '1.41421356237309504880168872420969807856967188',
  '2.09455148154232659148238654057930296385730611',
  '-1.76929235423863141524040946433503349267055305',
  '1.41421356237309504880168872420969807856967188e-290',
  '1.41421356237309504880168872420969807856967188e-310',
  '3.3e-322',
  '6.02214076123456789012345678901234567890123456e300',
  '0',
  '1',
  '0.99999999999999999000000000000000000000000001',
  '1.00000000000000000000000000000000000000000001',
  '0.1',
  '-12000.0',
];

describe('signedError', () => {
  // Rounding mid − lo and the last sum costs half a unit each, and the cancellation against mid a factor 2.
  const allowedUlps = 1.5;

  it('is right to about one unit in its own last place next to the root', () => {
    for (const text of roots) {
      let x = Number(text);
      for (let k = 0; k < 20; k += 1) x = nextDown(x);
      for (let k = 0; k < 40; k += 1) {
        expect(ulpsOff(x, text), `${x} against ${text}`).toBeLessThanOrEqual(allowedUlps);
        x = nextUp(x);
      }
    }
  });

  it('is right to about one unit in its own last place everywhere else', () => {
    const anywhere = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e307, max: 1e307 });
    const near = fc
      .record({ scale: fc.integer({ min: -17, max: 3 }), part: fc.double({ noNaN: true, min: -1, max: 1 }) })
      .map(({ scale, part }) => part * 10 ** scale);
    for (const text of roots) {
      const root = Number(text);
      const property = (x: number) => {
        expect(ulpsOff(x, text), `${x}`).toBeLessThanOrEqual(allowedUlps);
      };
      fc.assert(fc.property(anywhere, property), { seed: 11, numRuns: 30 });
      fc.assert(
        fc.property(
          near.map((d) => root + d * (Math.abs(root) || 1)),
          property,
        ),
        {
          seed: 12,
          numRuns: 60,
        },
      );
    }
  });

  it('sees the error of the root rounded to binary64', () => {
    const text = '1.41421356237309504880168872420969807856967188';
    expect(signedError(Math.SQRT2, rootReference(text))).toBe(
      Number(errorInDecimals(Math.SQRT2, text).toString()),
    );
    expect(signedError(Math.SQRT2, rootReference(text))).not.toBe(0);
  });

  it('doubles the root where x is its negative', () => {
    for (const text of roots) {
      if (Number(text) !== 0) expect(ulpsOff(-Number(text), text)).toBeLessThanOrEqual(allowedUlps);
    }
  });

  it('keeps what is not finite not finite', () => {
    const ref = rootReference('-1.7e308');
    expect(signedError(Number.POSITIVE_INFINITY, ref)).toBe(Number.POSITIVE_INFINITY);
    expect(signedError(Number.NEGATIVE_INFINITY, ref)).toBe(Number.NEGATIVE_INFINITY);
    expect(signedError(Number.NaN, ref)).toBeNaN();
    expect(signedError(1.7e308, ref)).toBe(Number.POSITIVE_INFINITY);
  });
});

describe('rootReference', () => {
  it('holds 45 digits in three doubles', () => {
    for (const text of roots.filter((root) => Math.abs(Number(root)) > 1e-200)) {
      const ref = rootReference(text);
      const sum = exactDecimal(ref.hi).plus(exactDecimal(ref.mid)).plus(exactDecimal(ref.lo));
      expect(Number(sum.minus(text).div(text).abs())).toBeLessThan(1e-45);
    }
  });

  it('refuses what is no decimal and what binary64 cannot hold', () => {
    expect(() => rootReference('about 2')).toThrow(RangeError);
    expect(() => rootReference('NaN')).toThrow(RangeError);
    expect(() => rootReference('1e400')).toThrow(RangeError);
    expect(() => rootReference('1e-400')).toThrow(RangeError);
  });
});

describe('exactDecimal', () => {
  it('gives the value of a double, not its shortest decimal', () => {
    expect(exactDecimal(0.1).toString()).toBe('0.1000000000000000055511151231257827021181583404541015625');
    expect(exactDecimal(5e-324).toString().endsWith('625')).toBe(true);
    expect(exactDecimal(-3).toString()).toBe('-3');
    expect(() => exactDecimal(Number.NaN)).toThrow(RangeError);
  });
});
