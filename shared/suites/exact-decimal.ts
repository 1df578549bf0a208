import { exactDecimal } from '../numerics/root-reference.ts';

/**
 * The exact value of a finite binary64 as a decimal text (every binary64 is a terminating decimal), or, where
 * that takes more than `limit` characters, the shortest decimal that reads back to the same bits.
 */
export function exactDecimalText(value: number, limit = 400): string {
  const exact = exactDecimal(value);
  if (exact.isZero()) return '0';
  const plain = exact.toFixed();
  const scientific = exact.toExponential().replace('e+', 'e');
  const text = plain.length <= scientific.length + 8 ? plain : scientific;
  return text.length <= limit ? text : String(value);
}
