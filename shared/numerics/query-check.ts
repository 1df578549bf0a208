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
  const findings = [...scan(path.events, input), ...unused(path.events, input.root)];
  if (findings.length > 1) findings.sort((a, b) => a.index - b.index);
  const counts: QueryCounts = { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 };
  for (const { finding } of findings) counts[finding] += 1;
  return { counts, findings };
}

/** All findings but `unused`, in one pass: this runs once a solve, between two solves of a lane. */
function scan(events: readonly PathEvent[], input: QueryCheckInput): QueryEvent[] {
  const { bracket, takesBracket, widens, roots } = input;
  const isBound = bracket !== null && takesBracket && !widens;
  const low = isBound ? Math.min(bracket[0], bracket[1]) : Number.NEGATIVE_INFINITY;
  const high = isBound ? Math.max(bracket[0], bracket[1]) : Number.POSITIVE_INFINITY;
  const findings: QueryEvent[] = [];
  const known = new FirstAsked();
  // The line that had the answer first, and how many evaluations have come after it.
  let answered: number | null = null;
  let since = 0;
  for (const one of evaluationsOf(events)) {
    const { x, index } = one;
    const earlier = known.note(one);
    if (earlier !== null) findings.push(found('repeated', one, earlier));
    if ((x < low || x > high) && Number.isFinite(x)) findings.push(found('outside', one));
    if (answered !== null) {
      since += 1;
      if (since > lateAllowance) findings.push(found('late', one, answered));
    } else if (isThere(x, roots)) answered = index;
    if (!Number.isFinite(x) || !Number.isFinite(one.answer)) findings.push(found('nonFinite', one));
  }
  return findings;
}

function isThere(x: number, roots: QueryCheckInput['roots']): boolean {
  for (const { ref, attainable } of roots) if (Math.abs(signedError(x, ref)) <= 2 * attainable) return true;
  return false;
}

/** The line at which each kind of evaluation was first asked for at each x. */
class FirstAsked {
  // Maps take −0 and 0 for the same key, and NaN for itself.
  readonly #f = new Map<number, number>();
  readonly #df = new Map<number, number>();
  readonly #d2f = new Map<number, number>();

  /** The line that asked for the same before, or null, when this one is noted as the first. */
  note({ asked, x, index }: Asked): number | null {
    const first = asked === 'f' ? this.#f : asked === 'df' ? this.#df : this.#d2f;
    const earlier = first.get(x);
    if (earlier !== undefined) return earlier;
    first.set(x, index);
    return null;
  }
}

/**
 * For each line of a path the index of the line that it repeats, or null: an evaluation of the same kind at the
 * same x before it. An fdf repeats where both its values were known already; a step never does.
 */
export function repeatsOf(events: readonly PathEvent[]): (number | null)[] {
  const known = new FirstAsked();
  const earlier = events.map((): (number | null)[] => []);
  for (const one of evaluationsOf(events)) earlier[one.index]?.push(known.note(one));
  return earlier.map((lines) => (lines.every((index) => index !== null) ? (lines[0] ?? null) : null));
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

function found(finding: QueryFinding, { asked, index, x }: Asked, earlier: number | null = null): QueryEvent {
  return { finding, asked, index, x, earlier };
}

function unused(events: readonly PathEvent[], root: number | null): QueryEvent[] {
  const last = events.findLast((event) => event.kind !== 'step');
  // Nothing to look for in most paths: the last x was not returned, or no derivative was asked for there.
  if (last === undefined || root === null || last.x !== root) return [];
  const all = evaluationsOf(events);
  const lastIndex = all.at(-1)?.index ?? 0;
  const hasMovedOn = events.slice(lastIndex + 1).some((event) => event.x !== root);
  if (hasMovedOn) return [];
  const values = all.filter(({ asked, x }) => asked === 'f' && x === root);
  if (values.length > 0 && !values.some(({ answer }) => answer === 0)) return [];
  // Only the unbroken stretch at the end: an earlier derivative there led to what came in between.
  const stretch = all.findLastIndex(({ x }) => x !== root);
  return all
    .slice(stretch + 1)
    .filter(({ asked }) => asked !== 'f')
    .map((one) => found('unused', one));
}
