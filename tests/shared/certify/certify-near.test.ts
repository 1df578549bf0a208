import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { certifyNear } from '../../../shared/equations/certify-near.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';

const near = (text: string, x: number, radius: number, parameters: Record<string, string> = {}) =>
  certifyNear(parseEquation(text, Object.keys(parameters)), parameters, x, radius);

describe('certifyNear', () => {
  it('finds a simple root to 45 digits', () => {
    expect(near('x^2 - 3', 1.732, 1e-3)).toBe('1.73205080756887729352744634150587236694280525');
    expect(near('x^2 - n', -1.732, 1e-3, { n: '3' })).toBe('-1.73205080756887729352744634150587236694280525');
  });

  it('finds exact roots, roots at 0, and roots of odd multiplicity', () => {
    expect(near('x^2 - 4', 2, 1e-5)).toBe('2');
    expect(Number(near('sin(x)', 1e-9, 1e-5))).toBe(0);
    expect(Math.abs(Number(near('(x - 1)^3', 1.000001, 1e-5)) - 1)).toBeLessThan(1e-12);
    expect(Number(near('cbrt(x - 1)', 1.000001, 1e-5))).toBe(1);
  });

  it.each([
    ['no root within the radius', 'x^2 - 2', 1.5, 1e-5],
    ['a pole', '1/(x - 1/3)', 0.333333, 1e-5],
    ['a pole of tan', 'tan(x)', 1.570796, 1e-5],
    ['a jump', 'x < 0.6 ? -1 : 1', 0.6, 1e-5],
    ['a tail that falls to 0', 'exp(-x)', 40, 1e-3],
    ['a point outside the domain', 'log(x)', -1, 1e-5],
    ['an even root, which no sign change shows', '(x - 1)^2', 1.000001, 1e-5],
    ['a minimum above 0', '(x - 1)^2 + 1e-12', 1, 1e-5],
  ])('gives null for %s', (_what, text, x, radius) => {
    expect(near(text, x, radius)).toBeNull();
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, 1.7e308, 5e-324, -0, 1e22])(
    'never throws at x = %s',
    (x) => {
      const texts = [
        'sin(x)',
        'exp(x) - 1',
        'x^x - 2',
        'sinh(x)*tan(x)',
        'log(x)',
        'erf(x)',
        'x^3 - 1e300',
        'atan2(x, 0)',
      ];
      for (const text of texts) {
        const found = near(text, x, Math.abs(x) * 1e-5 || 1e-5);
        expect(found === null || typeof found === 'string').toBe(true);
      }
    },
  );

  it('returns only roots within the radius, from any start', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -8, max: 8, noNaN: true }),
        fc.double({ min: 1e-9, max: 1, noNaN: true }),
        (x, radius) => {
          const found = near('x^3 - 6*x + 1', x, radius);
          if (found === null) return;
          // 1e-12: rounding of the root and of the difference to binary64.
          expect(Math.abs(Number(found) - x)).toBeLessThanOrEqual(radius + 1e-12);
          expect(Math.abs(Number(found) ** 3 - 6 * Number(found) + 1)).toBeLessThan(1e-12);
        },
      ),
      { seed: 3, numRuns: 60 },
    );
  });
});
