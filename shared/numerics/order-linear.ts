import type { OrderStatus } from '../schemas/solve.ts';
import { at, mean, median, type OrderWindow, sum } from './order-window.ts';

export interface LinearFit {
  status: Extract<OrderStatus, 'linear' | 'superlinear of order 1' | 'sublinear or very slow linear'>;
  low: number;
  high: number;
  rate: number;
  rateLow: number;
  rateHigh: number;
}

/** Half-width that the interval of an order 1 has beyond the measured growth of the gains; calibrated. */
const margin = 0.02;
/** The same where only four gains were seen. */
const shortMargin = 0.05;

/**
 * Order one from a long window of eight gains or more, or null where the gains grow or shrink too much.
 *
 * W = the last 40 gains at most, h half of them; p = (sum of the last h / sum of the h before)^(1/h) is the
 * growth of the gains a step: 1 where convergence is linear. A run whose last two gains leap up (over 2.5 and
 * 1.4 times the median) has just left a long linear phase and is no linear run.
 */
export function fitLongLinear({ isMonotone, gains }: OrderWindow): LinearFit | null {
  if (gains.length < 8) return null;
  const window = gains.slice(-40);
  const h = window.length >> 1;
  const recent = window.slice(-h);
  const before = window.slice(-2 * h, -h);
  const growth = sum(recent) / sum(before);
  const p = growth ** (1 / h);
  const typical = median(window);
  const leaps = isMonotone && at(window, -1) > 2.5 * typical && at(window, -2) > 1.4 * typical;
  if (!(p >= 0.93 && p <= 1.07) || leaps) return null;
  const rate = Math.exp(-mean(recent));
  const singles = isMonotone ? recent : movingMeans(recent, Math.max(1, h >> 1));
  const isSuperlinear = isMonotone && growth > 1.15;
  const status = isSuperlinear
    ? 'superlinear of order 1'
    : rate > 0.98
      ? 'sublinear or very slow linear'
      : 'linear';
  return { status, low: Math.min(p, 1) - margin, high: Math.max(p, 1) + margin, rate, ...rates(singles) };
}

/** Order one from the last four gains of a monotone run: all within 12 % of their mean, the last not rising. */
export function fitShortLinear({ isMonotone, gains }: OrderWindow): LinearFit | null {
  if (!isMonotone || gains.length < 4) return null;
  const four = gains.slice(-4);
  const middle = mean(four);
  const isEven = four.every((gain) => Math.abs(gain - middle) <= 0.12 * middle);
  if (!isEven || !(at(four, -1) < 1.06 * at(four, -2))) return null;
  const p = Math.sqrt((at(four, 3) + at(four, 2)) / (at(four, 1) + at(four, 0)));
  const rate = Math.exp(-middle);
  return {
    status: rate > 0.98 ? 'sublinear or very slow linear' : 'linear',
    low: Math.min(p, 1) - shortMargin,
    high: Math.max(p, 1) + shortMargin,
    rate,
    ...rates(four),
  };
}

function rates(gains: readonly number[]): { rateLow: number; rateHigh: number } {
  return { rateLow: Math.exp(-Math.max(...gains)), rateHigh: Math.exp(-Math.min(...gains)) };
}

function movingMeans(values: readonly number[], width: number): number[] {
  const means: number[] = [];
  for (let i = 0; i + width <= values.length; i += 1) means.push(mean(values.slice(i, i + width)));
  return means;
}
