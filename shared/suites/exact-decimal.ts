/**
 * The exact value of a finite binary64 as a decimal text (every binary64 is a terminating decimal).
 * Texts longer than `limit` characters become the shortest decimal that reads back to the same bits.
 */
export function exactDecimal(value: number, limit = 400): string {
  if (!Number.isFinite(value)) throw new RangeError('a finite number was expected');
  if (Number.isInteger(value) && Math.abs(value) <= Number.MAX_SAFE_INTEGER) return String(value === 0 ? 0 : value);
  let mantissa = Math.abs(value);
  let exponent = 0;
  while (!Number.isInteger(mantissa)) {
    // Doubling is exact: it changes the exponent alone, and subnormals only gain room.
    mantissa *= 2;
    exponent += 1;
  }
  const digits = (BigInt(mantissa) * 5n ** BigInt(exponent)).toString();
  const sign = value < 0 ? '-' : '';
  const text = sign + placePoint(digits, exponent);
  return text.length <= limit ? text : String(value);
}

/** `digits` divided by ten to the power `decimals`; scientific where plain notation would need many zeros. */
function placePoint(digits: string, decimals: number): string {
  const leadingZeros = decimals - digits.length;
  if (leadingZeros > 6) {
    const fraction = digits.slice(1).replace(/0+$/, '');
    const point = fraction === '' ? '' : `.${fraction}`;
    return `${digits[0]}${point}e-${leadingZeros + 1}`;
  }
  const full = digits.padStart(decimals + 1, '0');
  const whole = full.slice(0, full.length - decimals);
  const fraction = full.slice(full.length - decimals).replace(/0+$/, '');
  return fraction === '' ? whole : `${whole}.${fraction}`;
}
