import { repeatsOf } from '../numerics/query-check.ts';
import type { Path, PathEvent } from '../schemas/path.ts';
import { alignSequences, type EditRow } from './align-sequences.ts';

/** Where two paths part: the index of the line in both, and what differs there first. */
export interface FirstDifference {
  index: number;
  /** `end`: one of them has no such line. */
  what: 'kind' | 'x' | 'answer' | 'bracket' | 'end';
  a: PathEvent | null;
  b: PathEvent | null;
}

/**
 * The first line in which two paths differ to the last bit (−0 is not 0, NaN is NaN), or null where they do
 * not. Answers count as well: the same question answered differently means different arithmetic.
 */
export function firstDifference(a: Path, b: Path): FirstDifference | null {
  const length = Math.max(a.events.length, b.events.length);
  for (let index = 0; index < length; index += 1) {
    const [left, right] = [a.events[index] ?? null, b.events[index] ?? null];
    const what = left === null || right === null ? 'end' : differenceOf(left, right);
    if (what !== null) return { index, what, a: left, b: right };
  }
  return null;
}

function differenceOf(a: PathEvent, b: PathEvent): FirstDifference['what'] | null {
  if (a.kind !== b.kind) return 'kind';
  if (!Object.is(a.x, b.x)) return 'x';
  if (Object.is(a.a, b.a) && Object.is(a.b, b.b)) return null;
  return a.kind === 'step' ? 'bracket' : 'answer';
}

/** A row of a table of two paths: the lines side by side, one of them null where only the other side asked. */
export interface AlignedRow {
  a: number | null;
  b: number | null;
  /** `bits`: the same kind at the bit-identical x. `near`: at an x that differs in its last places. */
  match: 'bits' | 'near' | null;
}

/** x's this close, relative, stand in one row where they are in the same place of both paths. */
const nearness = 1e-6;

/**
 * Aligns two paths by x, not by number.
 *
 * Method: the longest common subsequence of lines with the same kind and the bit-identical x (O(nd) algorithm),
 * then, in the gaps it leaves, of lines of the same kind at nearly the same x, since another arrangement of a
 * formula shifts the last places of every x from then on. A repeated question is matched with a repeated one
 * alone: what a build asks again the other does not ask stands in a row of its own.
 * `a`, `b`: any two paths. Returns every line of both exactly once, in order.
 */
export function alignPaths(a: Path, b: Path): AlignedRow[] {
  const [left, right] = [linesOf(a), linesOf(b)];
  const isSame = (p: Line, q: Line) => {
    return p.event.kind === q.event.kind && p.isRepeat === q.isRepeat && Object.is(p.event.x, q.event.x);
  };
  const rows: AlignedRow[] = [];
  let gap: EditRow[] = [];
  const close = () => {
    const mine = gap.flatMap((row) => row.a ?? []);
    const other = gap.flatMap((row) => row.b ?? []);
    const inner = alignSequences(mine, other, (i, j) => isNear(left[i], right[j]));
    for (const row of inner) {
      const i = row.a === null ? null : (mine[row.a] ?? null);
      const j = row.b === null ? null : (other[row.b] ?? null);
      rows.push({ a: i, b: j, match: i !== null && j !== null ? 'near' : null });
    }
    gap = [];
  };
  for (const row of alignSequences(left, right, isSame)) {
    if (row.a === null || row.b === null) gap.push(row);
    else {
      close();
      rows.push({ a: row.a, b: row.b, match: 'bits' });
    }
  }
  close();
  return rows;
}

interface Line {
  event: PathEvent;
  isRepeat: boolean;
}

function linesOf(path: Path): Line[] {
  const repeats = repeatsOf(path.events);
  return path.events.map((event, i) => ({ event, isRepeat: (repeats[i] ?? null) !== null }));
}

function isNear(p: Line | undefined, q: Line | undefined): boolean {
  if (p === undefined || q === undefined) return false;
  if (p.event.kind !== q.event.kind || p.isRepeat !== q.isRepeat) return false;
  const [x, y] = [p.event.x, q.event.x];
  return Math.abs(x - y) <= nearness * Math.max(Math.abs(x), Math.abs(y));
}
