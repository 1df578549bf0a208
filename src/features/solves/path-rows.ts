import { alignPaths } from '../../../shared/comparison/first-difference.ts';
import type { PathLine, SolveSide } from './solve-side.ts';

/** A row of the path table: both sides, or one where the other did not ask here. */
export interface PathRow {
  reference: PathLine | null;
  candidate: PathLine | null;
  /** The same x to the last bit on both sides, with the same answer. */
  isSame: boolean;
}

function isSameLine(a: PathLine, b: PathLine): boolean {
  return (
    a.event.kind === b.event.kind &&
    Object.is(a.event.x, b.event.x) &&
    Object.is(a.event.a, b.event.a) &&
    (a.event.kind !== 'fdf' || Object.is(a.event.b, b.event.b))
  );
}

/** Rows aligned by x; without a reference the candidate's lines alone. */
export function pathRows(reference: SolveSide | null, candidate: SolveSide): PathRow[] {
  if (reference === null) {
    return candidate.lines.map((line) => ({ reference: null, candidate: line, isSame: true }));
  }
  return alignPaths(reference.path, candidate.path).map(({ a, b }): PathRow => {
    const left = a === null ? null : (reference.lines[a] ?? null);
    const right = b === null ? null : (candidate.lines[b] ?? null);
    return {
      reference: left,
      candidate: right,
      isSame: left !== null && right !== null && isSameLine(left, right),
    };
  });
}

/** Index of the first row in which the two differ; −1 where they do not. */
export function firstDifferingRow(rows: readonly PathRow[]): number {
  return rows.findIndex((row) => !row.isSame);
}

/** Index of the next differing row after one at which they were the same again, for walking through. */
export function differingRows(rows: readonly PathRow[]): number[] {
  return rows.flatMap((row, index) => (row.isSame ? [] : [index]));
}
