export interface LeastSquaresFit {
  /** In the order of the columns, the constant term last. */
  coefficients: number[];
  /** Of the coefficients without the constant term, from the residual variance. */
  covariance: number[][];
  /** Residual standard deviation, rows less coefficients degrees of freedom. */
  deviation: number;
}

/**
 * Ordinary least squares: the coefficients c that make Σ (wanted − given · c)² least.
 *
 * Method: normal equations by Gauss–Jordan elimination with pivots, on columns centred about their mean where
 * the last one is constant: the products then lose no digits to the mean. Meant for four columns at most.
 * `rows`: given numbers (the last of each 1, for the constant term) and the wanted one.
 * Returns null where there are no more rows than columns or where the columns depend on one another.
 * Source: textbook.
 */
export function leastSquares(
  rows: readonly { given: readonly number[]; wanted: number }[],
): LeastSquaresFit | null {
  const columns = rows[0]?.given.length ?? 0;
  if (columns === 0 || rows.length <= columns) return null;
  const n = columns - 1;
  const mean = (pick: (row: { given: readonly number[]; wanted: number }) => number) => {
    return rows.reduce((total, row) => total + pick(row), 0) / rows.length;
  };
  const middles = Array.from({ length: n }, (_, j) => mean((row) => row.given[j] ?? 0));
  const middleWanted = mean((row) => row.wanted);
  const centred = rows.map((row) => middles.map((middle, j) => (row.given[j] ?? 0) - middle));
  const normal = Array.from({ length: n }, (_, i) => {
    return Array.from({ length: n }, (__, j) => {
      return centred.reduce((total, row) => total + (row[i] ?? 0) * (row[j] ?? 0), 0);
    });
  });
  const inverse = invert(normal);
  if (inverse === null) return null;
  const right = Array.from({ length: n }, (_, i) => {
    return rows.reduce((total, row, k) => total + (centred[k]?.[i] ?? 0) * (row.wanted - middleWanted), 0);
  });
  const slopes = inverse.map((line) => line.reduce((total, value, j) => total + value * (right[j] ?? 0), 0));
  const constant = slopes.reduce((total, slope, j) => total - slope * (middles[j] ?? 0), middleWanted);
  const residuals = rows.map((row) => {
    return slopes.reduce((left, slope, j) => left - slope * (row.given[j] ?? 0), row.wanted - constant);
  });
  const variance = residuals.reduce((total, r) => total + r * r, 0) / (rows.length - columns);
  const covariance = inverse.map((line) => line.map((value) => value * variance));
  return { coefficients: [...slopes, constant], covariance, deviation: Math.sqrt(variance) };
}

/** The inverse of a small symmetric matrix; null where a pivot vanishes against the largest entry. */
function invert(matrix: readonly (readonly number[])[]): number[][] | null {
  const n = matrix.length;
  const work = matrix.map((line, i) => [...line, ...matrix.map((_, j) => (i === j ? 1 : 0))]);
  const largest = Math.max(...matrix.flat().map(Math.abs));
  for (let k = 0; k < n; k += 1) {
    let pivot = k;
    for (let i = k + 1; i < n; i += 1) {
      if (Math.abs(work[i]?.[k] ?? 0) > Math.abs(work[pivot]?.[k] ?? 0)) pivot = i;
    }
    const pivotLine = work[pivot];
    const value = pivotLine?.[k] ?? 0;
    const swapped = work[k];
    if (pivotLine === undefined || swapped === undefined || Math.abs(value) <= 1e-12 * largest) return null;
    work[pivot] = swapped;
    const scaled = pivotLine.map((entry) => entry / value);
    work[k] = scaled;
    for (let i = 0; i < n; i += 1) {
      const line = work[i];
      if (i === k || line === undefined) continue;
      const factor = line[k] ?? 0;
      work[i] = line.map((entry, j) => entry - factor * (scaled[j] ?? 0));
    }
  }
  return work.map((line) => line.slice(n));
}
