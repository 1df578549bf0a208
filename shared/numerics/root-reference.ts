import Decimal from 'decimal.js';

/** Wide enough for the exact decimal expansion of every double (767 significant digits) and its differences. */
const Wide = Decimal.clone({ precision: 1300, minE: -9e15, maxE: 9e15, toExpNeg: -1e9, toExpPos: 1e9 });

/**
 * A root as an unevaluated sum of three doubles, hi + mid + lo, each the nearest to what the ones before leave:
 * about 159 bits, so that an error against it needs no decimal arithmetic.
 */
export interface RootReference {
  readonly text: string;
  /** The root rounded to binary64. */
  readonly hi: number;
  readonly mid: number;
  readonly lo: number;
}

/** The exact value of a finite double (its shortest decimal is not its value). */
export function exactDecimal(x: number): Decimal {
  if (!Number.isFinite(x)) throw new RangeError('Only a finite number has a decimal expansion.');
  if (x === 0) return new Wide(0);
  // Scaled by powers of two until it is an integer: both steps are exact, the shift in two halves because
  // 2^1074 is beyond the range of a double.
  let scaled = x;
  let shift = 0;
  while (!Number.isInteger(scaled)) {
    scaled *= 2 ** 64;
    shift += 64;
  }
  return new Wide(BigInt(scaled).toString()).div(new Wide(2).pow(shift));
}

/**
 * Prepares a root for `signedError`.
 * `decimalText`: the root as an exact decimal, as certified (40 digits and more).
 * Throws RangeError where it is no decimal, or beyond the largest double, or not 0 and below the least one.
 */
export function rootReference(decimalText: string): RootReference {
  let exact: Decimal;
  try {
    exact = new Wide(decimalText);
  } catch {
    throw new RangeError(`“${decimalText}” is not a decimal number.`);
  }
  const hi = Number(decimalText);
  if (!exact.isFinite() || !Number.isFinite(hi)) throw new RangeError(`${decimalText} is beyond binary64.`);
  if (hi === 0 && !exact.isZero()) throw new RangeError(`${decimalText} is below the least binary64.`);
  const afterHi = exact.minus(exactDecimal(hi));
  const mid = Number(afterHi.toString());
  const lo = Number(afterHi.minus(exactDecimal(mid)).toString());
  return { text: decimalText, hi: hi === 0 ? 0 : hi, mid, lo };
}

/**
 * The signed error x − r, rounded to about one unit in its own last place (2^−1074 at least).
 *
 * Method: x − hi with its rounding error by Knuth's two-sum (The Art of Computer Programming 2, 4.2.2, from
 * memory), then mid and lo. Where x is close to r, x − hi is exact (Sterbenz) and cancels against mid by a
 * factor of 2 at most, because hi is r rounded; elsewhere mid is negligible.
 * `x`: any double. Returns ±infinity or NaN for such an x, and ±infinity where the difference overflows.
 * Accuracy: tests/shared/numerics/root-reference.test.ts against exact decimal differences.
 */
export function signedError(x: number, ref: RootReference): number {
  const difference = x - ref.hi;
  if (!Number.isFinite(difference)) return difference;
  const part = difference - x;
  const lost = x - (difference - part) + (-ref.hi - part);
  return difference + (lost - ref.mid - ref.lo);
}
