import { leastSquares } from './least-squares.ts';
import type { MethodClass } from './order-raw-checks.ts';
import { at, leadingErrors } from './order-window.ts';

export type PooledStatus = 'estimated' | 'not enough steps' | 'not resolved' | 'steps without gain';

/**
 * The order of convergence from many runs of one solver to one root. Dimensionless.
 * `terms`: how many earlier errors the fitted recurrence uses. `rows`: steps that it was fitted to.
 */
export interface PooledOrder {
  status: PooledStatus;
  value: number | null;
  low: number | null;
  high: number | null;
  standardError: number | null;
  terms: number | null;
  rows: number;
  /** Standard deviation of ln |e| about the fit; null where nothing was fitted. */
  deviation: number | null;
}

/** A step that wins less than this is no sign of superlinear convergence. */
const leastGain = Math.LN2;
/** Share of steps without such a gain beyond which the recurrence is not the whole method. */
const mostWithoutGain = 0.15;
const mostDeviation = 0.3;
const mostTerms = 3;
/** Least half-width, relative: the asymptotic regime is not quite reached in binary64. Measured. */
const leastWidth = 0.005;
/** The same for bracketing methods, whose cycle average 16 digits do not reach. Measured on Pegasus, Anderson–Björck. */
const leastBracketingWidth = 0.06;
/** An order nearer to 1 is not told from linear, and a recurrence of linear gains determines nothing more. */
const leastOrder = 1.1;
/** Largest standard error of an order that is given, relative. */
const mostError = 0.1;

/**
 * Fits L_{k+1} = a₁ L_k + … + a_r L_{k−r+1} + b, L = ln |e|, to the steps of all runs above 16 times the
 * rounding floor, and gives the largest real root of z^r = a₁ z^{r−1} + … + a_r.
 *
 * Method: a one-point method has r = 1 and a₁ = p; the secant obeys ln |e_{k+1}| = ln |e_k| + ln |e_{k−1}| + c,
 * whose characteristic root is its order (Traub 1964, Iterative Methods for the Solution of Equations, ch. 3,
 * from memory). Steps that do not decrease by a factor 2 are left out, and the shallowest quarter where there
 * are ten rows and more. A larger r is taken only where it brings the deviation below a third. Standard error
 * by the delta method; the interval is two of them, at least 0.5 % (bracketing methods 6 %).
 *
 * `runs`: ln of the exact errors of each run, null for a hit. `lnFloor`: ln of the attainable accuracy.
 * Returned, by status: `estimated` · `not enough steps`: under five rows · `not resolved`: the deviation about
 * the fit stays above 0.3, the order is below 1.1 or its standard error above a tenth · `steps without gain`: over 15 % of the steps after the
 * first contraction win less than a factor 2 (bisection; the modified steps of Illinois, for which the
 * recurrence would give a wrong 1.618).
 * Accuracy: tests/published/orders.test.ts.
 */
export function pooledOrder(
  runs: readonly (readonly (number | null)[])[],
  lnFloor: number,
  methodClass: MethodClass = null,
): PooledOrder {
  const usable = runs.map((run) => leadingErrors(run, lnFloor));
  const none = (status: PooledStatus, rows = 0): PooledOrder => {
    return {
      status,
      value: null,
      low: null,
      high: null,
      standardError: null,
      terms: null,
      rows,
      deviation: null,
    };
  };
  if (shareWithoutGain(usable) > mostWithoutGain) return none('steps without gain');

  let best: { terms: number; rows: number; deviation: number; order: Root } | null = null;
  let isFitted = false;
  for (let terms = 1; terms <= mostTerms; terms += 1) {
    const rows = deepRows(usable, terms);
    if (rows.length < Math.max(5, 2 * (terms + 1))) continue;
    const fit = leastSquares(rows);
    if (fit === null) continue;
    isFitted = true;
    const order = largestRoot(fit.coefficients.slice(0, terms), fit.covariance);
    if (order === null || order.standardError > mostError * order.value) continue;
    if (best === null || fit.deviation < best.deviation / 3) {
      best = { terms, rows: rows.length, deviation: fit.deviation, order };
    }
    if (terms === 1 && fit.deviation <= mostDeviation && order.value < leastOrder) break;
  }
  if (best === null) return none(isFitted ? 'not resolved' : 'not enough steps');
  const { terms, rows, deviation, order } = best;
  if (deviation > mostDeviation || order.value < leastOrder)
    return { ...none('not resolved', rows), terms, deviation };
  const least = (methodClass === 'bracketing' ? leastBracketingWidth : leastWidth) * order.value;
  const half = Math.max(2 * order.standardError, least);
  return {
    status: 'estimated',
    value: order.value,
    low: order.value - half,
    high: order.value + half,
    standardError: order.standardError,
    terms,
    rows,
    deviation,
  };
}

/** Of all steps after the first of their run that wins a factor 2, the share that wins less. */
function shareWithoutGain(runs: readonly number[][]): number {
  let steps = 0;
  let without = 0;
  for (const run of runs) {
    const gains = run.slice(1).map((value, i) => at(run, i) - value);
    const first = gains.findIndex((gain) => gain >= leastGain);
    if (first < 0) continue;
    const after = gains.slice(first + 1);
    steps += after.length;
    without += after.filter((gain) => gain < leastGain).length;
  }
  return steps === 0 ? 0 : without / steps;
}

interface Row {
  /** L_k, …, L_{k−r+1}, 1. */
  given: number[];
  /** L_{k+1}. */
  wanted: number;
}

function deepRows(runs: readonly number[][], terms: number): Row[] {
  const rows: Row[] = [];
  for (const run of runs) {
    for (let k = terms - 1; k + 1 < run.length; k += 1) {
      const given = run.slice(k - terms + 1, k + 1).reverse();
      const wanted = at(run, k + 1);
      const isDecreasing = given.every((value, i) => value < (given[i + 1] ?? Number.POSITIVE_INFINITY));
      if (isDecreasing && at(given, 0) - wanted >= leastGain) rows.push({ given: [...given, 1], wanted });
    }
  }
  if (rows.length < 10) return rows;
  rows.sort((a, b) => at(b.given, 0) - at(a.given, 0));
  return rows.slice(Math.floor(rows.length / 4));
}

interface Root {
  value: number;
  standardError: number;
}

/** The largest real root of g(z) = z^r − a₁ z^{r−1} − … − a_r, with ∂z/∂a_i = z^{r−i} / g′(z). */
function largestRoot(a: readonly number[], covariance: readonly (readonly number[])[]): Root | null {
  const r = a.length;
  const g = (z: number) => a.reduce((value, ai, i) => value - ai * z ** (r - 1 - i), z ** r);
  const slope = (z: number) => {
    return a.reduce((value, ai, i) => value - ai * (r - 1 - i) * z ** (r - 2 - i), r * z ** (r - 1));
  };
  // Every root lies within Cauchy's bound; g is positive there, so the first change of sign from above is it.
  const bound = 1 + Math.max(...a.map(Math.abs));
  const steps = 4000;
  let high = bound;
  for (let i = 1; i <= steps; i += 1) {
    const low = bound * (1 - i / steps);
    if (g(low) > 0) {
      high = low;
      continue;
    }
    const value = bisect(g, low, high);
    const derivative = slope(value);
    const gradient = a.map((_, j) => value ** (r - 1 - j) / derivative);
    const variance = gradient.reduce((total, gi, i2) => {
      return total + gradient.reduce((part, gj, j2) => part + gi * gj * (covariance[i2]?.[j2] ?? 0), 0);
    }, 0);
    return Number.isFinite(variance) ? { value, standardError: Math.sqrt(Math.max(0, variance)) } : null;
  }
  return null;
}

function bisect(g: (z: number) => number, low: number, high: number): number {
  let [a, b] = [low, high];
  for (let i = 0; i < 60; i += 1) {
    const middle = a + (b - a) / 2;
    if (g(middle) > 0) b = middle;
    else a = middle;
  }
  return a + (b - a) / 2;
}
