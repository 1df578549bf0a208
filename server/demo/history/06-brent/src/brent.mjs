import { failed, root } from './end.mjs';

const EPSILON = 2 ** -52;

/**
 * The method of Brent and Dekker: inverse quadratic interpolation or a secant step where that is safe,
 * else a bisection. Ends when half the bracket is within 2 ε |b| and the tolerance, or f is zero.
 * R. P. Brent, Algorithms for Minimization without Derivatives, 1973, chapter 4.
 */
export function brent(f, x0, x1, { xabs, xrel }, most, step) {
  let a = x0;
  let b = x1;
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return root(a, 0);
  if (fb === 0) return root(b, 0);
  if (!(Math.sign(fa) * Math.sign(fb) < 0)) return failed('no change of sign', 0);
  let c = a;
  let fc = fa;
  let move = b - a;
  let moveBefore = move;
  for (let k = 1; k <= most; k += 1) {
    // b is the best point so far, c the other end of the bracket, a the b before.
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const enough = 2 * EPSILON * Math.abs(b) + xabs + xrel * Math.abs(b);
    const half = (c - b) / 2;
    if (Math.abs(half) <= enough || fb === 0) return root(b, k - 1);
    const trial = interpolate(a, fa, b, fb, c, fc, half);
    const isSafe =
      Math.abs(moveBefore) >= enough &&
      Math.abs(fa) > Math.abs(fb) &&
      2 * trial.p < Math.min(3 * half * trial.q - Math.abs(enough * trial.q), Math.abs(moveBefore * trial.q));
    moveBefore = isSafe ? move : half;
    move = isSafe ? trial.p / trial.q : half;
    a = b;
    fa = fb;
    b += Math.abs(move) > enough ? move : Math.sign(half) * enough;
    fb = f(b);
    if (Number.isNaN(fb)) return failed('f is not defined there', k);
    if (fb > 0 === fc > 0) {
      c = a;
      fc = fa;
      move = b - a;
      moveBefore = move;
    }
    step(b, Math.min(b, c), Math.max(b, c));
  }
  return failed('too many steps', most);
}

/** The step p / q from b towards c, with p ≥ 0: a secant step, or inverse quadratic through three points. */
function interpolate(a, fa, b, fb, c, fc, half) {
  const s = fb / fa;
  let p;
  let q;
  if (a === c) {
    p = 2 * half * s;
    q = 1 - s;
  } else {
    const t = fa / fc;
    const r = fb / fc;
    p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
    q = (t - 1) * (r - 1) * (s - 1);
  }
  return p > 0 ? { p, q: -q } : { p: -p, q };
}
