import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import type { AdapterLink } from './adapter-link.ts';
import type { LaneState } from './lane-state.ts';
import type { PathRecorder } from './path-recorder.ts';
import {
  encodeAnswer,
  encodeHead,
  encodePairAnswer,
  GO_LINE,
  type ProblemHead,
  STOP_LINE,
  type WireEvent,
} from './wire.ts';

/** The equation as the wire answers it. */
export interface Evaluator {
  f: (x: number) => number;
  df: (x: number) => number;
  d2f: (x: number) => number;
}

/** How a solve ended, before anything is judged. */
export type SolveEnd =
  | { kind: 'root'; x: number }
  | { kind: 'fail'; text: string }
  | { kind: 'over budget' }
  | { kind: 'timed out' }
  | { kind: 'crashed' }
  | { kind: 'garbled'; reason: string; line: string };

export interface RawSolve {
  end: SolveEnd;
  f: number;
  df: number;
  d2f: number;
  /** What the last `iterations` line said. */
  iterations: number | null;
  steps: number;
  elapsedMs: number;
}

/**
 * What came of an attempt. `spoiled`: the adapter broke the rules after the end line of the solve before;
 * `early`: it spoke before `go` in its first solve. Both want a fresh adapter, and this solve again.
 */
export type Attempt =
  | { kind: 'done'; raw: RawSolve; isUsable: boolean; endHow: 'end of file' | 'kill' }
  | { kind: 'spoiled'; what: string }
  | { kind: 'early'; line: string };

export interface SessionLimits {
  solveMs: number;
  graceMs: number;
  headPauseMs: number;
}

const pauseCell = new Int32Array(new SharedArrayBuffer(4));

/** What an adapter that should be silent has done, or null. */
export function findNoise(link: AdapterLink): string | null {
  for (let event = link.poll(); event; event = link.poll()) {
    if (event.kind !== 'comment') return `it wrote "${link.lastLine()}"`;
  }
  if (link.holdsOther()) return `it wrote "${link.lastLine()}"`;
  return link.isAtEnd() ? 'it ended' : null;
}

/** Waits a little for a line that comes too early; null where none does. */
function awaitEarlyLine(link: AdapterLink, limitMs: number): string | null {
  const from = performance.now();
  for (;;) {
    for (let event = link.poll(); event; event = link.poll()) {
      if (event.kind !== 'comment') return link.lastLine();
    }
    if (link.isAtEnd() || performance.now() - from >= limitMs) return null;
    Atomics.wait(pauseCell, 0, 0, 1);
  }
}

/** One solve over the wire. */
export class SolveSession {
  readonly #link: AdapterLink;
  readonly #state: LaneState;
  readonly #head: ProblemHead;
  readonly #evaluator: Evaluator;
  readonly #path: PathRecorder;
  readonly #offers: { f: boolean; df: boolean; d2f: boolean };
  #f = 0;
  #df = 0;
  #d2f = 0;
  #steps = 0;
  #otherLines = 0;
  #iterations: number | null = null;
  /** Whether the line that broke the wire was a second end line of the solve before. */
  #isLateEnd = false;

  constructor(
    link: AdapterLink,
    state: LaneState,
    head: ProblemHead,
    solver: SolverDeclaration,
    evaluator: Evaluator,
    path: PathRecorder,
  ) {
    this.#link = link;
    this.#state = state;
    this.#head = head;
    this.#evaluator = evaluator;
    this.#path = path;
    const { uses } = solver;
    this.#offers = { f: uses.includes('f'), df: uses.includes('df'), d2f: uses.includes('d2f') };
  }

  run(limits: SessionLimits): Attempt {
    const isFirst = this.#link.endedSolves === 0;
    if (!isFirst) {
      const what = findNoise(this.#link);
      if (what !== null) return { kind: 'spoiled', what };
    }
    this.#path.reset();
    let text = encodeHead(this.#head);
    if (isFirst && limits.headPauseMs > 0) {
      this.#link.write(text);
      const line = awaitEarlyLine(this.#link, limits.headPauseMs);
      if (line !== null) return { kind: 'early', line };
      text = '';
    }
    text += GO_LINE;
    this.#state.arm(limits.solveMs);
    const startedAt = performance.now();
    this.#link.write(text);
    const end = this.#serve();
    const wasInTime = this.#state.disarm();
    const raw: RawSolve = {
      end: wasInTime ? (end ?? { kind: 'crashed' }) : { kind: 'timed out' },
      f: this.#f,
      df: this.#df,
      d2f: this.#d2f,
      iterations: this.#iterations,
      steps: this.#steps,
      elapsedMs: performance.now() - startedAt,
    };
    return this.#conclude(raw, end, isFirst, text, limits);
  }

  #conclude(
    raw: RawSolve,
    end: SolveEnd | null,
    isFirst: boolean,
    text: string,
    limits: SessionLimits,
  ): Attempt {
    if (raw.end.kind === 'timed out') return { kind: 'done', raw, isUsable: false, endHow: 'kill' };
    if (end === null) {
      const isSilent = this.#f + this.#df + this.#d2f + this.#otherLines === 0;
      if (!isFirst && isSilent && this.#link.hasLeftUnread(text))
        return { kind: 'spoiled', what: 'it ended' };
      return { kind: 'done', raw, isUsable: false, endHow: 'end of file' };
    }
    if (end.kind === 'garbled') {
      if (this.#isLateEnd) return { kind: 'spoiled', what: `it wrote "${end.line}"` };
      return { kind: 'done', raw, isUsable: false, endHow: 'kill' };
    }
    const isUsable = end.kind !== 'over budget' || this.#awaitEndLine(limits.graceMs);
    if (isUsable) {
      this.#link.endedSolves += 1;
      this.#link.lastId = this.#head.id;
    }
    return { kind: 'done', raw, isUsable, endHow: this.#link.isAtEnd() ? 'end of file' : 'kill' };
  }

  /** Answers until something ends the solve; null where the adapter's output or process ended. */
  #serve(): SolveEnd | null {
    const linesAllowed = 10 * this.#head.allow + 1000;
    for (;;) {
      const event = this.#link.next();
      if (this.#state.isExpired()) return { kind: 'timed out' };
      if (event === null) return null;
      if (event.kind === 'ask') {
        const end = this.#answer(event);
        if (end) return end;
        continue;
      }
      if (event.kind === 'root' || event.kind === 'fail') return this.#readEnd(event);
      this.#otherLines += 1;
      if (this.#otherLines > linesAllowed) {
        return this.#garbled(`more than ${linesAllowed} lines that are no evaluations`);
      }
      const end = this.#readOther(event);
      if (end) return end;
    }
  }

  #answer(event: Extract<WireEvent, { kind: 'ask' }>): SolveEnd | null {
    const { what, x } = event;
    if (event.more)
      return this.#garbled(`${what} takes one number here, this line has ${event.more.length + 1}`);
    if (what === 'jac' || (what === 'fdf' ? !(this.#offers.f && this.#offers.df) : !this.#offers[what])) {
      return this.#garbled(`${what} was not offered`);
    }
    const used = this.#f + this.#df + this.#d2f;
    if (used + (what === 'fdf' ? 2 : 1) > this.#head.allow) {
      this.#link.write(STOP_LINE);
      return { kind: 'over budget' };
    }
    if (what === 'fdf') {
      const y = this.#evaluator.f(x);
      const dy = this.#evaluator.df(x);
      this.#link.writeAnswer(encodePairAnswer(y, dy));
      this.#f += 1;
      this.#df += 1;
      this.#path.add('fdf', x, y, dy);
      return null;
    }
    const y = this.#evaluator[what](x);
    this.#link.writeAnswer(encodeAnswer(y));
    if (what === 'f') this.#f += 1;
    else if (what === 'df') this.#df += 1;
    else this.#d2f += 1;
    this.#path.add(what, x, y, Number.NaN);
    return null;
  }

  #readOther(event: Exclude<WireEvent, { kind: 'ask' | 'root' | 'fail' }>): SolveEnd | null {
    switch (event.kind) {
      case 'comment':
        return null;
      case 'iterations':
        this.#iterations = event.count;
        return null;
      case 'step': {
        const { more } = event;
        if (more && more.length !== 2) {
          return this.#garbled(`step takes one or three numbers here, this line has ${more.length + 1}`);
        }
        const [low = Number.NaN, high = Number.NaN] = more ?? [];
        this.#path.add('step', event.x, low, high);
        this.#steps += 1;
        return null;
      }
      case 'ready':
        return this.#garbled('ready in the middle of a solve');
      case 'garbled':
        return { kind: 'garbled', reason: event.reason, line: event.line };
    }
  }

  #readEnd(event: Extract<WireEvent, { kind: 'root' | 'fail' }>): SolveEnd {
    const { id } = this.#head;
    if (event.id !== id) {
      this.#isLateEnd = this.#link.endedSolves > 0 && event.id === this.#link.lastId;
      return this.#garbled(`an end line for solve ${event.id} in solve ${id}`);
    }
    if (event.kind === 'fail') return { kind: 'fail', text: event.text };
    if (event.more)
      return this.#garbled(`root takes one number here, this line has ${event.more.length + 1}`);
    return { kind: 'root', x: event.x };
  }

  #garbled(reason: string): SolveEnd {
    return { kind: 'garbled', reason, line: this.#link.lastLine() };
  }

  /** After `stop` nothing counts but the end line, in time. */
  #awaitEndLine(graceMs: number): boolean {
    this.#state.arm(graceMs);
    for (;;) {
      const event = this.#link.next();
      if (event === null || this.#state.isExpired()) {
        this.#state.disarm();
        return false;
      }
      const isEnd = event.kind === 'root' || event.kind === 'fail';
      if (isEnd && event.id === this.#head.id) return this.#state.disarm();
    }
  }
}
