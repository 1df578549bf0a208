/** Figures as the command line prints them. */
export function formatNumber(value: number | null): string {
  if (value === null) return '–';
  return Object.is(value, -0) ? '-0' : String(value);
}

/** Correct digits to one place; a dash where there is none. */
export function formatDigits(digits: number | null): string {
  return digits === null ? '–' : digits.toFixed(1);
}

/** Four significant digits, for answers. */
export function formatShort(value: number): string {
  if (Number.isNaN(value)) return 'nan';
  if (!Number.isFinite(value)) return value > 0 ? 'inf' : '-inf';
  return value === 0 ? (Object.is(value, -0) ? '-0' : '0') : value.toExponential(4);
}

export function median(values: readonly number[]): number | null {
  if (values.length === 0) return null;
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  const upper = sorted[middle] ?? 0;
  return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] ?? 0) + upper) / 2;
}
