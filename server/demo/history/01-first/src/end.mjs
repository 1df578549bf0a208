/** How a routine ends: with a root, or saying why not. */
export const root = (x, steps) => ({ root: x, steps });
export const failed = (why, steps) => ({ failed: why, steps });

/** Whether a and b agree to what was asked. */
export function near(a, b, { xabs, xrel }) {
  return Math.abs(b - a) <= xabs + xrel * Math.abs(b);
}

/** Whether f(x) is small enough, where a residual was asked for. */
export function small(y, { fabs }) {
  return Math.abs(y) <= fabs;
}
