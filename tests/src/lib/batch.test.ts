import { describe, expect, it } from 'vitest';
import { createBatch } from '../../../src/lib/batch.ts';

function recordingBatch(most: number, known: (id: number) => boolean = () => true) {
  const calls: number[][] = [];
  const ask = createBatch<string>(
    {
      most,
      waitMs: 1,
      async load(ids) {
        calls.push([...ids]);
        return new Map(ids.filter(known).map((id) => [id, `strip ${id}`]));
      },
    },
    () => new Error('missing'),
  );
  return { ask, calls };
}

describe('createBatch', () => {
  it('reads together what is asked for together, each id once', async () => {
    const { ask, calls } = recordingBatch(200);
    expect(await Promise.all([ask(3), ask(1), ask(3)])).toEqual(['strip 3', 'strip 1', 'strip 3']);
    expect(calls).toEqual([[3, 1]]);
  });

  it('never asks for more than the most at once, and loses none', async () => {
    const { ask, calls } = recordingBatch(2);
    const values = await Promise.all([1, 2, 3, 4, 5].map(ask));
    expect(values).toEqual(['strip 1', 'strip 2', 'strip 3', 'strip 4', 'strip 5']);
    expect(calls).toEqual([[1, 2], [3, 4], [5]]);
  });

  it('fails only for those that the answer leaves out', async () => {
    const { ask } = recordingBatch(200, (id) => id !== 2);
    const [one, two] = await Promise.allSettled([ask(1), ask(2)]);
    expect(one).toEqual({ status: 'fulfilled', value: 'strip 1' });
    expect(two.status).toBe('rejected');
  });

  it('passes a failure on to all who asked, and reads afresh after it', async () => {
    let isDown = true;
    const ask = createBatch<number>(
      {
        most: 10,
        waitMs: 1,
        async load(ids) {
          if (isDown) throw new Error('down');
          return new Map(ids.map((id) => [id, id]));
        },
      },
      () => new Error('missing'),
    );
    const failed = await Promise.allSettled([ask(1), ask(2)]);
    expect(failed.map((one) => one.status)).toEqual(['rejected', 'rejected']);
    isDown = false;
    expect(await ask(1)).toBe(1);
  });
});
