import { and, eq, inArray, sql } from 'drizzle-orm';
import type { DatabaseClient } from '../db/client.ts';
import { jobs } from '../db/schema/operations.ts';
import type { Clock } from './clock.ts';
import { createOwner, hasEnded } from './owner.ts';

export type Job = typeof jobs.$inferSelect;
export type JobKind = Job['kind'];

/** How long a claim holds without a heartbeat. */
export const leaseMs = 15_000;

/** Claims in a row that brought nothing before a job is given up: it may be what kills the server. */
export const maxAttempts = 20;

/** A run whose build another process is still preparing, or is about to, waits for it. */
const isBeingPrepared = `(j.kind = 'run' AND EXISTS (
  SELECT 1 FROM runs JOIN builds ON builds.id = runs.build_id
  WHERE runs.id = j.subject AND builds.state IN ('waiting', 'preparing')))`;

export const nextJobSql = `
  SELECT id FROM jobs AS j WHERE status = 'queued' AND NOT ${isBeingPrepared} ORDER BY id LIMIT 1`;

/** The work is no longer this process's own: its lease ran out, or it was cancelled. */
export class LeaseLost extends Error {
  constructor(job: number) {
    super(`Job ${job} is no longer held by this process`);
    this.name = 'LeaseLost';
  }
}

/**
 * Jobs in the database. A job is claimed in one statement; while it runs its owner renews the lease. It
 * goes back to the queue when its owner has died or has let the lease run out, and its handler then goes
 * on where the stored results end.
 */
export function createQueue(client: DatabaseClient, clock: Clock, owner = createOwner()) {
  const { db } = client;
  // Raw, because claims and heartbeats are the two statements that must each be one and atomic.
  const claimOne = client.sqlite.prepare<[string, number], { id: number }>(
    `UPDATE jobs SET status = 'running', owner = ?, lease_until = ?, attempts = attempts + 1
     WHERE id = (${nextJobSql})
       AND status = 'queued'
     RETURNING id`,
  );
  const renew = client.sqlite.prepare<[number, number, string]>(
    `UPDATE jobs SET lease_until = ? WHERE id = ? AND status = 'running' AND owner = ?`,
  );
  const end = (job: number, set: Partial<Job>) =>
    db
      .update(jobs)
      .set({ owner: null, leaseUntil: null, ...set })
      .where(and(eq(jobs.id, job), eq(jobs.status, 'running'), eq(jobs.owner, owner)))
      .run().changes === 1;

  return {
    owner,
    enqueue(kind: JobKind, subject: number): Job {
      return db
        .insert(jobs)
        .values({ kind, subject, status: 'queued', attempts: 0, createdAt: clock() })
        .returning()
        .get();
    },
    claim(): Job | undefined {
      const claimed = claimOne.get(owner, clock() + leaseMs);
      return claimed && db.select().from(jobs).where(eq(jobs.id, claimed.id)).get();
    },
    /** Renews the lease; throws where the job is not held any more. Also called before results are stored. */
    hold(job: number): void {
      if (renew.run(clock() + leaseMs, job, owner).changes !== 1) throw new LeaseLost(job);
    },
    /** Something was stored: the job is worth going on with, however often its owner dies. */
    progressed(job: number): void {
      db.update(jobs).set({ attempts: 0 }).where(eq(jobs.id, job)).run();
    },
    finish: (job: number) => end(job, { status: 'done', finishedAt: clock() }),
    fail: (job: number, error: string) => end(job, { status: 'failed', error, finishedAt: clock() }),
    /** Gives a job back unfinished, when the server shuts down. */
    release: (job: number) => end(job, { status: 'queued' }),
    /** Ends the jobs of a subject, wherever they run; their owners notice at the next heartbeat. */
    cancel(kind: JobKind, subject: number): number {
      return db
        .update(jobs)
        .set({ status: 'cancelled', owner: null, leaseUntil: null, finishedAt: clock() })
        .where(
          and(eq(jobs.kind, kind), eq(jobs.subject, subject), inArray(jobs.status, ['queued', 'running'])),
        )
        .run().changes;
    },
    /** Puts back what dead owners left; returns how many. */
    requeueOrphans(): number {
      const running = db.select().from(jobs).where(eq(jobs.status, 'running')).all();
      let count = 0;
      for (const job of running) {
        const isHeld = (job.leaseUntil ?? 0) >= clock() && !(job.owner && hasEnded(job.owner, owner));
        if (isHeld || job.owner === null) continue;
        const { changes } = db
          .update(jobs)
          .set({ status: 'queued', owner: null, leaseUntil: null })
          .where(and(eq(jobs.id, job.id), eq(jobs.status, 'running'), eq(jobs.owner, job.owner)))
          .run();
        count += changes;
      }
      return count;
    },
    waiting(): number {
      const row = db
        .select({ count: sql<number>`count(*)` })
        .from(jobs)
        .where(eq(jobs.status, 'queued'))
        .get();
      return row?.count ?? 0;
    },
  };
}

export type Queue = ReturnType<typeof createQueue>;
