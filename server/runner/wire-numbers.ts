/** Numbers of the wire: text to the nearest binary64, by the wire's own grammar and no other. */

// No two neighbouring parts of these match the same characters, so that a line of 1 MiB takes linear time.
const DECIMAL = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/;
const HEXADECIMAL =
  /^([+-]?)0[xX](?:([0-9a-fA-F]+)(?:\.([0-9a-fA-F]*))?|\.([0-9a-fA-F]+))(?:[pP]([+-]?\d+))?$/;
const NOT_FINITE = /^([+-]?)(?:(inf(?:inity)?)|nan(?:\([0-9A-Za-z_]*\))?)$/i;

/** Hexadecimal digits that are kept; the rest can only decide a tie, which one more bit tells. */
const KEPT_HEX_DIGITS = 32;
/** Beyond this every exponent means zero or infinity, whatever a line of 1 MiB holds as digits. */
const EXPONENT_LIMIT = 1e9;

/**
 * The nearest binary64 to a number written as the wire allows, or null where the text is none.
 * ECMAScript's Number() rounds any count of decimal digits correctly, so decimals go through it; it would
 * also take '', '0b1', '0x1' and '1_0', which the grammar keeps out.
 */
export function parseNumber(text: string): number | null {
  if (DECIMAL.test(text)) return Number(text);
  const hexadecimal = HEXADECIMAL.exec(text);
  if (hexadecimal) {
    const [, sign, whole = '', fraction = '', bareFraction = '', exponent = '0'] = hexadecimal;
    const magnitude = hexToDouble(whole, fraction + bareFraction, exponent);
    return sign === '-' ? -magnitude : magnitude;
  }
  const other = NOT_FINITE.exec(text);
  if (!other) return null;
  if (other[2] === undefined) return Number.NaN;
  return other[1] === '-' ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
}

/** Magnitude of a hexadecimal float, rounded once, half to even, subnormals included. */
function hexToDouble(whole: string, fraction: string, exponentText: string): number {
  const digits = (whole + fraction).replace(/^0+/, '');
  if (digits === '') return 0;
  const written = Math.max(-EXPONENT_LIMIT, Math.min(EXPONENT_LIMIT, Number(exponentText)));
  const kept = digits.slice(0, KEPT_HEX_DIGITS);
  const isInexact = /[^0]/.test(digits.slice(KEPT_HEX_DIGITS));
  // The value is (mantissa + something under 1 if inexact) · 2^exponent, mantissa an integer.
  let exponent = written - 4 * fraction.length + 4 * (digits.length - kept.length);
  let mantissa = BigInt(`0x${kept}`);
  if (isInexact) {
    mantissa = mantissa * 2n + 1n;
    exponent -= 1;
  }
  const top = exponent + mantissa.toString(2).length; // 2^(top-1) <= value < 2^top
  if (top > 1024) return Number.POSITIVE_INFINITY;
  if (top < -1074) return 0;
  const lastPlace = Math.max(top - 53, -1074);
  const excess = lastPlace - exponent;
  if (excess > 0) {
    const unit = 1n << BigInt(excess);
    const rest = mantissa % unit;
    mantissa /= unit;
    const half = unit / 2n;
    if (rest > half || (rest === half && mantissa % 2n === 1n)) mantissa += 1n;
    exponent = lastPlace;
  }
  return scale(Number(mantissa), exponent);
}

/** value · 2^exponent for an integer value of at most 53 bits whose product is a binary64: exact in each step. */
function scale(value: number, exponent: number): number {
  let result = value;
  let left = exponent;
  while (left > 1000) {
    result *= 2 ** 1000;
    left -= 1000;
  }
  while (left < -1000) {
    result *= 2 ** -1000;
    left += 1000;
  }
  return result * 2 ** left;
}
