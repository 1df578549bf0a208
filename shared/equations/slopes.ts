import type { CallName } from './arithmetic.ts';
import type { Ref } from './program.ts';
import type { ProgramBuilder } from './program-builder.ts';

/** First and second derivative of a function at a value `u`; `v` is the function's own value there. */
export interface Slopes {
  first: Ref;
  /** null: it is 0 for every u. */
  second: () => Ref | null;
}

/**
 * Derivatives of the functions of one argument, in forms that neither cancel nor leave the domain: where the
 * function is undefined, so is its derivative (log has a gate, since 1/u exists for u < 0 too).
 *
 * At a kink the mean of the two one-sided derivatives is taken: abs'(0) = 0. At a jump (sign at 0) there is none.
 */
export function slopesOf<Value>(
  build: ProgramBuilder<Value>,
  name: Exclude<CallName, 'atan2' | 'hypot' | 'min' | 'max'>,
  u: Ref,
  v: Ref,
): Slopes {
  const number = (text: string) => build.number(text);
  const negate = (a: Ref) => build.apply({ kind: 'negate' }, a);
  const add = (a: Ref, b: Ref) => build.apply({ kind: 'add' }, a, b);
  const subtract = (a: Ref, b: Ref) => build.apply({ kind: 'subtract' }, a, b);
  const multiply = (a: Ref, b: Ref) => build.apply({ kind: 'multiply' }, a, b);
  const divide = (a: Ref, b: Ref) => build.apply({ kind: 'divide' }, a, b);
  const whole = (a: Ref, exponent: number) => build.apply({ kind: 'integerPower', exponent }, a);
  const call = (of: CallName, a: Ref) => build.apply({ kind: 'call', name: of }, a);
  const inside = (a: Ref, b: Ref) => build.apply({ kind: 'gate', test: 'notNegative' }, a, b);
  const one = number('1');
  const logarithm = (scale: Ref | null): Slopes => {
    const first = inside(u, divide(one, scale === null ? u : multiply(u, scale)));
    return { first, second: () => negate(divide(first, u)) };
  };
  switch (name) {
    case 'exp':
      return { first: v, second: () => v };
    case 'expm1': {
      const first = call('exp', u);
      return { first, second: () => first };
    }
    case 'log':
      return logarithm(null);
    case 'log2':
      return logarithm(build.constant('ln2'));
    case 'log10':
      return logarithm(build.constant('ln10'));
    case 'log1p': {
      const w = add(one, u);
      const first = inside(w, divide(one, w));
      return { first, second: () => negate(whole(first, 2)) };
    }
    case 'sqrt': {
      const first = divide(number('0.5'), v);
      return { first, second: () => negate(divide(first, multiply(number('2'), u))) };
    }
    case 'cbrt':
      return {
        first: divide(one, multiply(number('3'), whole(v, 2))),
        second: () => divide(number('-2'), multiply(number('9'), whole(v, 5))),
      };
    case 'sin':
      return { first: call('cos', u), second: () => negate(v) };
    case 'cos':
      return { first: negate(call('sin', u)), second: () => negate(v) };
    case 'tan': {
      const first = add(one, whole(v, 2));
      return { first, second: () => multiply(multiply(number('2'), v), first) };
    }
    case 'asin':
    case 'acos': {
      const w = multiply(subtract(one, u), add(one, u));
      const root = divide(one, call('sqrt', w));
      const first = name === 'asin' ? root : negate(root);
      return { first, second: () => multiply(divide(u, w), first) };
    }
    case 'atan': {
      const first = divide(one, add(one, whole(u, 2)));
      return { first, second: () => multiply(multiply(number('-2'), u), whole(first, 2)) };
    }
    case 'sinh':
      return { first: call('cosh', u), second: () => v };
    case 'cosh':
      return { first: call('sinh', u), second: () => v };
    case 'tanh': {
      const first = divide(one, whole(call('cosh', u), 2));
      return { first, second: () => multiply(multiply(number('-2'), v), first) };
    }
    case 'asinh': {
      const first = divide(one, call('sqrt', add(one, whole(u, 2))));
      return { first, second: () => negate(multiply(u, whole(first, 3))) };
    }
    case 'acosh': {
      const below = subtract(u, one);
      const first = inside(below, divide(one, call('sqrt', multiply(below, add(u, one)))));
      return { first, second: () => negate(multiply(u, whole(first, 3))) };
    }
    case 'atanh': {
      const w = multiply(subtract(one, u), add(one, u));
      const first = inside(w, divide(one, w));
      return { first, second: () => multiply(multiply(number('2'), u), whole(first, 2)) };
    }
    case 'abs': {
      const first = build.apply({ kind: 'pick' }, u, number('0'), number('-1'), one);
      return { first, second: () => null };
    }
    case 'sign': {
      const first = build.apply({ kind: 'gate', test: 'notZero' }, u, number('0'));
      return { first, second: () => first };
    }
    case 'erf': {
      const first = multiply(build.constant('twoOverSqrtPi'), call('exp', negate(whole(u, 2))));
      return { first, second: () => multiply(multiply(number('-2'), u), first) };
    }
  }
}
