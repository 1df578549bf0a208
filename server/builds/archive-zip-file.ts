import { closeSync, createReadStream, fstatSync, openSync, readSync } from 'node:fs';
import { pipeline, type Readable } from 'node:stream';
import { createInflateRaw, inflateRawSync } from 'node:zlib';
import { fromRandomAccessReaderPromise, RandomAccessReader, type ZipFile } from 'yauzl';

/**
 * Reads a zip file with few and plain system calls. An archive of 20,000 small files means 80,000 small reads;
 * made one by one through streams they would take half a minute.
 */
export class ZipReader extends RandomAccessReader {
  readonly #file: number;
  readonly bytes: number;

  constructor(file: string) {
    super();
    this.#file = openSync(file, 'r');
    this.bytes = fstatSync(this.#file).size;
  }

  /** A ZipFile that reads through this; it closes the file when it is closed. */
  open(): Promise<ZipFile> {
    const options = { autoClose: false, decodeStrings: false, validateEntrySizes: false };
    return fromRandomAccessReaderPromise(this, this.bytes, options);
  }

  override read(
    buffer: Buffer,
    offset: number,
    length: number,
    position: number,
    callback: (error: Error | null, bytesRead?: number) => void,
  ): void {
    callback(null, readSync(this.#file, buffer, offset, length, position));
  }

  override _readStreamForRange(start: number, end: number): Readable {
    return createReadStream('', { fd: this.#file, autoClose: false, start, end: end - 1 });
  }

  override close(callback: (error: Error | null) => void): void {
    closeSync(this.#file);
    callback(null);
  }

  /** What lies in a stretch of the file, as it is or inflated. */
  async *contents(start: number, length: number, isDeflated: boolean): AsyncGenerator<Buffer> {
    if (length === 0) return;
    const small = length <= SMALL_BYTES ? this.#readSmall(start, length, isDeflated) : null;
    if (small !== null) yield small;
    else yield* this.#stream(start, length, isDeflated);
  }

  /** At once; null where it inflates to more than that, to be counted as it streams. */
  #readSmall(start: number, length: number, isDeflated: boolean): Buffer | null {
    const raw = Buffer.alloc(length);
    if (readSync(this.#file, raw, 0, length, start) < length) throw new Error('unexpected end of file');
    if (!isDeflated) return raw;
    try {
      const inflated: unknown = inflateRawSync(raw, { maxOutputLength: INFLATED_BYTES, info: true });
      return wholeOf(inflated, length);
    } catch (error) {
      if (error instanceof RangeError) return null;
      throw error;
    }
  }

  async *#stream(start: number, length: number, isDeflated: boolean): AsyncGenerator<Buffer> {
    const raw = this._readStreamForRange(start, start + length);
    const inflate = isDeflated ? createInflateRaw() : null;
    // Errors reach the loop, which reads the last stream of the pipeline.
    const source: Readable = inflate === null ? raw : pipeline(raw, inflate, () => undefined);
    for await (const chunk of source) if (Buffer.isBuffer(chunk)) yield chunk;
    if (inflate !== null && inflate.bytesWritten !== length) throw new Error(TRAILING);
  }
}

const SMALL_BYTES = 64 * 1024;
const INFLATED_BYTES = 1024 * 1024;
const TRAILING = 'something follows behind its data';

/** With `info`, zlib gives its engine beside the result, which knows how much of the input it has used. */
function wholeOf(inflated: unknown, length: number): Buffer {
  if (typeof inflated !== 'object' || inflated === null || !('buffer' in inflated) || !('engine' in inflated))
    throw new Error('zlib gave no account of itself');
  const { buffer, engine } = inflated;
  if (
    !Buffer.isBuffer(buffer) ||
    typeof engine !== 'object' ||
    engine === null ||
    !('bytesWritten' in engine)
  )
    throw new Error('zlib gave no account of itself');
  if (engine.bytesWritten !== length) throw new Error(TRAILING);
  return buffer;
}
