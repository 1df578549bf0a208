export interface BatchOptions<Value> {
  /** Reads many at once; what it leaves out is missing. */
  load: (ids: readonly number[]) => Promise<ReadonlyMap<number, Value>>;
  /** Most ids of one call. */
  most: number;
  /** How long the first asker waits for others. */
  waitMs: number;
}

interface Asker<Value> {
  resolve: (value: Value) => void;
  reject: (cause: unknown) => void;
}

/**
 * Makes one request of many small ones: what is asked for within a short while is read together. An id that is
 * asked for twice in that while is read once. `missing` is thrown for an id that the answer leaves out.
 */
export function createBatch<Value>(options: BatchOptions<Value>, missing: () => Error) {
  let waiting = new Map<number, Asker<Value>[]>();
  let timer: ReturnType<typeof setTimeout> | undefined;

  async function read(part: [number, Asker<Value>[]][]): Promise<void> {
    try {
      const found = await options.load(part.map(([id]) => id));
      for (const [id, askers] of part) {
        const value = found.get(id);
        for (const asker of askers) {
          if (value === undefined) asker.reject(missing());
          else asker.resolve(value);
        }
      }
    } catch (cause) {
      for (const [, askers] of part) for (const asker of askers) asker.reject(cause);
    }
  }

  function send(): void {
    clearTimeout(timer);
    timer = undefined;
    const all = [...waiting];
    waiting = new Map();
    for (let from = 0; from < all.length; from += options.most) {
      void read(all.slice(from, from + options.most));
    }
  }

  return (id: number): Promise<Value> =>
    new Promise((resolve, reject) => {
      const askers = waiting.get(id) ?? [];
      askers.push({ resolve, reject });
      waiting.set(id, askers);
      if (waiting.size >= options.most) send();
      else timer ??= setTimeout(send, options.waitMs);
    });
}
