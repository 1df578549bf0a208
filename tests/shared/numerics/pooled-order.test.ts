import { describe, expect, it } from 'vitest';
import { leastSquares } from '../../../shared/numerics/least-squares.ts';
import { pooledOrder } from '../../../shared/numerics/pooled-order.ts';

/** Runs of L_{k+1} = a₁ L_k + a₂ L_{k−1} + b from several first errors. */
function runs(a1: number, a2: number, b: number, count: number, length: number, first = -1): number[][] {
  return Array.from({ length: count }, (_, i) => {
    const run = [first - 0.17 * i, (first - 0.17 * i) * 1.7];
    while (run.length < length) run.push(a1 * (run.at(-1) ?? 0) + a2 * (run.at(-2) ?? 0) + b);
    return run;
  });
}

describe('pooledOrder', () => {
  const lnFloor = -300;

  it('finds the order of a recurrence with one term', () => {
    const found = pooledOrder(runs(2, 0, -0.5, 6, 7), lnFloor);
    expect(found).toMatchObject({ status: 'estimated', terms: 1 });
    expect(found.value).toBeCloseTo(2, 9);
    expect(found.low).toBeLessThan(2);
    expect(found.high).toBeGreaterThan(2);
  });

  it('finds the order of the secant’s recurrence with two terms', () => {
    const found = pooledOrder(runs(1, 1, -0.5, 6, 9), lnFloor);
    expect(found).toMatchObject({ status: 'estimated', terms: 2 });
    expect(found.value).toBeCloseTo((1 + Math.sqrt(5)) / 2, 6);
  });

  it('widens the interval of bracketing methods', () => {
    const narrow = pooledOrder(runs(2, 0, -0.5, 6, 7), lnFloor);
    const wide = pooledOrder(runs(2, 0, -0.5, 6, 7), lnFloor, 'bracketing');
    expect((wide.high ?? 0) - (wide.low ?? 0)).toBeGreaterThan(5 * ((narrow.high ?? 0) - (narrow.low ?? 0)));
  });

  it('has not enough steps under five rows', () => {
    expect(pooledOrder([[-1, -2, -4, -8]], lnFloor).status).toBe('not enough steps');
    expect(pooledOrder([], lnFloor).status).toBe('not enough steps');
    expect(pooledOrder([[null], [-1, null]], lnFloor).status).toBe('not enough steps');
  });

  it('gives no order to linear gains, large or small', () => {
    const large = Array.from({ length: 8 }, (_, i) =>
      Array.from({ length: 12 }, (__, k) => -2 - i / 7 - 2 * k),
    );
    expect(pooledOrder(large, lnFloor).status).toBe('not resolved');
    const mixed = large.map((run) => run.map((value, k) => value + (k % 2) * 1.6));
    expect(pooledOrder(mixed, lnFloor)).toMatchObject({ status: 'steps without gain', value: null });
  });

  it('gives no order where the steps scatter about every recurrence', () => {
    // Each step multiplies the logarithm by 1.4 to 3.1, in no order (multiples of 7 modulo 18).
    let state = 5;
    const factor = () => {
      state = (state * 7 + 3) % 18;
      return 1.4 + state / 10;
    };
    const scattered = Array.from({ length: 12 }, () => {
      const run = [-2];
      for (let k = 0; k < 4; k += 1) run.push((run.at(-1) ?? 0) * factor());
      return run;
    });
    expect(pooledOrder(scattered, lnFloor).status).toBe('not resolved');
  });
});

describe('leastSquares', () => {
  it('finds a plane again, and no deviation', () => {
    const rows = [
      [0, 0],
      [1, 0],
      [0, 1],
      [2, 3],
      [5, 1],
    ].map(([x = 0, y = 0]) => ({ given: [x, y, 1], wanted: 2 * x - 3 * y + 7 }));
    const fit = leastSquares(rows);
    for (const [i, expected] of [2, -3, 7].entries()) expect(fit?.coefficients[i]).toBeCloseTo(expected, 10);
    expect(fit?.deviation).toBeCloseTo(0, 10);
  });

  it('gives the variance of a slope: s² / Σ (x − mean)²', () => {
    // Textbook: x = 1 … 5, y = 2, 1, 4, 3, 5: slope 0.8, s² = 3.6 / 3, so 1.2 / 10.
    const rows = [2, 1, 4, 3, 5].map((wanted, i) => ({ given: [i + 1, 1], wanted }));
    const fit = leastSquares(rows);
    expect(fit?.coefficients[0]).toBeCloseTo(0.8, 12);
    expect(fit?.covariance[0]?.[0]).toBeCloseTo(0.12, 12);
  });

  it('has no answer for columns that depend on one another or for too few rows', () => {
    const rows = [1, 2, 3, 4].map((x) => ({ given: [x, 2 * x, 1], wanted: x }));
    expect(leastSquares(rows)).toBeNull();
    expect(leastSquares([{ given: [1, 1], wanted: 1 }])).toBeNull();
    expect(leastSquares([])).toBeNull();
  });
});
