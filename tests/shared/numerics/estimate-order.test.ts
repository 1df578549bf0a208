import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { emptyEstimate, estimateOrder } from '../../../shared/numerics/estimate-order.ts';
import { orderEstimate } from '../../../shared/schemas/solve.ts';
import file from '../../fixtures/order-vectors.json' with { type: 'json' };

const maybe = z.number().nullable();
const { vectors } = z
  .object({
    vectors: z.array(
      z.object({
        arithmetic: z.string(),
        method: z.string(),
        f: z.string(),
        lnErrors: z.array(maybe),
        lnFloor: z.number(),
        expected: z.object({
          order: maybe,
          low: maybe,
          high: maybe,
          steps: z.number(),
          verdict: z.string(),
          rate: maybe,
          kind: z.string().nullable(),
        }),
      }),
    ),
  })
  .parse(file);

/** ln of errors e₀, e₀^p, e₀^(p²), … with constant 1. */
function powers(p: number, count: number, first = -2): number[] {
  return Array.from({ length: count }, (_, k) => first * p ** k);
}

function expectClose(found: number | null, wanted: number | null, what: string) {
  if (wanted === null) expect(found, what).toBeNull();
  else expect(Math.abs((found ?? Number.NaN) - wanted), what).toBeLessThan(1e-4);
}

describe('estimateOrder on stored error sequences', () => {
  it('has sixty of them', () => {
    expect(vectors).toHaveLength(60);
  });

  it.each(vectors.map((vector, i) => [i, vector.method, vector.f, vector] as const))(
    'answers as stored: sequence %i, %s on %s',
    (_, __, ___, { lnErrors, lnFloor, expected }) => {
      const found = estimateOrder({ lnErrors, lnFloor });
      const isOrder = found.status === 'estimated' || found.status === 'one ratio';
      expect(isOrder ? 'superlinear' : found.status).toBe(expected.verdict);
      expectClose(found.value, expected.order, 'order');
      expectClose(found.low, expected.low, 'low');
      expectClose(found.high, expected.high, 'high');
      expectClose(found.rate, expected.rate, 'rate');
      expect(found.steps).toBe(expected.steps);
      expect(found.kind).toBe(expected.kind === 'mono' ? null : expected.kind);
      expect(orderEstimate.safeParse(found).success).toBe(true);
    },
  );
});

describe('estimateOrder', () => {
  const lnFloor = -37;

  it('holds the order within its interval for error sequences of a known order', () => {
    for (const p of [1.35, 1.5, 1.618, 1.839, 2]) {
      const found = estimateOrder({ lnErrors: powers(p, 7, -4), lnFloor: -400 });
      expect(found.status).toBe('estimated');
      expect(found.value).toBeCloseTo(p, 10);
      expect(found.low).toBeLessThan(p);
      expect(found.high).toBeGreaterThan(p);
      expect(found.kind).toBe('Q');
    }
  });

  it('keeps the numbers of a single ratio and shows them as an order for one-point methods alone', () => {
    const lnErrors = powers(3, 3, -3);
    const plain = estimateOrder({ lnErrors, lnFloor });
    expect(plain).toMatchObject({ status: 'one ratio', kind: 'one ratio', steps: 2 });
    expect(plain.value).toBeCloseTo(3, 10);
    expect(estimateOrder({ lnErrors, lnFloor, methodClass: 'bracketing' }).status).toBe('one ratio');
    expect(estimateOrder({ lnErrors, lnFloor, methodClass: 'memory' }).status).toBe('one ratio');
    const shown = estimateOrder({ lnErrors, lnFloor, methodClass: 'one-point' });
    expect(shown).toEqual({ ...plain, status: 'estimated' });
  });

  it('gives linear convergence its rate with an interval', () => {
    const lnErrors = Array.from({ length: 20 }, (_, k) => -1 + k * Math.log(0.5) + (k % 2) * 0.02);
    const found = estimateOrder({ lnErrors, lnFloor });
    expect(found).toMatchObject({ status: 'linear', value: 1, kind: null, steps: 19 });
    expect(found.rate).toBeCloseTo(0.5, 2);
    expect(found.rateLow).toBeLessThan(0.5);
    expect(found.rateHigh).toBeGreaterThan(0.5);
  });

  it('tells a short linear run by four even gains', () => {
    expect(estimateOrder({ lnErrors: [0, -2, -4, -6, -8], lnFloor })).toMatchObject({
      status: 'linear',
      value: 1,
      steps: 4,
    });
  });

  it('tells very slow convergence from linear', () => {
    const slow = Array.from({ length: 120 }, (_, k) => -0.01 * k);
    expect(estimateOrder({ lnErrors: slow, lnFloor }).status).toBe('sublinear or very slow linear');
  });

  it('tells a ratio that keeps falling from linear', () => {
    const lnErrors = [0];
    for (let k = 1; k <= 12; k += 1) lnErrors.push((lnErrors.at(-1) ?? 0) - (1 + 0.04 * k));
    const found = estimateOrder({ lnErrors, lnFloor });
    expect(found).toMatchObject({ status: 'superlinear of order 1', value: 1 });
  });

  it('does not take a long linear start for the order where the end leaps', () => {
    const far = Array.from({ length: 30 }, (_, k) => 29 - k);
    const found = estimateOrder({ lnErrors: [...far, -1.5, -4, -9, -19], lnFloor });
    expect(found.status).toBe('estimated');
    expect(found.value).toBeGreaterThan(1.7);
  });

  it('has not enough steps for two errors, none, or a hit at once', () => {
    for (const lnErrors of [[], [-1], [-1, -2], [null], [-1, -3, null], [-1, -3, -36, -37]]) {
      expect(estimateOrder({ lnErrors, lnFloor }).status).toBe('not enough steps');
    }
  });

  it('ends the usable errors at a hit of the root', () => {
    const lnErrors = [...powers(2, 5, -0.9), null, -3, -5];
    expect(estimateOrder({ lnErrors, lnFloor })).toEqual(
      estimateOrder({ lnErrors: lnErrors.slice(0, 5), lnFloor }),
    );
  });

  it('finds stagnation where many steps win nothing', () => {
    const still = Array.from({ length: 12 }, (_, k) => -2 - 0.01 * k);
    expect(estimateOrder({ lnErrors: still, lnFloor }).status).toBe('stagnation');
  });

  it('leaves linear or superlinear undecided where the interval reaches 1', () => {
    const found = estimateOrder({ lnErrors: [0, -0.8, -1.72, -2.78], lnFloor });
    expect(found.status).toBe('undecided');
    expect(found.constant).toBeNull();
  });

  it('gives no value where the ratios of the gains swing too far', () => {
    const found = estimateOrder({ lnErrors: [0, -1, -6, -8, -20], lnFloor });
    expect(found).toMatchObject({ status: 'superlinear, order not resolved', value: null });
    expect(found.low).not.toBeNull();
  });

  it('gives the constant of an integer order and only the power of ten of another', () => {
    const quadratic = [-2];
    for (let k = 0; k < 4; k += 1) quadratic.push(2 * (quadratic.at(-1) ?? 0) + Math.log(0.56));
    expect(estimateOrder({ lnErrors: quadratic, lnFloor: -60 }).constant).toBeCloseTo(0.56, 10);
    const golden = [-1];
    for (let k = 0; k < 7; k += 1) golden.push(1.618 * (golden.at(-1) ?? 0) + Math.log(0.56));
    const { constant } = estimateOrder({ lnErrors: golden, lnFloor: -90 });
    expect(constant).not.toBeNull();
    expect(Math.log10(constant ?? 0) % 1).toBe(0);
  });

  it('wants one error for each iterate', () => {
    expect(() => estimateOrder({ lnErrors: [-1], lnFloor, iterates: [1, 2] })).toThrow(RangeError);
  });

  it('has a shape for what could not be measured', () => {
    expect(orderEstimate.parse(emptyEstimate('no root to measure against')).value).toBeNull();
  });
});

/** Newton's iterates and the ln of their errors against a root that binary64 holds or nearly holds. */
function newton(step: (x: number) => number, x0: number, root: number, count: number) {
  const iterates = [x0];
  while (iterates.length <= count) iterates.push(step(iterates.at(-1) ?? 0));
  const lnErrors = iterates.map((x) => (x === root ? null : Math.log(Math.abs(x - root))));
  return { iterates, lnErrors, lnFloor: -36, methodClass: 'one-point' as const };
}

describe('estimateOrder on iterates that do not converge', () => {
  // Textbook examples, from memory; each can be checked by hand.
  it('finds the cycle 0, 1 of Newton on x³ − 2x + 2', () => {
    const cubic = newton((x) => x - (x ** 3 - 2 * x + 2) / (3 * x * x - 2), 0, -1.7692923542386314, 12);
    expect(estimateOrder(cubic)).toEqual({ ...emptyEstimate('cycle'), period: 2 });
  });

  it('finds the cycle 1, −1 of Newton on x³ − 5x', () => {
    const cubic = newton((x) => x - (x ** 3 - 5 * x) / (3 * x * x - 5), 1, 0, 12);
    expect(estimateOrder(cubic)).toEqual({ ...emptyEstimate('cycle'), period: 2 });
  });

  it('finds a cycle of a method of unknown class, too', () => {
    const { methodClass: _, ...cubic } = newton((x) => x - (x ** 3 - 5 * x) / (3 * x * x - 5), 1, 0, 12);
    expect(estimateOrder(cubic)).toMatchObject({ status: 'cycle', period: 2 });
  });

  it('finds a near-cycle that never comes back to the last bit', () => {
    const drifting = newton((x) => (x > 0 ? -x - 1e-13 : -x + 1e-13), 1, 0.25, 12);
    expect(estimateOrder(drifting)).toMatchObject({ status: 'cycle', period: 2 });
  });

  it('takes a slowly converging run with tiny steps for no near-cycle', () => {
    const slow = newton((x) => x / 2, 1e-9, 0, 40);
    expect(estimateOrder({ ...slow, lnFloor: -80 }).status).toBe('linear');
  });

  it('calls Newton on cbrt(x) diverged: the error doubles at each step', () => {
    expect(estimateOrder(newton((x) => -2 * x, 0.1, 0, 40)).status).toBe('diverged');
  });

  it('calls Newton on atan(x) from 1.5 lost and gives order 3 from 1.3', () => {
    const step = (x: number) => x - Math.atan(x) * (1 + x * x);
    expect(estimateOrder(newton(step, 1.5, 0, 12)).status).toBe('left the domain');
    expect(estimateOrder(newton(step, 1.5, 0, 7)).status).toBe('diverged');
    // Far starts add steps of no order; the end is cubic, since atan″(0) = 0.
    const found = estimateOrder({ ...newton(step, 1.3, 0, 9), lnFloor: -100 });
    expect(found.status).toBe('estimated');
    expect(found.value).toBeCloseTo(3, 1);
  });

  it('says that iterates stopped moving away from the root', () => {
    expect(estimateOrder(newton(() => 0.5, 0.5, 0.7, 5)).status).toBe('stopped moving');
  });

  it('still gives the order of a run that reports its last x twice', () => {
    const lnErrors = powers(2, 5, -0.9);
    const last = lnErrors.at(-1) ?? 0;
    const iterates = [...lnErrors, last].map(Math.exp);
    const found = estimateOrder({ lnErrors: [...lnErrors, last], lnFloor: -40, iterates });
    expect(found.status).not.toBe('stopped moving');
  });

  it('takes going round within the rounding floor for convergence', () => {
    const iterates = [
      0.5,
      0.25 ** 2,
      0.0625 ** 2,
      2 ** -16,
      2 ** -32,
      2 ** -53,
      -(2 ** -53),
      2 ** -53,
      -(2 ** -53),
    ];
    const lnErrors = iterates.map((x) => Math.log(Math.abs(x)));
    expect(estimateOrder({ iterates, lnErrors, lnFloor: -36, methodClass: 'one-point' }).status).not.toBe(
      'cycle',
    );
  });
});
