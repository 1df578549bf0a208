export interface LogAxis {
  low: number;
  high: number;
  /** Where a value lies, 0 to 1 from low to high. */
  at: (value: number) => number;
  ticks: number[];
}

/** Values 1, 2 and 5 times powers of ten, from the one below the least to the one above the greatest. */
function rungs(low: number, high: number): number[] {
  const first = Math.floor(Math.log10(low));
  const last = Math.ceil(Math.log10(high));
  return Array.from({ length: last - first + 1 }, (_, index) => first + index).flatMap((power) =>
    [1, 2, 5].map((factor) => factor * 10 ** power),
  );
}

const mostTicks = 7;

/**
 * A logarithmic axis over positive values that begins and ends at a round number. Where the rungs are many,
 * only the powers of ten are written.
 */
export function logAxis(values: readonly number[]): LogAxis {
  const least = Math.min(...values);
  const most = Math.max(...values);
  if (!(least > 0) || !Number.isFinite(most)) return logAxis([1, 10]);
  const all = rungs(least, most);
  const low = all.findLast((rung) => rung <= least) ?? least;
  const above = all.find((rung) => rung >= most) ?? most;
  const high = above > low ? above : low * 10;
  const inside = rungs(low, high).filter((rung) => rung >= low && rung <= high);
  const tens = inside.filter((rung) => Number.isInteger(Math.log10(rung)));
  const span = Math.log(high / low);
  return {
    low,
    high,
    at: (value) => Math.log(value / low) / span,
    ticks: inside.length > mostTicks && tens.length > 1 ? tens : inside,
  };
}
