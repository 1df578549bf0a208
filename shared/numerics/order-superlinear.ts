import type { OrderEstimate } from '../schemas/solve.ts';
import { at, type OrderWindow, sum } from './order-window.ts';

export interface SuperlinearFit {
  status: Extract<
    OrderEstimate['status'],
    'estimated' | 'one ratio' | 'undecided' | 'superlinear, order not resolved' | 'not enough steps'
  >;
  kind: OrderEstimate['kind'];
  value: number | null;
  low: number | null;
  high: number | null;
}

const notEnough: SuperlinearFit = {
  status: 'not enough steps',
  kind: null,
  value: null,
  low: null,
  high: null,
};

/** A gain below ln 2 is no sign of superlinear convergence. */
const leastGain = Math.LN2;
/** Half-width of a single ratio, times p / S: 95 % of measured deviations lie within it. */
const ratioWidth = 0.33;
/** Spread of the logs of block estimates beyond which no order is given. */
const widestSpread = 0.45;
/** An order nearer to 1 than this is not told from linear. */
const leastOrder = 1.08;

/**
 * Order of a monotone run from the ratios of its gains (Weerakoon & Fernando 2000, Appl. Math. Lett. 13(8),
 * 87–93: ρ = D_k / D_{k−1}), S the longest run of last gains that are all ln 2 or more:
 * one ratio alone · two that agree within 10 % (kind Q) · else averages over blocks (kind memory), since the
 * ratios of a method with memory swing about its order.
 * The constants were calibrated on 360 binary64 runs each of Newton, Halley, an order-4 method and the secant.
 */
export function fitMonotone(gains: readonly number[]): SuperlinearFit {
  let from = gains.length;
  while (from > 0 && at(gains, from - 1) >= leastGain) from -= 1;
  const s = gains.slice(from);
  if (s.length < 2) return notEnough;
  const before = at(s, -2);
  const p1 = at(s, -1) / before;
  if (s.length === 2) {
    if (before < 1 || p1 < 1.3) return notEnough;
    const half = Math.max((ratioWidth * p1) / before, 0.05);
    return { status: 'one ratio', kind: 'one ratio', value: p1, low: p1 - half, high: p1 + half };
  }
  const p2 = before / at(s, -3);
  if (p1 > 1.03 && Math.abs(Math.log(p1 / p2)) <= 0.1) {
    const half = Math.max((ratioWidth * p1) / before, Math.abs(p1 - p2), 0.01 * p1);
    return {
      status: p1 - half <= 1 ? 'undecided' : 'estimated',
      kind: 'Q',
      value: p1,
      low: p1 - half,
      high: p1 + half,
    };
  }
  return fitMemory(s);
}

function fitMemory(s: readonly number[]): SuperlinearFit {
  const { h, estimates, spread } = evenestBlocks(s, 1, 4, 2);
  if (estimates.length === 0) return notEnough;
  let value = geometricMean(estimates);
  if (h === 1 && s.length === 3) {
    value = (at(s, -1) + at(s, -2)) / (at(s, -2) + at(s, -3));
  } else if (h === 1 && s.length >= 4 && spread > 0.1) {
    value = Math.sqrt((at(s, -1) + at(s, -2)) / (at(s, -3) + at(s, -4)));
  }
  const half = Math.max(1 / at(s, -2), 0.05 * value);
  const low = Math.min(...estimates, value - half);
  const high = Math.max(...estimates, value + half);
  if (spread > widestSpread) {
    return { status: 'superlinear, order not resolved', kind: 'memory', value: null, low, high };
  }
  return { status: value < leastOrder ? 'undecided' : 'estimated', kind: 'memory', value, low, high };
}

/**
 * Order of a run that is not monotone from the gains of its envelope (kind R), by blocks of two and more.
 * The interval is the hull of the block estimates and the order ± 7 %; a factor 1.25 where there is only one.
 */
export function fitEnvelope({ gains }: OrderWindow): SuperlinearFit {
  if (gains.length < 6) return notEnough;
  const { estimates, spread } = evenestBlocks(gains, 2, Math.min(gains.length >> 1, 6), 1);
  if (estimates.length === 0 || spread > widestSpread) return notEnough;
  const value = geometricMean(estimates);
  const isAlone = estimates.length === 1;
  return {
    status: value < leastOrder ? 'undecided' : 'estimated',
    kind: 'R',
    value,
    low: Math.min(...estimates, value * (isAlone ? 0.8 : 0.93)),
    high: Math.max(...estimates, value * (isAlone ? 1.25 : 1.07)),
  };
}

/**
 * Block estimates (sum of h gains / sum of the h before)^(1/h), shifted by 0 to h from the end, for the h whose
 * logs spread least; a longer block must win by 0.02. Gains of 0 (an envelope that rests) give no estimate.
 */
function evenestBlocks(
  gains: readonly number[],
  least: number,
  most: number,
  leastCount: number,
): { h: number; estimates: number[]; spread: number } {
  let best: { h: number; estimates: number[]; spread: number } = {
    h: 0,
    estimates: [],
    spread: Number.POSITIVE_INFINITY,
  };
  for (let h = least; h <= most; h += 1) {
    const estimates: number[] = [];
    for (let shift = 0; shift <= h && 2 * h + shift <= gains.length; shift += 1) {
      const end = gains.length - shift;
      const ratio = sum(gains.slice(end - h, end)) / sum(gains.slice(end - 2 * h, end - h));
      if (ratio > 0 && Number.isFinite(ratio)) estimates.push(ratio ** (1 / h));
    }
    if (estimates.length < leastCount) continue;
    const logs = estimates.map(Math.log);
    const spread = Math.max(...logs) - Math.min(...logs);
    if (spread < best.spread - 0.02 || best.estimates.length === 0) best = { h, estimates, spread };
  }
  return best;
}

function geometricMean(values: readonly number[]): number {
  return Math.exp(sum(values.map(Math.log)) / values.length);
}
