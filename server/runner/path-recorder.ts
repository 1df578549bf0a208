import { createHash, type Hash } from 'node:crypto';
import { type Path, type PathEvent, type PathKind, pathKinds } from '../../shared/schemas/path.ts';

const FIRST_SIZE = 256;
const COLUMNS = 3;
/** Kind and the eight bytes of x. */
const HASHED_BYTES = 9;
const ROOT_KIND = pathKinds.length;

const kindNumbers: Record<PathKind, number> = { f: 0, df: 1, d2f: 2, fdf: 3, step: 4 };

/** The columns of one path: a kind, x, a and b a line. */
export interface PathColumns {
  kinds: Uint8Array;
  /** x, a, b of each line, one line behind the other. */
  values: Float64Array;
  cut: number;
}

/**
 * Keeps the path of one solve in columns that grow as needed and are used again for the next. Lines over the
 * limit are counted, not kept; the hash is over all evaluations, kept or not.
 */
export class PathRecorder {
  readonly #limit: number;
  #kinds = new Uint8Array(FIRST_SIZE);
  #values = new Float64Array(FIRST_SIZE * COLUMNS);
  #count = 0;
  #cut = 0;
  #hash: Hash | null = null;
  readonly #hashed = Buffer.alloc(HASHED_BYTES * 1024);
  #hashedBytes = 0;

  constructor(limit: number) {
    this.#limit = limit;
  }

  reset(): void {
    this.#count = 0;
    this.#cut = 0;
    this.#hash = null;
    this.#hashedBytes = 0;
  }

  add(kind: PathKind, x: number, a: number, b: number): void {
    if (kind === 'fdf') {
      this.#addToHash(kindNumbers.f, x);
      this.#addToHash(kindNumbers.df, x);
    } else if (kind !== 'step') {
      this.#addToHash(kindNumbers[kind], x);
    }
    if (this.#count >= this.#limit) {
      this.#cut += 1;
      return;
    }
    if (this.#count === this.#kinds.length) this.#grow();
    const at = COLUMNS * this.#count;
    this.#kinds[this.#count] = kindNumbers[kind];
    this.#values[at] = x;
    this.#values[at + 1] = a;
    this.#values[at + 2] = b;
    this.#count += 1;
  }

  /** Hash of the kinds and bits of all evaluations and, where there is one, of the root returned. */
  hash(root: number | null): string {
    if (root !== null) this.#addToHash(ROOT_KIND, root);
    const hash = this.#hash ?? createHash('sha256');
    return hash.update(this.#hashed.subarray(0, this.#hashedBytes)).digest('hex');
  }

  /** A copy of what was kept. */
  columns(): PathColumns {
    return {
      kinds: this.#kinds.slice(0, this.#count),
      values: this.#values.slice(0, COLUMNS * this.#count),
      cut: this.#cut,
    };
  }

  #grow(): void {
    const kinds = new Uint8Array(this.#kinds.length * 2);
    kinds.set(this.#kinds);
    this.#kinds = kinds;
    const values = new Float64Array(this.#values.length * 2);
    values.set(this.#values);
    this.#values = values;
  }

  #addToHash(kind: number, x: number): void {
    if (this.#hashedBytes === this.#hashed.length) {
      this.#hash ??= createHash('sha256');
      this.#hash.update(this.#hashed);
      this.#hashedBytes = 0;
    }
    this.#hashed[this.#hashedBytes] = kind;
    this.#hashed.writeDoubleLE(x, this.#hashedBytes + 1);
    this.#hashedBytes += HASHED_BYTES;
  }
}

export function columnsToPath(columns: PathColumns): Path {
  const events: PathEvent[] = [];
  for (let line = 0; line < columns.kinds.length; line += 1) {
    const at = COLUMNS * line;
    const [x = Number.NaN, a = Number.NaN, b = Number.NaN] = [
      columns.values[at],
      columns.values[at + 1],
      columns.values[at + 2],
    ];
    events.push({ kind: pathKinds[columns.kinds[line] ?? 0] ?? 'f', x, a, b });
  }
  return { events, cut: columns.cut };
}

export function pathToColumns(path: Path): PathColumns {
  const kinds = Uint8Array.from(path.events, (event) => kindNumbers[event.kind]);
  const values = Float64Array.from(path.events.flatMap(({ x, a, b }) => [x, a, b]));
  return { kinds, values, cut: path.cut };
}
