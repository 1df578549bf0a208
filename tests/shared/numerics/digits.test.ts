import { describe, expect, it } from 'vitest';
import { correctDigits, nearestRoot } from '../../../shared/numerics/digits.ts';
import { rootReference } from '../../../shared/numerics/root-reference.ts';
import { nextUp } from '../../../shared/numerics/ulps.ts';

const sqrtTwo = rootReference('1.41421356237309504880168872420969807856967188');
const zero = rootReference('0');

describe('correctDigits', () => {
  it('counts the digits of the relative error', () => {
    const found = correctDigits(1.4, sqrtTwo);
    // |1.4 − √2| / √2 = 1.0050506e-2, so 1.99781 digits.
    expect(found.digits).toBeCloseTo(1.99781, 5);
    expect(found.exact).toBe(false);
    expect(found.error).toBeCloseTo(-0.01421356237309514, 17);
    expect(found.absolute).toBe(false);
  });

  it('is exact with 16 digits where x is the root rounded to binary64', () => {
    const found = correctDigits(Math.SQRT2, sqrtTwo);
    expect(found).toMatchObject({ digits: 16, exact: true, absolute: false });
    expect(Math.abs(found.ulps)).toBeLessThanOrEqual(0.5);
    expect(found.error).not.toBe(0);
  });

  it('is not exact one step beside it', () => {
    const found = correctDigits(nextUp(Math.SQRT2), sqrtTwo);
    expect(found.exact).toBe(false);
    expect(found.digits).toBeGreaterThan(15);
    expect(found.ulps).toBeGreaterThan(0.5);
    expect(found.ulps).toBeLessThan(1.5);
  });

  it('is never below 0 and never above 17', () => {
    expect(correctDigits(1e9, sqrtTwo).digits).toBe(0);
    expect(correctDigits(1e308, rootReference('1e-300')).digits).toBe(0);
    expect(correctDigits(1e-300, zero).digits).toBe(17);
  });

  it('uses |x| itself where the root is 0, and says so', () => {
    expect(correctDigits(1e-7, zero)).toMatchObject({ digits: 7, absolute: true, exact: false });
    expect(correctDigits(0, zero)).toMatchObject({ digits: 16, absolute: true, exact: true });
    expect(correctDigits(-0, zero)).toMatchObject({ digits: 16, exact: true });
  });

  it('gives no digits to an x that is not finite', () => {
    expect(correctDigits(Number.NaN, sqrtTwo)).toMatchObject({ digits: 0, exact: false });
    expect(correctDigits(Number.POSITIVE_INFINITY, sqrtTwo)).toMatchObject({ digits: 0, exact: false });
  });
});

describe('nearestRoot', () => {
  const refs = [rootReference('-1'), rootReference('1'), rootReference('1')];

  it('finds the nearest, the first of equals', () => {
    expect(nearestRoot(0.9, refs)).toEqual({ index: 1, error: 0.9 - 1 });
    expect(nearestRoot(0, refs)?.index).toBe(0);
  });

  it('has none where there is no root or x is NaN', () => {
    expect(nearestRoot(1, [])).toBeNull();
    expect(nearestRoot(Number.NaN, refs)).toBeNull();
  });
});
