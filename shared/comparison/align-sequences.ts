/** One element of either sequence, or one of both that are the same. */
export interface EditRow {
  a: number | null;
  b: number | null;
}

/**
 * Differences beyond which the middle of two sequences is not aligned: the memory taken grows with their
 * square (4,000,000 numbers at this limit). Sequences that differ so much have nothing to show side by side.
 */
const mostDifferences = 2000;

/**
 * Aligns two sequences by a longest common subsequence, so that every element stands in one row.
 *
 * Method: the greedy O(nd) algorithm of Myers, Algorithmica 1 (1986) 251–266 (from memory), n the lengths
 * together, d the elements in one sequence only; equal heads and tails are taken off first. Beyond 2000
 * differences what lies between head and tail is given as all of a, then all of b.
 * `isSame` need not be transitive. Elements of a alone come before those of b alone.
 */
export function alignSequences<T>(
  a: readonly T[],
  b: readonly T[],
  isSame: (p: T, q: T) => boolean,
): EditRow[] {
  const equal = (i: number, j: number) => {
    const [p, q] = [a[i], b[j]];
    return p !== undefined && q !== undefined && isSame(p, q);
  };
  let head = 0;
  while (head < a.length && head < b.length && equal(head, head)) head += 1;
  let tail = 0;
  const most = Math.min(a.length, b.length) - head;
  while (tail < most && equal(a.length - 1 - tail, b.length - 1 - tail)) tail += 1;

  const rows: EditRow[] = [];
  for (let i = 0; i < head; i += 1) rows.push({ a: i, b: i });
  const [n, m] = [a.length - head - tail, b.length - head - tail];
  for (const row of middleRows(n, m, (i, j) => equal(head + i, head + j))) {
    rows.push({ a: row.a === null ? null : row.a + head, b: row.b === null ? null : row.b + head });
  }
  for (let i = tail; i > 0; i -= 1) rows.push({ a: a.length - i, b: b.length - i });
  return rows;
}

function middleRows(n: number, m: number, equal: (i: number, j: number) => boolean): EditRow[] {
  if (n === 0 || m === 0) return apart(n, m);
  const most = Math.min(n + m, mostDifferences);
  const offset = most + 1;
  // furthest[k + offset]: how far into a the best path on diagonal k = i − j reaches.
  const furthest = new Int32Array(2 * most + 3);
  const trace: Int32Array[] = [];
  for (let d = 0; d <= most; d += 1) {
    trace.push(furthest.slice(offset - d - 1, offset + d + 2));
    for (let k = -d; k <= d; k += 2) {
      let i = stepsDown(furthest, offset, k, d)
        ? (furthest[offset + k + 1] ?? 0)
        : (furthest[offset + k - 1] ?? 0) + 1;
      while (i < n && i - k < m && equal(i, i - k)) i += 1;
      furthest[offset + k] = i;
      if (i >= n && i - k >= m) return walkBack(trace, n, m, d);
    }
  }
  return apart(n, m);
}

function stepsDown(furthest: Int32Array, offset: number, k: number, d: number): boolean {
  if (k === -d) return true;
  return k !== d && (furthest[offset + k - 1] ?? 0) < (furthest[offset + k + 1] ?? 0);
}

function walkBack(trace: readonly Int32Array[], n: number, m: number, last: number): EditRow[] {
  const rows: EditRow[] = [];
  let [i, j] = [n, m];
  for (let d = last; d > 0; d -= 1) {
    const furthest = trace[d];
    if (furthest === undefined) break;
    const offset = d + 1;
    const k = i - j;
    const isDown = stepsDown(furthest, offset, k, d);
    const from = isDown ? k + 1 : k - 1;
    const fromA = furthest[offset + from] ?? 0;
    const startA = isDown ? fromA : fromA + 1;
    while (i > startA) {
      i -= 1;
      j -= 1;
      rows.push({ a: i, b: j });
    }
    if (isDown) {
      j -= 1;
      rows.push({ a: null, b: j });
    } else {
      i -= 1;
      rows.push({ a: i, b: null });
    }
  }
  while (i > 0 && j > 0) {
    i -= 1;
    j -= 1;
    rows.push({ a: i, b: j });
  }
  return rows.reverse();
}

function apart(n: number, m: number): EditRow[] {
  return [
    ...Array.from({ length: n }, (_, a) => ({ a, b: null })),
    ...Array.from({ length: m }, (_, b) => ({ a: null, b })),
  ];
}
