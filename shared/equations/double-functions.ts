import acos from '@stdlib/math-base-special-acos';
import acosh from '@stdlib/math-base-special-acosh';
import asin from '@stdlib/math-base-special-asin';
import asinh from '@stdlib/math-base-special-asinh';
import atan from '@stdlib/math-base-special-atan';
import atan2 from '@stdlib/math-base-special-atan2';
import atanh from '@stdlib/math-base-special-atanh';
import cbrt from '@stdlib/math-base-special-cbrt';
import cos from '@stdlib/math-base-special-cos';
import cosh from '@stdlib/math-base-special-cosh';
import erf from '@stdlib/math-base-special-erf';
import exp from '@stdlib/math-base-special-exp';
import expm1 from '@stdlib/math-base-special-expm1';
import hypot from '@stdlib/math-base-special-hypot';
import ln from '@stdlib/math-base-special-ln';
import log1p from '@stdlib/math-base-special-log1p';
import log2 from '@stdlib/math-base-special-log2';
import log10 from '@stdlib/math-base-special-log10';
import pow from '@stdlib/math-base-special-pow';
import sin from '@stdlib/math-base-special-sin';
import sinh from '@stdlib/math-base-special-sinh';
import tan from '@stdlib/math-base-special-tan';
import tanh from '@stdlib/math-base-special-tanh';
import type { CallName } from './arithmetic.ts';

/** A function of one or two binary64 numbers. */
export type DoubleFunction = (a: number, b: number) => number;

/**
 * The binary64 functions. The language leaves the accuracy of its own mathematical functions open, and engines
 * differ in the last bit; these are ports that use + - * / and bit operations only, so that every engine gives
 * the same bits. sqrt, abs, sign, min and max are exact or correctly rounded by definition and stay native.
 */
export const doubleFunctions: Readonly<Record<CallName | 'pow', DoubleFunction>> = {
  exp,
  expm1,
  log: ln,
  log1p,
  log2,
  log10,
  sqrt: Math.sqrt,
  cbrt,
  sin,
  cos,
  tan,
  asin,
  acos,
  atan,
  atan2,
  sinh,
  cosh,
  tanh,
  asinh,
  acosh,
  atanh,
  abs: Math.abs,
  sign: Math.sign,
  min: Math.min,
  max: Math.max,
  hypot,
  erf,
  pow,
};

/**
 * Bounds of the error of `doubleFunctions` in units of the last place of the true value, for arguments taken as
 * exact and results in the normal range. The freely distributable library of Sun Microsystems (1993), on which
 * most ports rest, states less than 1 ulp for its functions in the comments of its sources (from memory); the
 * others have no stated bound. All were measured against 40 decimals at 3,000 to 9,000 random points each: at
 * most 0.81 for those given 1 here, at most 1.74 (hypot) for those given 2. functions.test.ts repeats a part of it.
 */
export const ulpBounds: Readonly<Record<CallName | 'pow', number>> = {
  exp: 1,
  expm1: 1,
  log: 1,
  log1p: 1,
  log2: 1,
  log10: 1,
  sqrt: 0.5,
  cbrt: 1,
  sin: 1,
  cos: 1,
  tan: 1,
  asin: 2,
  acos: 2,
  atan: 1,
  atan2: 2,
  sinh: 2,
  cosh: 2,
  tanh: 2,
  asinh: 2,
  acosh: 2,
  atanh: 2,
  abs: 0,
  sign: 0,
  min: 0,
  max: 0,
  hypot: 2,
  erf: 1,
  pow: 1,
};

/**
 * base^n for a whole n, |n| >= 1, by the one fixed rule of this product: read the binary digits of |n| from the
 * second highest down; square at each digit, and multiply by the base where it is 1; for n < 0 take 1 / base^|n|.
 * So x^3 is (x x) x and x^6 is ((x x) x)^2. Each of the at most 2 log2 n products is rounded once; the relative
 * error is at most about (|n| - 1) u for n > 0 and |n| u for n < 0, with u = 2^-53.
 */
export function integerPower(base: number, exponent: number): number {
  const size = Math.abs(exponent);
  let result = base;
  for (let digit = 1 << (30 - Math.clz32(size)); digit > 0; digit >>= 1) {
    result *= result;
    if (size & digit) result *= base;
  }
  return exponent < 0 ? 1 / result : result;
}

/** c where a < b, d where a > b, their mean where a = b, NaN where one of a and b is NaN. */
export function pickDouble(a: number, b: number, c: number, d: number): number {
  return a < b ? c : a > b ? d : a === b ? (c + d) * 0.5 : Number.NaN;
}
