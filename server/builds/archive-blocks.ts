import { type Origin, refuseWhole } from './archive-names.ts';

export const BLOCK_BYTES = 512;

/** Takes a stream apart into stretches of given length. */
export class BlockReader {
  readonly #source: AsyncIterator<Buffer>;
  readonly #origin: Origin;
  #held: Buffer = Buffer.alloc(0);

  constructor(chunks: AsyncIterable<Buffer>, origin: Origin = 'archive') {
    this.#origin = origin;
    this.#source = chunks[Symbol.asyncIterator]();
  }

  /** Exactly so many bytes; null where the stream is over. */
  async take(count: number): Promise<Buffer | null> {
    while (this.#held.length < count) {
      const next = await this.#source.next();
      if (next.done === true) {
        if (this.#held.length > 0) throw refuseWhole(this.#origin, 'it is cut short');
        return null;
      }
      this.#held = this.#held.length === 0 ? next.value : Buffer.concat([this.#held, next.value]);
    }
    const taken = this.#held.subarray(0, count);
    this.#held = this.#held.subarray(count);
    return taken;
  }

  /** So many bytes as they come. */
  async *stretch(count: number): AsyncGenerator<Buffer> {
    let left = count;
    while (left > 0) {
      if (this.#held.length === 0) {
        const next = await this.#source.next();
        if (next.done === true) throw refuseWhole(this.#origin, 'it is cut short');
        this.#held = next.value;
      }
      const chunk = this.#held.subarray(0, left);
      this.#held = this.#held.subarray(chunk.length);
      left -= chunk.length;
      yield chunk;
    }
  }

  /** So many bytes as they come, and then the padding to a whole block. */
  async *body(count: number): AsyncGenerator<Buffer> {
    yield* this.stretch(count);
    const padding = (BLOCK_BYTES - (count % BLOCK_BYTES)) % BLOCK_BYTES;
    if (padding > 0 && (await this.take(padding)) === null)
      throw refuseWhole(this.#origin, 'it is cut short');
  }

  /** Whatever is left. */
  async *rest(): AsyncGenerator<Buffer> {
    if (this.#held.length > 0) yield this.#held;
    for (;;) {
      const next = await this.#source.next();
      if (next.done === true) return;
      yield next.value;
    }
  }

  async close(): Promise<void> {
    await this.#source.return?.();
  }
}
