/** Neighbours and distances among the binary64 numbers (IEEE 754-2019, 5.3.1 for nextUp and nextDown). */

const view = new DataView(new ArrayBuffer(8));
const smallest = 2 ** -1074;

/** The 64 bits of x as an unsigned integer; every NaN gives the same one. */
export function bitsOf(x: number): bigint {
  view.setFloat64(0, Number.isNaN(x) ? Number.NaN : x);
  return view.getBigUint64(0);
}

/**
 * A key that orders the doubles as their values are ordered; neighbours differ by one, −0 and 0 share a key.
 * Method: the bits read as a signed integer b; b where b ≥ 0, else −(b + 2^63). undefined for NaN.
 */
export function orderKey(x: number): bigint | undefined {
  if (Number.isNaN(x)) return undefined;
  view.setFloat64(0, x);
  const bits = view.getBigInt64(0);
  return bits >= 0n ? bits : -(bits + (1n << 63n));
}

/**
 * How many steps of nextUp lie between a and b, in either direction. Dimensionless.
 * A bigint, since 0 and 1 are already further apart than 2^53. undefined where one of them is NaN.
 */
export function ulpDistance(a: number, b: number): bigint | undefined {
  const left = orderKey(a);
  const right = orderKey(b);
  if (left === undefined || right === undefined) return undefined;
  return left > right ? left - right : right - left;
}

/**
 * The unit in the last place at t: 2^(⌊log2 |t|⌋ − 52), not below 2^−1074; NaN where t is not finite.
 * Read from the exponent's bits, so exact. Source: Muller, On the definition of ulp(x), INRIA RR-5504, 2005
 * (from memory).
 */
export function ulpOf(t: number): number {
  if (!Number.isFinite(t)) return Number.NaN;
  view.setFloat64(0, t);
  const exponent = (view.getUint32(0) >>> 20) & 0x7ff;
  return exponent <= 1 ? smallest : 2 ** (exponent - 1075);
}

/** The least double above x; infinity stays, NaN stays. */
export function nextUp(x: number): number {
  if (Number.isNaN(x) || x === Number.POSITIVE_INFINITY) return x;
  if (x === 0) return smallest;
  view.setFloat64(0, x);
  view.setBigInt64(0, view.getBigInt64(0) + (x > 0 ? 1n : -1n));
  return view.getFloat64(0);
}

/** The greatest double below x; minus infinity stays, NaN stays. */
export function nextDown(x: number): number {
  return -nextUp(-x);
}
