import { closeSync, constants, openSync, readSync, writeSync } from 'node:fs';
import type { StartReply } from './lane-messages.ts';
import type { LaneState } from './lane-state.ts';
import type { WireEvent } from './wire.ts';
import { LineReader } from './wire-lines.ts';

const { O_NONBLOCK, O_RDONLY } = constants;
const UNREAD_BYTES = 64 * 1024;

function hasCode(error: unknown, code: string): boolean {
  return error instanceof Error && 'code' in error && error.code === code;
}

/** The worker's end of the pipes to one adapter: writes lines, waits for lines. */
export class AdapterLink {
  readonly #pipes: StartReply;
  readonly #state: LaneState;
  readonly #reader = new LineReader();
  readonly #wakeToken: Buffer;
  #hasReadAll = false;
  #isBroken = false;
  /** Solves that have had their end line. */
  endedSolves = 0;
  /** Number of the solve that ended last. */
  lastId = 0;

  constructor(pipes: StartReply, state: LaneState) {
    this.#pipes = pipes;
    this.#state = state;
    this.#wakeToken = Buffer.from(pipes.wakeToken);
  }

  /** False where nobody reads any more. */
  write(text: string): boolean {
    try {
      // Every line of ours fits the pipe's buffer, so a short write happens only for very long heads.
      const bytes = Buffer.from(text);
      let at = 0;
      while (at < bytes.length) at += writeSync(this.#pipes.write, bytes, at, bytes.length - at);
      return true;
    } catch (error) {
      if (!hasCode(error, 'EPIPE')) throw error;
      this.#isBroken = true;
      return false;
    }
  }

  /** The quickest way for one short line of ASCII, which a pipe takes whole. False where nobody reads any more. */
  writeAnswer(text: string): boolean {
    try {
      const count = writeSync(this.#pipes.write, text);
      return count >= text.length || this.write(text.slice(count));
    } catch (error) {
      if (!hasCode(error, 'EPIPE')) throw error;
      this.#isBroken = true;
      return false;
    }
  }

  /** The next line; waits for it. null at the end of the output, or when the process has ended. */
  next(): WireEvent | null {
    for (;;) {
      const event = this.#reader.next();
      if (event) return event;
      if (this.#hasReadAll) return null;
      const isWaiting = !this.#state.hasEnded();
      const count = this.#fill(isWaiting ? this.#pipes.read : this.#pipes.peek);
      if (count <= 0 && (!isWaiting || count === 0)) this.#hasReadAll = true;
    }
  }

  /** The next line that is there without waiting; null where there is none (yet). */
  poll(): WireEvent | null {
    for (;;) {
      const event = this.#reader.next();
      if (event || this.#hasReadAll) return event;
      // Nothing there is the usual case, and comes as an error: its stack is most of its cost.
      const { stackTraceLimit } = Error;
      Error.stackTraceLimit = 0;
      const count = this.#fill(this.#pipes.peek);
      Error.stackTraceLimit = stackTraceLimit;
      if (count === 0) this.#hasReadAll = true;
      if (count <= 0) return null;
    }
  }

  /** Whether the adapter has ended, or has closed its output. */
  isAtEnd(): boolean {
    return this.#hasReadAll || this.#state.hasEnded();
  }

  /** Whether the beginning of a line is there that is no comment. */
  holdsOther(): boolean {
    return this.#reader.holdsOther();
  }

  lastLine(): string {
    return this.#reader.lastLine();
  }

  /** Whether the adapter ended without having read a byte of the text that was written last. */
  hasLeftUnread(text: string): boolean {
    if (this.#isBroken) return true;
    let end: number | null = null;
    try {
      end = openSync(this.#pipes.inPath, O_RDONLY | O_NONBLOCK);
      const bytes = Buffer.alloc(UNREAD_BYTES);
      return bytes.toString('utf8', 0, readSync(end, bytes)) === text;
    } catch {
      return false; // it is empty: all was read
    } finally {
      if (end !== null) closeSync(end);
    }
  }

  /** Where the next read is from. */
  #from = 0;
  readonly #readInto = (buffer: Buffer, offset: number, length: number): number => {
    const got = readSync(this.#from, buffer, offset, length, null);
    if (!this.#state.hasEnded()) return got;
    // The token comes behind everything that the process itself has written.
    const at = buffer.subarray(offset, offset + got).indexOf(this.#wakeToken);
    if (at !== -1) this.#hasReadAll = true;
    return at === -1 ? got : at;
  };

  /** Bytes put in; 0 at the end of the output, -1 where there is nothing to read yet. */
  #fill(from: number): number {
    try {
      this.#from = from;
      const count = this.#reader.fill(this.#readInto);
      return this.#hasReadAll ? Math.max(count, 1) : count;
    } catch (error) {
      if (hasCode(error, 'EAGAIN')) return -1;
      throw error;
    }
  }
}
