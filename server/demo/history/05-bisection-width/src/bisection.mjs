import { failed, near, root, small } from './end.mjs';

/** Bisection: halves the bracket until it is as narrow as asked. */
export function bisection(f, a, b, tolerance, most, step) {
  let low = a;
  let high = b;
  let fLow = f(low);
  if (small(fLow, tolerance)) return root(low, 0);
  const fHigh = f(high);
  if (small(fHigh, tolerance)) return root(high, 0);
  if (!(Math.sign(fLow) * Math.sign(fHigh) < 0)) return failed('no change of sign', 0);
  for (let k = 1; k <= most; k += 1) {
    const c = low + (high - low) / 2;
    if (c === low || c === high) return root(c, k - 1);
    const fc = f(c);
    if (Number.isNaN(fc)) return failed('f is not defined there', k);
    if (fc < 0 === fLow < 0) {
      low = c;
      fLow = fc;
    } else {
      high = c;
    }
    step(c, low, high);
    if (small(fc, tolerance) || near(low, high, tolerance)) return root(c, k);
  }
  return failed('too many steps', most);
}
