import { hostname } from 'node:os';
import { describe, expect, it } from 'vitest';
import { openDatabase } from '../../../server/db/client.ts';
import { createOwner, hasEnded } from '../../../server/jobs/owner.ts';
import { createQueue, LeaseLost, leaseMs } from '../../../server/jobs/queue.ts';
import { freshDatabaseFile } from '../../helpers/app.ts';

function openQueue(owner?: string, file = freshDatabaseFile()) {
  const client = openDatabase(file);
  const time = { now: 1_000_000 };
  return { client, file, time, queue: createQueue(client, () => time.now, owner) };
}

describe('queue', () => {
  it('gives out jobs oldest first and each one once, also to another connection', () => {
    const first = openQueue();
    const second = openQueue(undefined, first.file);
    const ids = [1, 2, 3, 4].map((subject) => first.queue.enqueue('run', subject).id);
    const claimed = [first, second, second, first, second].map(({ queue }) => queue.claim()?.id);
    expect(claimed).toEqual([...ids, undefined]);
  });

  it('holds a job until its end, and refuses whoever does not own it', () => {
    const mine = openQueue();
    const other = openQueue(undefined, mine.file);
    const { id } = mine.queue.enqueue('run', 1);
    mine.queue.claim();
    expect(() => mine.queue.hold(id)).not.toThrow();
    expect(() => other.queue.hold(id)).toThrow(LeaseLost);
    expect(other.queue.finish(id)).toBe(false);
    expect(mine.queue.finish(id)).toBe(true);
    expect(() => mine.queue.hold(id)).toThrow(LeaseLost);
  });

  it('a cancelled job is lost to its owner at the next heartbeat', () => {
    const { queue } = openQueue();
    const { id } = queue.enqueue('run', 7);
    queue.claim();
    expect(queue.cancel('run', 7)).toBe(1);
    expect(() => queue.hold(id)).toThrow(LeaseLost);
    expect(queue.claim()).toBeUndefined();
  });

  it('puts back what an owner that has ended was working on, at once', () => {
    // Process ids are at most 2^22 on Linux, so this one cannot exist.
    const dead = openQueue(`${hostname()}/999999999/aa`);
    const mine = openQueue(undefined, dead.file);
    const { id } = dead.queue.enqueue('run', 1);
    dead.queue.claim();
    expect(mine.queue.requeueOrphans()).toBe(1);
    expect(mine.queue.claim()).toMatchObject({ id, attempts: 2 });
  });

  it('leaves alone what a living owner holds, until its lease runs out', () => {
    const living = openQueue(`${hostname()}/${process.ppid}/aa`);
    const mine = openQueue(undefined, living.file);
    const far = openQueue('another-host/1/aa', living.file);
    living.queue.enqueue('run', 1);
    living.queue.enqueue('run', 2);
    living.queue.claim();
    far.queue.claim();
    expect(mine.queue.requeueOrphans()).toBe(0);
    mine.time.now += leaseMs + 1;
    expect(mine.queue.requeueOrphans()).toBe(2);
  });

  it('a job that was given back goes on, and one that failed does not', () => {
    const { queue } = openQueue();
    const { id } = queue.enqueue('run', 1);
    queue.claim();
    queue.release(id);
    expect(queue.waiting()).toBe(1);
    expect(queue.claim()).toMatchObject({ id, attempts: 2 });
    queue.fail(id, 'why');
    expect(queue.waiting()).toBe(0);
  });
});

describe('owner', () => {
  it('tells its own earlier life, with the same process id, from itself', () => {
    const self = createOwner();
    const [host, pid] = self.split('/');
    expect(hasEnded(self, self)).toBe(false);
    expect(hasEnded(`${host}/${pid}/000000000000`, self)).toBe(true);
  });

  it('cannot say of another host that its process has ended', () => {
    expect(hasEnded('elsewhere/999999999/aa', createOwner())).toBe(false);
  });
});
