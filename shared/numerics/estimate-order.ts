import type { OrderEstimate } from '../schemas/solve.ts';
import { fitLongLinear, fitShortLinear, type LinearFit } from './order-linear.ts';
import { hasStopped, type MethodClass, rawCheck } from './order-raw-checks.ts';
import { fitEnvelope, fitMonotone, type SuperlinearFit } from './order-superlinear.ts';
import { at, convergingWindow, leadingErrors, type OrderWindow, sum } from './order-window.ts';

export interface OrderInput {
  /** ln |x_k − r| of the iterates, from exact errors; null where x_k is the root itself. */
  lnErrors: readonly (number | null)[];
  /** ln of the attainable accuracy of the root. */
  lnFloor: number;
  /** The iterates themselves, one for each error, for the checks of cycles and divergence. */
  iterates?: readonly number[];
  /** What the author says the method is; null or left out where unknown. */
  methodClass?: MethodClass;
}

/** What is known where nothing could be estimated. */
export function emptyEstimate(status: OrderEstimate['status'], steps = 0): OrderEstimate {
  return {
    status,
    kind: null,
    value: null,
    low: null,
    high: null,
    steps,
    rate: null,
    rateLow: null,
    rateHigh: null,
    constant: null,
    period: null,
  };
}

/**
 * Estimates the order of convergence p, lim |e_{k+1}| / |e_k|^p = C, from one run in binary64.
 *
 * Method: ratios of the gains D_k = ln |e_k| − ln |e_{k+1}| over the iterates that stand above 16 times the
 * rounding floor. Without that cut every formula for the order measures rounding (the last three iterates of
 * Newton give 0 in the median). Linear convergence is told first, from gains that do not grow; what is left is
 * superlinear (see order-linear.ts, order-superlinear.ts) or, not monotone, judged by its envelope.
 *
 * Returned, by status: `estimated`: value within [low, high]; kind Q (two ratios agree), memory (averaged
 * ratios), R (envelope) · `one ratio`: value and interval rest on a single ratio, wrong for bracketing methods
 * as a rule, so not to be shown; where the method is declared one-point it is `estimated` · `linear`,
 * `superlinear of order 1`, `sublinear or very slow linear`: value 1, rate within [rateLow, rateHigh] a step ·
 * `undecided`: linear or superlinear · `superlinear, order not resolved`: interval without value · `not enough
 * steps` (a normal answer: order 3 has one ratio in 16 digits, order 4 often none) · `stagnation`: eight steps
 * and more that win less than a factor 2 in all · `stopped moving`, `cycle` (with its period), `diverged`,
 * `left the domain`: from the iterates. `stopped moving` is said only where no order was found before it
 * stopped: a solver may well report its last x twice.
 * `constant`: C for an integer order (kind Q within 0.05 of it), else its power of ten alone; the rate where
 * the order is 1.
 *
 * Throws RangeError where `iterates` and `lnErrors` differ in number.
 * Accuracy: tests/published/orders.test.ts. In binary64 the order of Muller's method, of Illinois, of Anderson
 * and Björck and of orders above 4 is seldom resolved in one run. Not to be trusted where F is measured wrong.
 *
 * Source: definitions of orders by Ortega & Rheinboldt 1970 and Catinas 2021, SIAM Review 63, 585–624; ratio
 * of gains by Weerakoon & Fernando 2000, Appl. Math. Lett. 13(8), 87–93 (from memory); thresholds calibrated.
 */
export function estimateOrder(input: OrderInput): OrderEstimate {
  const { lnErrors, lnFloor, iterates, methodClass = null } = input;
  if (iterates !== undefined && iterates.length !== lnErrors.length) {
    throw new RangeError('One error for each iterate was expected.');
  }
  if (iterates !== undefined) {
    const raw = rawCheck(iterates, lnErrors, lnFloor, methodClass);
    if (raw !== null) return { ...emptyEstimate(raw.status), period: raw.period };
  }
  const estimate = fromErrors(leadingErrors(lnErrors, lnFloor), methodClass);
  const isOpen = estimate.value === null && estimate.low === null;
  if (isOpen && iterates !== undefined && hasStopped(iterates, lnErrors, lnFloor, methodClass)) {
    return emptyEstimate('stopped moving', estimate.steps);
  }
  return estimate;
}

function fromErrors(leading: readonly number[], methodClass: MethodClass): OrderEstimate {
  if (leading.length < 3) return emptyEstimate('not enough steps', Math.max(0, leading.length - 1));
  const window = convergingWindow(leading);
  const steps = window.gains.length;
  if (window.lnErrors.length < 3) return emptyEstimate('not enough steps', steps);
  if (steps >= 8 && sum(window.gains) < Math.LN2) return emptyEstimate('stagnation', steps);
  const linear = fitLongLinear(window) ?? fitShortLinear(window);
  if (linear !== null) return linearEstimate(linear, window);
  const fit = window.isMonotone ? fitMonotone(window.gains) : fitEnvelope(window);
  const isShown = fit.status === 'one ratio' && methodClass === 'one-point';
  return {
    ...emptyEstimate(isShown ? 'estimated' : fit.status, steps),
    kind: fit.kind,
    value: fit.value,
    low: fit.low,
    high: fit.high,
    constant: errorConstant(fit, window),
  };
}

function linearEstimate(fit: LinearFit, window: OrderWindow): OrderEstimate {
  return {
    ...emptyEstimate(fit.status, window.gains.length),
    kind: window.isMonotone ? null : 'R',
    value: 1,
    low: fit.low,
    high: fit.high,
    rate: fit.rate,
    rateLow: fit.rateLow,
    rateHigh: fit.rateHigh,
    constant: fit.rate,
  };
}

/** C = e_{k+1} / e_k^p from the last two errors. An order that is off by δ shifts it by e_k^δ: hence the rules. */
function errorConstant(fit: SuperlinearFit, window: OrderWindow): number | null {
  if (fit.value === null || fit.status === 'undecided' || fit.kind === 'R') return null;
  const nearest = Math.round(fit.value);
  const isInteger = fit.kind === 'Q' && Math.abs(fit.value - nearest) < 0.05;
  const order = isInteger ? nearest : fit.value;
  const lnConstant = at(window.lnErrors, -1) - order * at(window.lnErrors, -2);
  const constant = isInteger ? Math.exp(lnConstant) : 10 ** Math.round(lnConstant / Math.LN10);
  return Number.isFinite(constant) && constant > 0 ? constant : null;
}
