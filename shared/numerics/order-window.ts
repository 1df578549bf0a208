/** Which errors of a run say something about its order, and what is won from one to the next. */

/** Errors within 16 times the rounding floor are not used: ln there is biased by up to ln(1 + 1/16) = 0.06. */
export const lnFloorFactor = Math.log(16);

export interface OrderWindow {
  /** ln of the usable errors, from the last global maximum on. */
  lnErrors: number[];
  /** They decrease strictly. */
  isMonotone: boolean;
  /** Gains D = L_k − L_{k+1} of the errors' tail-maximum envelope; those of the errors where monotone. */
  gains: number[];
}

/** The leading errors that stand above the rounding floor; a hit of the root (null) ends them. */
export function leadingErrors(lnErrors: readonly (number | null)[], lnFloor: number): number[] {
  const leading: number[] = [];
  for (const value of lnErrors) {
    if (value === null || !Number.isFinite(value) || !(value > lnFloor + lnFloorFactor)) break;
    leading.push(value);
  }
  return leading;
}

/**
 * Cuts a run to the part that converges.
 *
 * What comes before the last global maximum is dropped. Where the rest is not monotone but ends in a strictly
 * decreasing stretch of four points or more that holds three quarters of the whole descent, only that is kept:
 * a wandering start then does not spoil a clean end. The envelope E_i = max over j ≥ i of L_j has the same
 * R-order (Potra 1989, J. Optim. Theory Appl. 63, 415–431; Catinas 2021, SIAM Review 63, 585–624) and is
 * monotone.
 */
export function convergingWindow(leading: readonly number[]): OrderWindow {
  const highest = Math.max(...leading);
  let kept = leading.slice(leading.lastIndexOf(highest));
  let isMonotone = isDecreasing(kept);
  if (!isMonotone) {
    let from = kept.length - 1;
    while (from > 0 && at(kept, from - 1) > at(kept, from)) from -= 1;
    const suffix = kept.slice(from);
    const last = at(suffix, suffix.length - 1);
    const isMostOfIt = at(suffix, 0) - last >= 0.75 * (at(kept, 0) - last);
    if (suffix.length >= 4 && isMostOfIt) {
      kept = suffix;
      isMonotone = true;
    }
  }
  const envelope = kept.slice();
  for (let i = envelope.length - 2; i >= 0; i -= 1) {
    envelope[i] = Math.max(at(envelope, i), at(envelope, i + 1));
  }
  const gains = envelope.slice(1).map((value, i) => at(envelope, i) - value);
  return { lnErrors: kept, isMonotone, gains };
}

function isDecreasing(values: readonly number[]): boolean {
  return values.every((value, i) => i === 0 || value < at(values, i - 1));
}

/** The i-th value; counts from the end where i is negative. Throws RangeError where there is none. */
export function at(values: readonly number[], i: number): number {
  const value = values.at(i);
  if (value === undefined) throw new RangeError(`No value ${i} among ${values.length}.`);
  return value;
}

export function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}

export function mean(values: readonly number[]): number {
  return sum(values) / values.length;
}

export function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const half = sorted.length >> 1;
  return sorted.length % 2 === 1 ? at(sorted, half) : (at(sorted, half - 1) + at(sorted, half)) / 2;
}
