/** A range of a plot in the units of its axis. */
export interface Range {
  low: number;
  high: number;
}

/** The bracket and the first x's decide what is shown: late ones lie on each other, wild ones would hide the rest. */
export function xRange(
  bracket: readonly [number, number] | null,
  asked: readonly number[],
  roots: readonly number[],
): Range {
  const wanted = [...(bracket ?? []), ...asked.filter(Number.isFinite).slice(0, 8), ...roots];
  if (wanted.length === 0) return { low: -1, high: 1 };
  const [low, high] = [Math.min(...wanted), Math.max(...wanted)];
  const pad = (high - low) * 0.04 || Math.max(1e-3, Math.abs(low) * 0.1);
  return { low: low - pad, high: high + pad };
}

/** From the values that the curve takes, without its poles: the middle 96 % and the axis. */
export function yRange(values: readonly number[]): Range {
  const finite = values.filter(Number.isFinite).toSorted((a, b) => a - b);
  const at = (share: number): number =>
    finite[Math.min(finite.length - 1, Math.floor(share * finite.length))] ?? 0;
  const low = Math.min(0, at(0.02));
  const high = Math.max(0, at(0.98));
  const pad = (high - low) * 0.06 || 1;
  return { low: low - pad, high: high + pad };
}

/** About `count` round numbers in a range: 1, 2 or 5 times a power of ten apart. */
export function niceTicks({ low, high }: Range, count = 4): number[] {
  const raw = (high - low) / count;
  if (!(raw > 0) || !Number.isFinite(raw)) return [];
  const power = 10 ** Math.floor(Math.log10(raw));
  const step = ([1, 2, 5, 10].find((factor) => factor * power >= raw) ?? 10) * power;
  const first = Math.ceil(low / step);
  const last = Math.floor(high / step);
  return Array.from({ length: Math.max(0, Math.min(20, last - first + 1)) }, (_, index) => {
    // Rounded to the step's own places: 3 × 0.1 is written 0.3.
    const value = (first + index) * step;
    return Number(value.toPrecision(12));
  });
}

/** A round number at an axis, with a true minus; very large and very small ones with an exponent. */
export function tickText(value: number): string {
  const size = Math.abs(value);
  const text =
    size !== 0 && (size >= 1e5 || size < 1e-4) ? value.toExponential().replace('e+', 'e') : String(value);
  return text.replaceAll('-', '−');
}
