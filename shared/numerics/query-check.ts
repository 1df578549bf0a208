import type { Path, PathEvent } from '../schemas/path.ts';
import type { QueryCounts } from '../schemas/solve.ts';
import type { QueryFinding } from '../schemas/words.ts';
import { type RootReference, signedError } from './root-reference.ts';

export type AskedKind = 'f' | 'df' | 'd2f';

/** One thing noticed about one evaluation. */
export interface QueryEvent {
  finding: QueryFinding;
  /** What was asked for; an fdf is one f and one df. */
  asked: AskedKind;
  /** Index of its line in the path. */
  index: number;
  x: number;
  /** Repeated: index of the line that asked first. Late: index of the line that first had the answer. */
  earlier: number | null;
}

export interface QueryCheckInput {
  /** The bracket given, low end first or last; null where there was none. */
  bracket: readonly [number, number] | null;
  takesBracket: boolean;
  /** Declared to look outside its bracket on purpose. */
  widens: boolean;
  /** Certified roots that the case allows, each with its attainable accuracy F (absolute). */
  roots: readonly { ref: RootReference; attainable: number }[];
  /** The x that was returned; null where none was. */
  root: number | null;
}

interface Asked {
  asked: AskedKind;
  index: number;
  x: number;
  answer: number;
}

/** Evaluations after the answer that a stopping test may need. */
export const lateAllowance = 2;

/**
 * What a path shows without being asked, each finding counted in evaluations and listed in the path's order:
 *
 * `repeated`: the same kind of evaluation at a bit-identical x that was asked before (−0 and 0 are the same x).
 * `outside`: at a finite x outside the bracket given, for solvers that take one and do not widen it.
 * `late`: after the first evaluation whose x is within 2 F of a root, beyond the two that a stopping test needs.
 * `unused`: a derivative at the last x of the path that nothing can have depended on: x itself was returned, and
 * f there is exactly 0, or f was never asked for there. (With another f(x) the derivative may have shown that
 * the next step changes nothing.)
 * `nonFinite`: asked at an x that is not finite, or answered so.
 *
 * An evaluation can be in several findings. A path that was cut is judged by what was kept.
 * Findings, not failures. Thresholds: common practice, no source.
 */
export function checkQueries(
  path: Path,
  input: QueryCheckInput,
): { counts: QueryCounts; findings: QueryEvent[] } {
  const all = evaluationsOf(path.events);
  const findings = [
    ...repeated(all),
    ...outside(all, input),
    ...late(all, input),
    ...unused(all, path.events, input.root),
    ...nonFinite(all),
  ].sort((a, b) => a.index - b.index);
  const counts: QueryCounts = { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 };
  for (const { finding } of findings) counts[finding] += 1;
  return { counts, findings };
}

/**
 * For each line of a path the index of the line that it repeats, or null: an evaluation of the same kind at the
 * same x before it. An fdf repeats where both its values were known already; a step never does.
 */
export function repeatsOf(events: readonly PathEvent[]): (number | null)[] {
  const earlier = events.map((): (number | null)[] => []);
  for (const { index, known } of withKnown(evaluationsOf(events))) earlier[index]?.push(known);
  return earlier.map((known) => (known.every((index) => index !== null) ? (known[0] ?? null) : null));
}

function evaluationsOf(events: readonly PathEvent[]): Asked[] {
  const all: Asked[] = [];
  for (const [index, { kind, x, a, b }] of events.entries()) {
    if (kind === 'step') continue;
    if (kind === 'fdf') {
      all.push({ asked: 'f', index, x, answer: a }, { asked: 'df', index, x, answer: b });
    } else all.push({ asked: kind, index, x, answer: a });
  }
  return all;
}

function withKnown(all: readonly Asked[]): (Asked & { known: number | null })[] {
  // Maps take −0 and 0 for the same key, and NaN for itself.
  const first = {
    f: new Map<number, number>(),
    df: new Map<number, number>(),
    d2f: new Map<number, number>(),
  };
  return all.map((one) => {
    const known = first[one.asked].get(one.x) ?? null;
    if (known === null) first[one.asked].set(one.x, one.index);
    return { ...one, known };
  });
}

function found(finding: QueryFinding, { asked, index, x }: Asked, earlier: number | null = null): QueryEvent {
  return { finding, asked, index, x, earlier };
}

function repeated(all: readonly Asked[]): QueryEvent[] {
  return withKnown(all)
    .filter((one) => one.known !== null)
    .map((one) => found('repeated', one, one.known));
}

function outside(all: readonly Asked[], { bracket, takesBracket, widens }: QueryCheckInput): QueryEvent[] {
  if (bracket === null || !takesBracket || widens) return [];
  const [low, high] = [Math.min(...bracket), Math.max(...bracket)];
  return all
    .filter(({ x }) => Number.isFinite(x) && (x < low || x > high))
    .map((one) => found('outside', one));
}

function late(all: readonly Asked[], { roots }: QueryCheckInput): QueryEvent[] {
  const isThere = ({ x }: Asked) =>
    roots.some(({ ref, attainable }) => {
      return Math.abs(signedError(x, ref)) <= 2 * attainable;
    });
  const first = all.findIndex(isThere);
  if (first < 0) return [];
  const answer = all[first]?.index ?? null;
  return all.slice(first + 1 + lateAllowance).map((one) => found('late', one, answer));
}

function unused(all: readonly Asked[], events: readonly PathEvent[], root: number | null): QueryEvent[] {
  const last = all.at(-1);
  if (last === undefined || root === null || last.x !== root) return [];
  const hasMovedOn = events.slice(last.index + 1).some((event) => event.x !== root);
  if (hasMovedOn) return [];
  const atLast = all.filter(({ x }) => x === root);
  const values = atLast.filter(({ asked }) => asked === 'f');
  if (values.length > 0 && !values.some(({ answer }) => answer === 0)) return [];
  // Only the unbroken stretch at the end: an earlier derivative there led to what came in between.
  const stretch = all.findLastIndex(({ x }) => x !== root);
  return all
    .slice(stretch + 1)
    .filter(({ asked }) => asked !== 'f')
    .map((one) => found('unused', one));
}

function nonFinite(all: readonly Asked[]): QueryEvent[] {
  return all
    .filter(({ x, answer }) => !Number.isFinite(x) || !Number.isFinite(answer))
    .map((one) => found('nonFinite', one));
}
