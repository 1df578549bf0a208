import { Decimal } from 'decimal.js';
import type { CallName, ProgramConstant } from './arithmetic.ts';

/** Decimal digits that a caller may ask for; the constants that decimal.js stores have 1,025. */
export const largestPrecision = 400;

/** Digits of a sine's argument plus those of the result, beyond which it is left undefined. */
const largestTrigonometricPrecision = 1000;

/** Decimal exponents beyond this are undefined: nothing in a solver's case lives there, and all stays quick. */
const largestExponent = 1e9;

/** The natural logarithm of 10^largestExponent, rounded down. */
const largestExponential = 2.3e9;

/** Functions of decimals at one precision. Every result is finite or NaN, never infinite. */
export interface DecimalFunctions {
  precision: number;
  /** Constructor of this precision, rounding to nearest; nobody else changes its settings. */
  Number: typeof Decimal;
  constant(name: ProgramConstant): Decimal;
  power(a: Decimal, b: Decimal): Decimal;
  integerPower(a: Decimal, exponent: number): Decimal;
  call(name: CallName, a: Decimal, b: Decimal | undefined): Decimal;
  /** The value itself, or NaN where it is not finite or its exponent is beyond 10^9. */
  checked(value: Decimal): Decimal;
}

const known = new Map<number, DecimalFunctions>();

/**
 * The functions of equations in decimals of `precision` significant digits.
 *
 * sqrt, cbrt, exp, log, sin, cos and atan are those of decimal.js within ranges where they neither throw (which
 * would leave the library in a broken state) nor run long; all others are formed from them so that small
 * arguments and the neighbourhoods of 1 lose no digits. Relative error below 10^(3 - precision) for arguments
 * taken as exact (decimal.test.ts); sin, cos and tan of an argument with more than about 1,000 digits before
 * and behind the point together, exponents beyond 10^9 and all poles give NaN.
 * @throws RangeError unless the precision is a whole number from 1 to 440
 */
export function decimalFunctions(precision: number): DecimalFunctions {
  let functions = known.get(precision);
  if (functions === undefined) {
    if (known.size >= 16) known.clear();
    functions = new Functions(precision);
    known.set(precision, functions);
  }
  return functions;
}

class Functions implements DecimalFunctions {
  readonly precision: number;
  readonly Number: typeof Decimal;
  readonly #wide: typeof Decimal;
  readonly #constants = new Map<ProgramConstant, Decimal>();
  readonly #one: Decimal;
  readonly #undefined: Decimal;

  constructor(precision: number) {
    if (!Number.isInteger(precision) || precision < 1 || precision > largestPrecision + 40) {
      throw new RangeError('the precision is a whole number of digits from 1 to 440');
    }
    this.precision = precision;
    this.Number = Decimal.clone({ defaults: true, precision, rounding: Decimal.ROUND_HALF_EVEN });
    this.#wide = Decimal.clone({
      defaults: true,
      precision: precision + 14,
      rounding: Decimal.ROUND_HALF_EVEN,
    });
    this.#one = new this.Number(1);
    this.#undefined = new this.Number(Number.NaN);
  }

  checked(value: Decimal): Decimal {
    return value.isFinite() && (value.isZero() || Math.abs(value.e) <= largestExponent)
      ? value
      : this.#undefined;
  }

  constant(name: ProgramConstant): Decimal {
    let value = this.#constants.get(name);
    if (value === undefined) {
      value = this.#makeConstant(name);
      this.#constants.set(name, value);
    }
    return value;
  }

  #makeConstant(name: ProgramConstant): Decimal {
    switch (name) {
      case 'pi':
        return this.Number.acos(-1);
      case 'e':
        return this.Number.exp(1);
      case 'ln2':
        return this.Number.ln(2);
      case 'ln10':
        return this.Number.ln(10);
      case 'twoOverSqrtPi':
        return this.Number.div(2, this.#wide.sqrt(this.#wide.acos(-1)));
    }
  }

  integerPower(a: Decimal, exponent: number): Decimal {
    if (a.isZero()) return exponent < 0 ? this.#undefined : new this.Number(0);
    return this.checked(this.#narrow(this.#wide.pow(a, exponent)));
  }

  power(a: Decimal, b: Decimal): Decimal {
    if (a.isNaN() || b.isNaN()) return this.#undefined;
    if (b.isZero()) return this.#one;
    if (a.isZero()) return b.isNegative() ? this.#undefined : new this.Number(0);
    if (a.isNegative()) {
      if (!b.isInteger()) return this.#undefined;
      const size = this.power(a.negated(), b);
      return this.#isOdd(b) ? size.negated() : size;
    }
    const logarithm = this.#wide.mul(b, this.#wide.ln(a));
    if (logarithm.abs().gt(largestExponential)) return this.#undefined;
    return this.checked(this.#narrow(logarithm.exp()));
  }

  /** Whether a whole number is odd; one with more digits than the exponent of its last is even. */
  #isOdd(whole: Decimal): boolean {
    const last = whole.d.at(-1);
    // `d` holds groups of 7 digits, the last without trailing zeros unless it is the group of the units.
    const unitsGroup = Math.floor(whole.e / 7) + 1;
    return whole.d.length === unitsGroup && last !== undefined && last % 2 === 1;
  }

  #narrow(value: Decimal): Decimal {
    return new this.Number(value).toSignificantDigits(this.precision);
  }

  call(name: CallName, a: Decimal, b: Decimal | undefined): Decimal {
    if (a.isNaN() || b?.isNaN()) return this.#undefined;
    // Methods of a decimal round as its own constructor says, and arguments come from others.
    return this.checked(this.#call(name, new this.Number(a), b ? new this.Number(b) : this.#one));
  }

  #call(name: CallName, a: Decimal, b: Decimal): Decimal {
    const one = this.#one;
    switch (name) {
      case 'exp':
        return this.#exp(a);
      case 'expm1':
        return a.abs().lt(0.5)
          ? this.#series(a, a, (term, n) => term.times(a).div(n + 1))
          : this.#exp(a).minus(1);
      case 'log':
        return a.gt(0) ? a.ln() : this.#undefined;
      case 'log1p':
        return this.#log1p(a);
      case 'log2':
        return a.gt(0) ? this.Number.log2(a) : this.#undefined;
      case 'log10':
        return a.gt(0) ? this.Number.log10(a) : this.#undefined;
      case 'sqrt':
        return a.sqrt();
      case 'cbrt':
        return a.cbrt();
      case 'sin':
      case 'cos':
      case 'tan':
        return this.#trigonometric(name, a);
      case 'asin':
        if (a.abs().gt(1)) return this.#undefined;
        if (a.abs().eq(1)) return this.constant('pi').div(2).times(a);
        return a.div(one.minus(a).times(one.plus(a)).sqrt()).atan();
      case 'acos':
        if (a.abs().gt(1)) return this.#undefined;
        if (a.eq(-1)) return this.constant('pi');
        return one.minus(a).div(one.plus(a)).sqrt().atan().times(2);
      case 'atan':
        return a.atan();
      case 'atan2':
        return this.#angle(a, b);
      case 'sinh':
        return this.#sinh(a);
      case 'cosh':
        return this.#exp(a).plus(this.#exp(a.negated())).div(2);
      case 'tanh':
        return this.#tanh(a);
      case 'asinh': {
        const size = a.abs();
        const root = one.plus(size.times(size)).sqrt();
        return this.#signed(a, this.#log1p(size.plus(size.times(size).div(one.plus(root)))));
      }
      case 'acosh': {
        const above = a.minus(1);
        if (above.isNegative() && !above.isZero()) return this.#undefined;
        return this.#log1p(above.plus(above.times(above.plus(2)).sqrt()));
      }
      case 'atanh': {
        const size = a.abs();
        if (size.gte(1)) return this.#undefined;
        return this.#signed(a, this.#log1p(size.times(2).div(one.minus(size))).div(2));
      }
      case 'abs':
        return a.abs();
      case 'sign':
        return new this.Number(a.isZero() ? 0 : a.isNegative() ? -1 : 1);
      case 'min':
        return a.lt(b) ? a : b;
      case 'max':
        return a.gt(b) ? a : b;
      case 'hypot':
        return a.times(a).plus(b.times(b)).sqrt();
      case 'erf':
        return this.#erf(a);
    }
  }

  #signed(sign: Decimal, size: Decimal): Decimal {
    return sign.isNegative() ? size.negated() : size;
  }

  #exp(a: Decimal): Decimal {
    return a.abs().gt(largestExponential) ? this.#undefined : a.exp();
  }

  /** first + next + …, until a term no longer counts; `advance` makes the term after the n-th (n from 1). */
  #series(first: Decimal, argument: Decimal, advance: (term: Decimal, n: number) => Decimal): Decimal {
    if (argument.isZero()) return argument;
    let sum = first;
    let term = first;
    for (let n = 1; term.e > sum.e - this.precision - 2; n++) {
      term = advance(term, n);
      if (term.isZero()) break;
      sum = sum.plus(term);
    }
    return sum;
  }

  /** 2 (t + t^3 / 3 + …) with t = a / (2 + a) near 0, so that no digit is lost in 1 + a. */
  #log1p(a: Decimal): Decimal {
    if (a.lte(-1)) return this.#undefined;
    if (a.abs().gte(0.125)) return this.#one.plus(a).ln();
    const t = a.div(a.plus(2));
    const square = t.times(t);
    let power = t;
    return this.#series(t, t, (_term, n) => {
      power = power.times(square);
      return power.div(2 * n + 1);
    }).times(2);
  }

  #sinh(a: Decimal): Decimal {
    if (a.abs().gte(0.5)) return this.#exp(a).minus(this.#exp(a.negated())).div(2);
    const square = a.times(a);
    return this.#series(a, a, (term, n) => term.times(square).div(2 * n * (2 * n + 1)));
  }

  #tanh(a: Decimal): Decimal {
    if (a.abs().lt(0.5)) {
      const s = this.#sinh(a);
      return s.div(this.#one.plus(s.times(s)).sqrt());
    }
    // Beyond this the difference from 1 is below 10^-(10^8).
    if (a.abs().gt(1e9)) return this.#signed(a, this.#one);
    const t = this.#exp(a.abs().times(-2));
    return this.#signed(a, this.#one.minus(t).div(this.#one.plus(t)));
  }

  #trigonometric(name: 'sin' | 'cos' | 'tan', a: Decimal): Decimal {
    const digits = this.precision + Math.max(a.e, a.precision()) + 30;
    if (digits > largestTrigonometricPrecision) return this.#undefined;
    if (name === 'tan') return a.sin().div(a.cos());
    return name === 'sin' ? a.sin() : a.cos();
  }

  /** The angle of (x, y); undefined at the origin. */
  #angle(y: Decimal, x: Decimal): Decimal {
    const pi = this.constant('pi');
    if (y.isZero()) return x.isZero() ? this.#undefined : x.isNegative() ? pi : new this.Number(0);
    if (y.abs().gt(x.abs())) return this.#signed(y, pi.div(2)).minus(x.div(y).atan());
    const angle = y.div(x).atan();
    return x.isNegative() ? angle.plus(this.#signed(y, pi)) : angle;
  }

  /**
   * erf u = (2 / sqrt(pi)) exp(-u^2) (u + 2 u^3 / 3 + 4 u^5 / 15 + …): no term is negative, so nothing cancels.
   * (Abramowitz and Stegun, Handbook of Mathematical Functions, 1964, 7.1.6.)
   */
  #erf(a: Decimal): Decimal {
    if (a.isZero()) return a;
    // 1 - erf u < exp(-u^2), below half a unit of the last digit from here on.
    if (a.abs().gt(Math.sqrt((this.precision + 2) * Math.LN10))) return this.#signed(a, this.#one);
    const square = a.times(a);
    const double = square.times(2);
    const sum = this.#series(a, a, (term, n) => term.times(double).div(2 * n + 1));
    return this.constant('twoOverSqrtPi').times(square.negated().exp()).times(sum);
  }
}
