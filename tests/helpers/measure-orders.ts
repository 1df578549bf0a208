import { estimateOrder, type OrderInput } from '../../shared/numerics/estimate-order.ts';
import { rootReference, signedError } from '../../shared/numerics/root-reference.ts';
import type { OrderEstimate } from '../../shared/schemas/solve.ts';
import { attainableOf, equations, powerOf, type TestEquation } from './equations.ts';
import type { At } from './methods.ts';

type MethodClass = NonNullable<OrderInput['methodClass']>;

/** Eight starting points or brackets of each equation, as parts of its reach to the left and right of the root. */
const parts: [left: number, right: number][] = [
  [1, 0.9],
  [0.83, 0.37],
  [0.71, 0.97],
  [0.59, 0.53],
  [0.47, 0.79],
  [0.37, 0.23],
  [0.29, 0.61],
  [0.19, 0.43],
];

export interface Measured {
  equation: string;
  lnErrors: (number | null)[];
  lnFloor: number;
  iterates: number[];
  estimate: OrderEstimate;
}

/**
 * Runs a method from eight starts on each of the thirty equations (their m-th powers) and estimates its order.
 * `run` gets the equation and a point to the left and right of the root, k the number of the start: open
 * methods use the left for even k and the right for odd.
 */
export function measureOrders(
  methodClass: MethodClass | null,
  run: (at: At, left: number, right: number, k: number) => number[],
  m = 1,
): Measured[] {
  return equations.flatMap((base) => {
    const floor = attainableOf(base);
    const equation = m === 1 ? base : powerOf(base, m);
    return parts.map(([left, right], k) => {
      const root = Number(base.root);
      const iterates = run(equation.at, root - left * base.reach, root + right * base.reach, k);
      return measured(equation, iterates, Math.log(floor), methodClass);
    });
  });
}

export function pick(left: number, right: number, k: number): number {
  return k % 2 === 0 ? left : right;
}

function measured(
  equation: TestEquation,
  iterates: number[],
  lnFloor: number,
  methodClass: MethodClass | null,
): Measured {
  const ref = rootReference(equation.root);
  const lnErrors = iterates.map((x) => {
    const error = Math.abs(signedError(x, ref));
    return error === 0 ? null : Math.log(error);
  });
  const estimate = estimateOrder({ lnErrors, lnFloor, iterates, methodClass });
  return { equation: equation.name, lnErrors, lnFloor, iterates, estimate };
}

/** The q-th quantile of values, by linear interpolation between order statistics. */
export function quantile(values: readonly number[], q: number): number {
  const sorted = values.toSorted((a, b) => a - b);
  const place = q * (sorted.length - 1);
  const [low, high] = [sorted[Math.floor(place)] ?? Number.NaN, sorted[Math.ceil(place)] ?? Number.NaN];
  return low + (place - Math.floor(place)) * (high - low);
}
