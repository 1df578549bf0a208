/** Where the parts of a gauge stand, in px. */
export interface GaugeLayout {
  start: number;
  end: number;
  zero: number;
  /** Left and right post at minus and plus the allowance; null without a limit. */
  posts: [number, number] | null;
  dot: number;
  /** The value lies outside the drawing and is set at its edge. */
  isCut: 'left' | 'right' | null;
}

/** Small allowances stand clear of 0 and large changes still fit: lengths grow with the 0.7th power of the percent. */
const power = 0.7;
const bend = (percent: number): number => Math.sign(percent) * Math.abs(percent) ** power;

/**
 * The picture of a verdict to scale, in percent; posts and dot share one scale. It runs from −25 to +75 % unless
 * a value of the table lies outside: then it is stretched for all rows alike (`least`, `most`), at most
 * −100 … +200 %.
 */
export function layOutGauge(
  percent: number,
  allowance: number | null,
  width: number,
  range: { least: number; most: number } = { least: 0, most: 0 },
): GaugeLayout {
  const pad = 6;
  const low = Math.max(-100, Math.min(-25, range.least * 1.1));
  const high = Math.min(200, Math.max(75, range.most * 1.1));
  const at = (value: number): number =>
    pad + ((bend(value) - bend(low)) / (bend(high) - bend(low))) * (width - 2 * pad);
  const clipped = Math.min(high, Math.max(low, percent));
  return {
    start: pad,
    end: width - pad,
    zero: at(0),
    posts: allowance === null ? null : [at(Math.max(low, -allowance)), at(Math.min(high, allowance))],
    dot: at(clipped),
    isCut: percent > high ? 'right' : percent < low ? 'left' : null,
  };
}
