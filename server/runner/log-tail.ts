/** The last bytes of a stream, at most `limitBytes` of them. */
export class LogTail {
  readonly #limitBytes: number;
  #chunks: Buffer[] = [];
  #sizeBytes = 0;
  #isCut = false;

  constructor(limitBytes: number) {
    this.#limitBytes = limitBytes;
  }

  push(chunk: Buffer): void {
    this.#chunks.push(chunk);
    this.#sizeBytes += chunk.length;
    while (this.#sizeBytes > this.#limitBytes) {
      const [first] = this.#chunks;
      if (!first) return;
      const excess = this.#sizeBytes - this.#limitBytes;
      this.#isCut = true;
      if (first.length <= excess) this.#chunks.shift();
      else this.#chunks[0] = first.subarray(excess);
      this.#sizeBytes -= Math.min(excess, first.length);
    }
  }

  /** As text; says so where the beginning is missing. */
  text(): string {
    const text = Buffer.concat(this.#chunks).toString('utf8');
    return this.#isCut ? `[earlier lines are not kept]\n${text}` : text;
  }
}
