import { LINE_LIMIT_BYTES, parseLine, type WireEvent } from './wire.ts';
import { escapeLine } from './wire-text.ts';

const LF = 0x0a;
const FIRST_SIZE_BYTES = 64 * 1024;
/** Up to here a plain loop finds a line feed sooner than a call into native code. */
const SHORT_BYTES = 256;

/**
 * Cuts a stream of bytes into lines and reads each. One buffer is reused for all of them; it grows for a long
 * line, to twice the wire's limit at most. A last line without its line feed never becomes an event.
 *
 * Before bytes are put in, `next` must have given null: only then is there room for certain.
 */
export class LineReader {
  #buffer = Buffer.allocUnsafeSlow(FIRST_SIZE_BYTES);
  #start = 0;
  #end = 0;
  /** Bytes from #start on that are known to hold no line feed. */
  #searched = 0;
  #isSkipping = false;
  #last: [number, number] = [0, 0];

  /** Lets `read` put bytes into the buffer and says how many it put. */
  fill(read: (buffer: Buffer, offset: number, length: number) => number): number {
    this.#makeRoom();
    this.#last[0] = 0;
    this.#last[1] = 0;
    const count = read(this.#buffer, this.#end, this.#buffer.length - this.#end);
    this.#end += count;
    return count;
  }

  /** Copies bytes in, as many as there is room for, and says how many; `fill` is the way without a copy. */
  push(bytes: Uint8Array): number {
    return this.fill((buffer, offset, length) => {
      const part = bytes.subarray(0, length);
      buffer.set(part, offset);
      return part.length;
    });
  }

  /** Whether the beginning of a line is held that is no comment and not blank. Only when `next` gave null. */
  holdsOther(): boolean {
    const [first] = this.#buffer.toString('latin1', this.#start, this.#end).trimStart();
    return first !== undefined && first !== '#';
  }

  /** The first 200 characters of the line that `next` gave last, or of what is held of one; before the next fill. */
  lastLine(): string {
    const [from, to] = this.#last[0] < this.#last[1] ? this.#last : [this.#start, this.#end];
    return escapeLine(this.#buffer.subarray(from, to));
  }

  /** The next line as an event, or null where no whole line is there. */
  next(): WireEvent | null {
    for (;;) {
      const at = this.#findLineFeed();
      if (at === -1) return this.#nextOfNone();
      const start = this.#start;
      this.#start = at + 1;
      this.#searched = 0;
      if (!this.#isSkipping) {
        this.#last[0] = start;
        this.#last[1] = at;
        return parseLine(this.#buffer, start, at);
      }
      this.#isSkipping = false;
    }
  }

  #findLineFeed(): number {
    const from = this.#start + this.#searched;
    if (this.#end - from > SHORT_BYTES) {
      const found = this.#buffer.subarray(from, this.#end).indexOf(LF);
      return found === -1 ? -1 : from + found;
    }
    for (let at = from; at < this.#end; at += 1) if (this.#buffer[at] === LF) return at;
    return -1;
  }

  #nextOfNone(): WireEvent | null {
    this.#searched = this.#end - this.#start;
    if (this.#isSkipping) {
      this.#drop();
      return null;
    }
    if (this.#searched <= LINE_LIMIT_BYTES) return null;
    const line = escapeLine(this.#buffer.subarray(this.#start, this.#end));
    this.#isSkipping = true;
    this.#drop();
    return { kind: 'garbled', reason: 'a line over 1 MiB', line };
  }

  #drop(): void {
    this.#start = 0;
    this.#end = 0;
    this.#searched = 0;
  }

  #makeRoom(): void {
    if (this.#start === this.#end) this.#drop();
    if (this.#end < this.#buffer.length) return;
    const held = this.#end - this.#start;
    if (held <= this.#buffer.length / 2) {
      this.#buffer.copyWithin(0, this.#start, this.#end);
    } else {
      const larger = Buffer.allocUnsafeSlow(this.#buffer.length * 2);
      this.#buffer.copy(larger, 0, this.#start, this.#end);
      this.#buffer = larger;
    }
    this.#start = 0;
    this.#end = held;
  }
}
