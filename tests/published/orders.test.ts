import { describe, expect, it } from 'vitest';
import { pooledOrder } from '../../shared/numerics/pooled-order.ts';
import type { OrderStatus } from '../../shared/schemas/solve.ts';
import { type Measured, measureOrders, pick, quantile } from '../helpers/measure-orders.ts';
import * as methods from '../helpers/methods.ts';

/*
 * How well the estimator does on methods of known order: thirty equations from eight starts each, 240 runs a
 * method, in binary64 with exact errors. The bounds were set beforehand from an earlier trial on 45 equations
 * (360 runs a method); what is found here is given beside them.
 * Orders: Ostrowski 1960 and Traub 1964 (textbook), Pegasus 7.275^(1/4) Dowell & Jarratt 1972, BIT 12, 503–508;
 * from memory.
 */

const newton = measureOrders('one-point', (at, l, r, k) => methods.newton(at, pick(l, r, k)));
const halley = measureOrders('one-point', (at, l, r, k) => methods.halley(at, pick(l, r, k)));
const ostrowski = measureOrders('one-point', (at, l, r, k) => methods.ostrowski(at, pick(l, r, k)));
const steffensen = measureOrders('one-point', (at, l, r, k) => methods.steffensen(at, pick(l, r, k)));
const secant = measureOrders('memory', methods.secant);
const muller = measureOrders('memory', (at, l, r) => methods.muller(at, l, r, (l + r) / 2));
const bisection = measureOrders('bracketing', methods.bisection);
const regulaFalsi = measureOrders('bracketing', methods.regulaFalsi);
const pegasus = measureOrders('bracketing', methods.pegasus);
const illinois = measureOrders('bracketing', methods.illinois);
const andersonBjorck = measureOrders('bracketing', methods.andersonBjorck);
const ridders = measureOrders('bracketing', methods.ridders);

const golden = (1 + Math.sqrt(5)) / 2;

function given(runs: readonly Measured[]): { value: number; low: number; high: number }[] {
  return runs.flatMap(({ estimate: { status, value, low, high } }) => {
    return status === 'estimated' && value !== null && low !== null && high !== null
      ? [{ value, low, high }]
      : [];
  });
}

function share(runs: readonly Measured[], status: OrderStatus): number {
  return runs.filter((run) => run.estimate.status === status).length / runs.length;
}

interface Bounds {
  givenShare: number;
  median: [number, number];
  ninety: [number, number];
  holdsShare: number;
}

function expectOrder(runs: readonly Measured[], order: number, bounds: Bounds) {
  const found = given(runs);
  const values = found.map((one) => one.value);
  const holds = found.filter(({ low, high }) => low <= order && order <= high).length / found.length;
  expect(runs.length).toBeGreaterThanOrEqual(200);
  expect(found.length / runs.length).toBeGreaterThanOrEqual(bounds.givenShare);
  expect(quantile(values, 0.5)).toBeGreaterThanOrEqual(bounds.median[0]);
  expect(quantile(values, 0.5)).toBeLessThanOrEqual(bounds.median[1]);
  expect(quantile(values, 0.05)).toBeGreaterThanOrEqual(bounds.ninety[0]);
  expect(quantile(values, 0.95)).toBeLessThanOrEqual(bounds.ninety[1]);
  expect(holds).toBeGreaterThanOrEqual(bounds.holdsShare);
}

describe('estimateOrder on methods of known superlinear order', () => {
  // Found: given 99.6 %, median 1.999, 5–95 % [1.995, 2.002], interval holds 2 in 99.6 %.
  it('gives Newton its order 2', () => {
    expectOrder(newton, 2, {
      givenShare: 0.98,
      median: [1.995, 2.005],
      ninety: [1.98, 2.02],
      holdsShare: 0.98,
    });
  });

  // Found: given 98.8 %, median 3.001, 5–95 % [2.90, 3.17], interval holds 3 in 96 %.
  it('gives Halley its order 3', () => {
    expectOrder(halley, 3, {
      givenShare: 0.7,
      median: [2.97, 3.03],
      ninety: [2.75, 3.25],
      holdsShare: 0.93,
    });
  });

  // Found: given 31 %, 5–95 % [3.92, 4.36], interval holds 4 in 96 %, not enough steps in 69 %.
  it('gives Ostrowski’s method its order 4 where there are steps enough, mostly there are not', () => {
    expectOrder(ostrowski, 4, { givenShare: 0.2, median: [3.5, 4.4], ninety: [3.5, 4.4], holdsShare: 0.88 });
    expect(share(ostrowski, 'not enough steps')).toBeGreaterThanOrEqual(0.5);
  });

  // Found: given 96 %, median 1.599, 5–95 % [1.552, 1.650], interval holds 1.618 in 100 %.
  it('gives the secant its order 1.618', () => {
    expectOrder(secant, golden, {
      givenShare: 0.88,
      median: [1.58, 1.64],
      ninety: [1.55, 1.7],
      holdsShare: 0.97,
    });
  });

  // Found: given 88 % of all runs (10 % stagnate), median 2.000, 5–95 % [1.990, 2.010].
  it('gives Steffensen its order 2 where the run converges', () => {
    expectOrder(steffensen, 2, {
      givenShare: 0.8,
      median: [1.99, 2.01],
      ninety: [1.97, 2.03],
      holdsShare: 0.93,
    });
  });

  // Found: given 85 %, 5–95 % [1.53, 1.75]; a single ratio is never given.
  it('keeps the orders given for Pegasus within 1.50 to 1.90', () => {
    const values = given(pegasus).map((one) => one.value);
    expect(values.length).toBeGreaterThan(100);
    expect(quantile(values, 0.05)).toBeGreaterThanOrEqual(1.5);
    expect(quantile(values, 0.95)).toBeLessThanOrEqual(1.9);
  });

  it.each([
    ['Muller', muller],
    ['Illinois', illinois],
    ['Anderson–Björck', andersonBjorck],
    ['Ridders', ridders],
  ] as const)('never gives %s an order without its interval, nor calls it linear', (_, runs) => {
    const expected: OrderStatus[] = [
      'estimated',
      'one ratio',
      'superlinear, order not resolved',
      'not enough steps',
      'undecided',
    ];
    for (const { estimate } of runs) {
      expect(expected).toContain(estimate.status);
      if (estimate.value === null) continue;
      expect(estimate.low).toBeLessThanOrEqual(estimate.value);
      expect(estimate.high).toBeGreaterThanOrEqual(estimate.value);
    }
  });
});

describe('estimateOrder on linear methods', () => {
  const rates = (runs: readonly Measured[]) => runs.flatMap(({ estimate }) => estimate.rate ?? []);
  const multiple = [2, 3, 5].map((m) => {
    return [m, measureOrders('one-point', (at, l, r, k) => methods.newton(at, pick(l, r, k)), m)] as const;
  });

  // Found: 100 %, rate median 0.4996, 5–95 % [0.486, 0.507].
  it('calls every bisection linear, at a rate of a half', () => {
    expect(share(bisection, 'linear')).toBe(1);
    expect(Math.abs(quantile(rates(bisection), 0.5) - 0.5)).toBeLessThanOrEqual(0.005);
    expect(quantile(rates(bisection), 0.05)).toBeGreaterThanOrEqual(0.47);
    expect(quantile(rates(bisection), 0.95)).toBeLessThanOrEqual(0.53);
  });

  // Found: 100 %.
  it('calls regula falsi linear', () => {
    expect(share(regulaFalsi, 'linear')).toBeGreaterThanOrEqual(0.97);
  });

  // Found: 100 % each; rates 0.500, 0.667, 0.800, 5–95 % within 0.0025.
  it.each(multiple)('calls Newton on a root of multiplicity %i linear, at a rate of (m − 1)/m', (m, runs) => {
    expect(share(runs, 'linear')).toBeGreaterThanOrEqual(0.96);
    const found = rates(runs);
    const close = found.filter((rate) => Math.abs(rate - (m - 1) / m) <= 0.005);
    expect(close.length / found.length).toBeGreaterThanOrEqual(0.9);
    const right = found.filter((rate) => Math.round(1 / (1 - rate)) === m);
    expect(right.length / found.length).toBeGreaterThanOrEqual(0.99);
  });

  // Found: none of 1200.
  it('gives no superlinear order to a linear method', () => {
    const all = [bisection, regulaFalsi, ...multiple.map(([, runs]) => runs)].flat();
    const wrong = all.filter(({ estimate: { status } }) => status === 'estimated' || status === 'one ratio');
    expect(wrong.length / all.length).toBeLessThanOrEqual(0.02);
  });
});

describe('pooledOrder over eight starts', () => {
  const pooled = (runs: readonly Measured[], methodClass: 'bracketing' | null = null) => {
    const byEquation = new Map<string, Measured[]>();
    for (const run of runs) byEquation.set(run.equation, [...(byEquation.get(run.equation) ?? []), run]);
    return [...byEquation.values()].map((group) => {
      const lnFloor = group[0]?.lnFloor ?? Number.NaN;
      return pooledOrder(
        group.map((run) => run.lnErrors),
        lnFloor,
        methodClass,
      );
    });
  };

  // Found, 5–95 % and number given of 30: Newton [1.998, 2.001], 30; Halley [2.993, 3.015], 30;
  // Ostrowski [3.95, 4.02], 19; secant [1.617, 1.619], 30.
  it.each([
    ['Newton', newton, 2, 0.003, 30],
    ['Halley', halley, 3, 0.02, 30],
    ['Ostrowski’s method', ostrowski, 4, 0.25, 15],
    ['the secant', secant, golden, 0.005, 30],
  ] as const)('gives %s its order', (_, runs, order, width, least) => {
    const found = pooled(runs);
    const values = found.flatMap((one) =>
      one.status === 'estimated' && one.value !== null ? one.value : [],
    );
    expect(values.length).toBeGreaterThanOrEqual(least);
    expect(quantile(values, 0.05)).toBeGreaterThanOrEqual(order - width);
    expect(quantile(values, 0.95)).toBeLessThanOrEqual(order + width);
    const holds = found.filter(
      ({ low, high }) => low !== null && high !== null && low <= order && order <= high,
    );
    expect(holds.length / values.length).toBeGreaterThanOrEqual(0.9);
  });

  // Found: 1.583 to 1.618 on 29 of 30; theory 1.642 lies within ± 6 % on 28.
  it('gives Pegasus an interval that holds its order', () => {
    const found = pooled(pegasus, 'bracketing').filter((one) => one.status === 'estimated');
    expect(found.length).toBeGreaterThanOrEqual(25);
    const order = ((7 + Math.sqrt(57)) / 2) ** 0.25;
    const holds = found.filter(({ low, high }) => (low ?? 9) <= order && order <= (high ?? 0));
    expect(holds.length / found.length).toBeGreaterThanOrEqual(0.9);
  });

  it('refuses linear methods and Illinois, whose modified steps its recurrence does not know', () => {
    for (const runs of [bisection, regulaFalsi, illinois]) {
      expect(pooled(runs, 'bracketing').filter((one) => one.value !== null)).toEqual([]);
    }
  });
});
