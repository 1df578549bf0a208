import { Decimal } from 'decimal.js';
import type { CallName } from './arithmetic.ts';
import { type DecimalFunctions, decimalFunctions } from './decimal-functions.ts';

/** A closed interval that certainly holds a value. */
export interface Interval {
  low: Decimal;
  high: Decimal;
}

/** Digits that transcendental functions carry beyond the interval's own before they are rounded outward. */
const guardDigits = 8;

const largestExponent = 1e9;

/**
 * Outward rounded intervals of one precision; null stands for “not defined, or not decided, somewhere in there”.
 *
 * + - * / are rounded down and up by two constructors. Every other function is computed to eight digits more and
 * its ends are then moved outward by one unit of the last place and rounded outward.
 */
export class Intervals {
  readonly functions: DecimalFunctions;
  readonly Down: typeof Decimal;
  readonly Up: typeof Decimal;
  readonly #unit: Decimal;

  constructor(digits: number) {
    this.functions = decimalFunctions(digits + guardDigits);
    this.Down = Decimal.clone({ defaults: true, precision: digits, rounding: Decimal.ROUND_FLOOR });
    this.Up = Decimal.clone({ defaults: true, precision: digits, rounding: Decimal.ROUND_CEIL });
    this.#unit = new this.Up(10).pow(1 - digits);
  }

  point(value: Decimal): Interval {
    return { low: value, high: value };
  }

  /** null where an end is not finite or its exponent is beyond 10^9. */
  checked(low: Decimal, high: Decimal): Interval | null {
    const isFine = (end: Decimal) => end.isFinite() && (end.isZero() || Math.abs(end.e) <= largestExponent);
    return isFine(low) && isFine(high) ? { low, high } : null;
  }

  /** Rounds ends that were computed to more digits outward, and by one unit more. */
  widen(low: Decimal, high: Decimal): Interval | null {
    if (low.isNaN() || high.isNaN()) return null;
    return this.checked(
      this.Down.sub(low, this.Up.mul(low.abs(), this.#unit)),
      this.Up.add(high, this.Up.mul(high.abs(), this.#unit)),
    );
  }

  add(a: Interval, b: Interval): Interval | null {
    return this.checked(this.Down.add(a.low, b.low), this.Up.add(a.high, b.high));
  }

  subtract(a: Interval, b: Interval): Interval | null {
    return this.checked(this.Down.sub(a.low, b.high), this.Up.sub(a.high, b.low));
  }

  multiply(a: Interval, b: Interval): Interval | null {
    const pairs: [Decimal, Decimal][] = [
      [a.low, b.low],
      [a.low, b.high],
      [a.high, b.low],
      [a.high, b.high],
    ];
    return this.checked(
      this.functions.Number.min(...pairs.map(([left, right]) => this.Down.mul(left, right))),
      this.functions.Number.max(...pairs.map(([left, right]) => this.Up.mul(left, right))),
    );
  }

  divide(a: Interval, b: Interval): Interval | null {
    if (this.contains(b, 0)) return null;
    const pairs: [Decimal, Decimal][] = [
      [a.low, b.low],
      [a.low, b.high],
      [a.high, b.low],
      [a.high, b.high],
    ];
    return this.checked(
      this.functions.Number.min(...pairs.map(([left, right]) => this.Down.div(left, right))),
      this.functions.Number.max(...pairs.map(([left, right]) => this.Up.div(left, right))),
    );
  }

  contains(a: Interval, value: number): boolean {
    return a.low.lte(value) && a.high.gte(value);
  }

  hull(a: Interval, b: Interval): Interval {
    return { low: this.functions.Number.min(a.low, b.low), high: this.functions.Number.max(a.high, b.high) };
  }

  /** The least and the greatest of some values, widened; null where one is undefined. */
  #span(values: readonly Decimal[]): Interval | null {
    if (values.some((value) => value.isNaN())) return null;
    return this.widen(this.functions.Number.min(...values), this.functions.Number.max(...values));
  }

  /** t^n is monotone on either side of 0, so the ends, and 0 where it lies inside, decide. */
  integerPower(a: Interval, raise: (value: Decimal) => Decimal, isNegative: boolean): Interval | null {
    const hasZero = this.contains(a, 0);
    if (hasZero && isNegative) return null;
    const ends = [raise(a.low), raise(a.high)];
    if (hasZero) ends.push(new this.Down(0));
    return this.#span(ends);
  }

  /** For a >= 0, a^b is monotone in a and in b, so the corners decide. */
  power(a: Interval, b: Interval): Interval | null {
    const raise = (base: Decimal, exponent: Decimal) => this.functions.power(base, exponent);
    if (b.low.eq(b.high) && b.low.isInteger()) {
      return this.integerPower(a, (value) => raise(value, b.low), b.low.isNegative());
    }
    if (a.low.lt(0) || (a.low.isZero() && b.low.lte(0))) return null;
    return this.#span([
      raise(a.low, b.low),
      raise(a.low, b.high),
      raise(a.high, b.low),
      raise(a.high, b.high),
    ]);
  }

  call(name: CallName, a: Interval, b: Interval | undefined): Interval | null {
    const at = (x: Decimal, y?: Decimal) => this.functions.call(name, x, y);
    switch (name) {
      case 'min':
        return b
          ? { low: this.functions.Number.min(a.low, b.low), high: this.functions.Number.min(a.high, b.high) }
          : null;
      case 'max':
        return b
          ? { low: this.functions.Number.max(a.low, b.low), high: this.functions.Number.max(a.high, b.high) }
          : null;
      case 'abs':
        return this.magnitude(a);
      case 'sign':
        return { low: at(a.low), high: at(a.high) };
      case 'cosh': {
        const size = this.magnitude(a);
        return this.#span([at(size.low), at(size.high)]);
      }
      case 'hypot': {
        if (!b) return null;
        const [x, y] = [this.magnitude(a), this.magnitude(b)];
        return this.#span([at(x.low, y.low), at(x.high, y.high)]);
      }
      case 'sin':
      case 'cos':
        return this.#wave(name, a);
      case 'tan': {
        // Increasing between its poles, which are the zeros of the cosine.
        const cosine = this.#wave('cos', a);
        if (cosine === null || this.contains(cosine, 0)) return null;
        return this.#span([at(a.low), at(a.high)]);
      }
      case 'erf':
      case 'tanh': {
        const span = this.#span([at(a.low), at(a.high)]);
        return span && this.#clip(span);
      }
      case 'atan2':
        return b ? this.#angle(a, b) : null;
      default:
        // All others are monotone, and their domains are intervals, which hold a whole interval with its ends.
        return this.#span([at(a.low), at(a.high)]);
    }
  }

  magnitude(a: Interval): Interval {
    const [low, high] = [a.low.abs(), a.high.abs()];
    const most = this.functions.Number.max(low, high);
    return { low: this.contains(a, 0) ? new this.Down(0) : this.functions.Number.min(low, high), high: most };
  }

  #clip(a: Interval): Interval {
    return { low: this.functions.Number.max(a.low, -1), high: this.functions.Number.min(a.high, 1) };
  }

  /** sin and cos change no faster than their argument: the value in the middle, more or less half the width. */
  #wave(name: 'sin' | 'cos', a: Interval): Interval | null {
    const width = this.Up.sub(a.high, a.low);
    if (width.gte(2)) return { low: new this.Down(-1), high: new this.Up(1) };
    const middle = width.isZero() ? a.low : this.functions.Number.add(a.low, a.high).div(2);
    const reach = this.functions.Number.max(this.Up.sub(a.high, middle), this.Up.sub(middle, a.low));
    const value = this.functions.call(name, middle, undefined);
    const core = this.widen(value, value);
    return core && this.#clip({ low: this.Down.sub(core.low, reach), high: this.Up.add(core.high, reach) });
  }

  /** Along every edge of a box without the origin the angle is monotone, so the corners decide off the cut. */
  #angle(y: Interval, x: Interval): Interval | null {
    if (x.low.lte(0) && y.low.lt(0) && y.high.gte(0)) return null;
    if (this.contains(x, 0) && this.contains(y, 0)) return null;
    const at = (a: Decimal, b: Decimal) => this.functions.call('atan2', a, b);
    return this.#span([at(y.low, x.low), at(y.low, x.high), at(y.high, x.low), at(y.high, x.high)]);
  }
}
