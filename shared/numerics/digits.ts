import { type RootReference, signedError } from './root-reference.ts';
import { ulpOf } from './ulps.ts';

/** Digits shown where x is the root rounded to binary64. */
export const exactDigits = 16;
/** The most digits ever shown. */
export const mostDigits = 17;

export interface CorrectDigits {
  /** 0 to 17, dimensionless. */
  digits: number;
  /** x is the root rounded to binary64. */
  exact: boolean;
  /** x − r, signed, in the unit of x. */
  error: number;
  /** The same in units in the last place of the root. */
  ulps: number;
  /** The root is 0: the digits are those of |x| itself, not relative to the root. */
  absolute: boolean;
}

/**
 * How many decimal digits of x are right: −log10(|x − r| / |r|), or −log10 |x| where r = 0.
 *
 * The error is taken against the root itself, never against the root rounded to binary64. Not below 0, not
 * above 17; 16 and `exact` where x is the root rounded to binary64 (−0 counts as 0).
 * `x`: any double. Where it is not finite the digits are 0 and `error` and `ulps` are not finite either.
 */
export function correctDigits(x: number, ref: RootReference): CorrectDigits {
  const error = signedError(x, ref);
  const absolute = ref.hi === 0;
  const ulps = error / ulpOf(ref.hi);
  if (x === ref.hi) return { digits: exactDigits, exact: true, error, ulps, absolute };
  return { digits: digitsOfError(error, ref), exact: false, error, ulps, absolute };
}

/** Correct digits of an error x − r that is already known; see `correctDigits`. */
export function digitsOfError(error: number, ref: RootReference): number {
  if (!Number.isFinite(error)) return 0;
  const size = Math.abs(error);
  // A difference of logarithms: the quotient would overflow for a large error of a tiny root.
  const digits = (ref.hi === 0 ? 0 : Math.log10(Math.abs(ref.hi))) - Math.log10(size);
  return Math.min(mostDigits, Math.max(0, digits));
}

/** The root nearest to x (the first of several at the same distance); null where there is none or x is NaN. */
export function nearestRoot(
  x: number,
  refs: readonly RootReference[],
): { index: number; error: number } | null {
  let best: { index: number; error: number } | null = null;
  if (Number.isNaN(x)) return null;
  for (const [index, ref] of refs.entries()) {
    const error = signedError(x, ref);
    if (best === null || Math.abs(error) < Math.abs(best.error)) best = { index, error };
  }
  return best;
}
