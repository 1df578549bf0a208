const superscripts: Record<string, string> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};

const raise = (digits: string): string => [...digits].map((digit) => superscripts[digit] ?? digit).join('');

/** How a product is written between what stands before and after its sign. */
function productSign(before: string, after: string): string {
  const isDivided = /\/\s*[\w.]+$/.test(before);
  if (isDivided || /^\d/.test(after)) return ' · ';
  if (/\)$/.test(before) && after.startsWith('(')) return '';
  const isPlainNumber = /(^|[^\w.^])\d+(\.\d+)?$/.test(before);
  if (!isPlainNumber) return ' ';
  return /^([A-Za-z]\b|\()/.test(after) ? '' : ' ';
}

/**
 * An equation as a person writes it: x^2 - 2*x becomes x² − 2x. Only what cannot be misread is rewritten:
 * whole exponents that nothing follows (x^2^3 keeps its first), products after which no digit stands and
 * which are not part of a denominator's neighbourhood (1/2*x keeps a sign of product).
 */
export function formatEquation(source: string): string {
  return source
    .replace(
      /(?<![\w.])(\d+(?:\.\d+)?)e([+-]?\d+)\b/gi,
      (_, mantissa: string, exponent: string) =>
        `${mantissa === '1' ? '' : `${mantissa}×`}10${raise(exponent.replace('+', ''))}`,
    )
    .replace(/\s*\*\s*/g, (sign: string, offset: number, whole: string) =>
      productSign(whole.slice(0, offset), whole.slice(offset + sign.length)),
    )
    .replace(
      /\^\s*(?:(-?\d+)(?![\w.]|\s*\^)|\(\s*(-?\d+)\s*\)(?!\s*\^))/g,
      (_, bare: string | undefined, wrapped: string | undefined) => raise(bare ?? wrapped ?? ''),
    )
    .replaceAll('-', '−');
}
