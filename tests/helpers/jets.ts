/** A value with its first and second derivative in x: forward differentiation of test equations. */
export interface Jet {
  v: number;
  d: number;
  e: number;
}

export const variable = (x: number): Jet => ({ v: x, d: 1, e: 0 });
const lift = (a: Jet | number): Jet => (typeof a === 'number' ? { v: a, d: 0, e: 0 } : a);

export function add(...parts: (Jet | number)[]): Jet {
  return parts.map(lift).reduce((a, b) => ({ v: a.v + b.v, d: a.d + b.d, e: a.e + b.e }));
}

export function neg(a: Jet): Jet {
  return { v: -a.v, d: -a.d, e: -a.e };
}

export function mul(left: Jet | number, right: Jet | number): Jet {
  const [a, b] = [lift(left), lift(right)];
  return { v: a.v * b.v, d: a.d * b.v + a.v * b.d, e: a.e * b.v + 2 * a.d * b.d + a.v * b.e };
}

/** g(a) from g, g′ and g″ at a. */
function chain(a: Jet, g: number, g1: number, g2: number): Jet {
  return { v: g, d: g1 * a.d, e: g2 * a.d * a.d + g1 * a.e };
}

export function pow(a: Jet, n: number): Jet {
  if (n === 1) return a;
  return n % 2 === 0 ? pow(mul(a, a), n / 2) : mul(a, pow(a, n - 1));
}

export const exp = (a: Jet) => chain(a, Math.exp(a.v), Math.exp(a.v), Math.exp(a.v));
export const sin = (a: Jet) => chain(a, Math.sin(a.v), Math.cos(a.v), -Math.sin(a.v));
export const cos = (a: Jet) => chain(a, Math.cos(a.v), -Math.sin(a.v), -Math.cos(a.v));
export const cosh = (a: Jet) => chain(a, Math.cosh(a.v), Math.sinh(a.v), Math.cosh(a.v));
export const log = (a: Jet) => chain(a, Math.log(a.v), 1 / a.v, -1 / (a.v * a.v));
export const sqrt = (a: Jet) => {
  const root = Math.sqrt(a.v);
  return chain(a, root, 0.5 / root, -0.25 / (root * a.v));
};
