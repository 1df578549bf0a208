/** A point of a trend. */
export interface TrendPoint {
  index: number;
  x: number;
  y: number;
  /** A turn for the worse or the better against the point before. */
  turn: 'worse' | 'better' | null;
  /** Written where the value changes, and at the first point. */
  label: string | null;
  /** The label stands above the point, else below. */
  isAbove: boolean;
}

export interface TrendLayout {
  /** Pieces of the line: broken where a value is missing. */
  pieces: TrendPoint[][];
  marks: number[];
}

export interface TrendShape {
  width: number;
  height: number;
  /** Whether more is better (solved, order) or fewer is (evaluations). */
  isMoreBetter: boolean;
  format: (value: number) => string;
}

const pad = 14;

/**
 * A line over builds at equal steps. The range is that of the values, but never smaller than a quarter of the
 * largest, so that a change of one in a thousand does not look like a cliff.
 */
export function layOutTrend(values: readonly (number | null)[], shape: TrendShape): TrendLayout {
  const known = values.filter((value) => value !== null);
  const high = Math.max(...known);
  const low = Math.min(...known);
  const range = Math.max(high - low, Math.abs(high) / 4, 1e-9);
  const middle = (high + low) / 2;
  const top = 16;
  const bottom = shape.height - 16;
  const step = values.length > 1 ? (shape.width - 2 * pad) / (values.length - 1) : 0;
  const xAt = (index: number): number => pad + index * step;
  const yAt = (value: number): number => (top + bottom) / 2 - ((value - middle) / range) * (bottom - top);
  const pieces: TrendPoint[][] = [];
  let before: number | null = null;
  values.forEach((value, index) => {
    if (value === null) return;
    const isFirst = before === null;
    const isBetter = before !== null && (shape.isMoreBetter ? value > before : value < before);
    const changes = before !== null && shape.format(value) !== shape.format(before);
    const point: TrendPoint = {
      index,
      x: xAt(index),
      y: yAt(value),
      turn: changes ? (isBetter ? 'better' : 'worse') : null,
      label: isFirst || changes ? shape.format(value) : null,
      isAbove: isFirst ? yAt(value) <= (top + bottom) / 2 : before !== null && value >= before,
    };
    const piece = pieces.at(-1);
    if (piece === undefined || values[index - 1] === null) pieces.push([point]);
    else piece.push(point);
    before = value;
  });
  return { pieces, marks: values.map((_, index) => xAt(index)) };
}
