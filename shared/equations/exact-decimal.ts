/**
 * The exact value of a binary64 number as decimal text, for example 0.1 as 1000000000000000055511151231257827…e-55.
 *
 * A decimal.js constructor given a number takes its shortest decimal text instead, which may lie half a unit of
 * the last place away; in a reference for binary64 results that is an error of many units.
 * m 2^e = m 5^-e 10^e for e < 0, with whole numbers throughout.
 * @throws RangeError for NaN and the infinities
 */
export function exactDecimalText(value: number): string {
  if (!Number.isFinite(value)) throw new RangeError('a finite number was expected');
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  const bits = view.getBigUint64(0);
  const sign = bits >> 63n === 1n ? '-' : '';
  const biased = Number((bits >> 52n) & 0x7ffn);
  const fraction = bits & 0xfffffffffffffn;
  const mantissa = biased === 0 ? fraction : fraction | 0x10000000000000n;
  const exponent = Math.max(biased, 1) - 1075;
  if (exponent >= 0) return `${sign}${mantissa << BigInt(exponent)}`;
  return `${sign}${mantissa * 5n ** BigInt(-exponent)}e${exponent}`;
}
