import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { localActor } from '../../../server/actor.ts';
import type { ServerEvent } from '../../../shared/schemas/events.ts';
import { pathFromFile } from '../../../shared/schemas/path.ts';
import { makeBuildFolder, openTestApp, seedLibrary } from '../../helpers/app.ts';
import { createFakeMeasuring } from '../../helpers/app-fake-measuring.ts';
import { buildPath } from '../../helpers/builders.ts';

const firstPage = { limit: 500, sort: 'solver', direction: 'up' } as const;

describe('run job', () => {
  it('stores every solve of every solver and case once, with its path', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const { runs, solves, jobRunner } = app.services;
    jobRunner.start();
    const started = runs.start(localActor, { build: build.id, suite: 'tests' });
    expect(started).toMatchObject({ status: 'queued', phase: 'waiting', against: null });
    const run = await runs.wait(started.id);
    expect(run).toMatchObject({ status: 'finished', phase: 'done', reason: null });
    expect(run.progress).toMatchObject({ planned: 6, stored: 6, solved: 6, toConfirm: 0 });
    const { items } = solves.list(run.id, firstPage);
    expect(items.map((solve) => `${solve.solver} ${solve.case}`)).toEqual([
      'secant cubic',
      'secant pole',
      'secant wave',
      'bisection cubic',
      'bisection pole',
      'bisection wave',
    ]);
    for (const { id, evaluations } of items) {
      const detail = solves.get(id);
      expect(detail.path && pathFromFile(detail.path)).toEqual(buildPath(1 + (evaluations % 20)));
    }
    const detail = runs.getDetail(run.id);
    const [secant] = detail.solvers;
    expect(secant).toMatchObject({ outcomes: { solved: 3 }, stored: 3 });
    expect(secant?.evaluations).toBe(
      items.filter((solve) => solve.solver === 'secant').reduce((sum, solve) => sum + solve.evaluations, 0),
    );
    expect(detail.progress.evaluations).toBe(items.reduce((sum, solve) => sum + solve.evaluations, 0));
  });

  it('confirms in a fresh process exactly the solves that differ from what it is compared with', async () => {
    const measuring = createFakeMeasuring({
      shape: (record, salt) =>
        salt === 'changed' && record.case === 'pole'
          ? { pathHash: 'cd'.repeat(32), evaluations: record.evaluations + 1 }
          : {},
      isSteady: (record) => record.solver !== 'bisection',
    });
    const app = openTestApp({ measuring });
    const { build } = await seedLibrary(app);
    const { runs, builds, solves, jobRunner } = app.services;
    jobRunner.start();
    const base = await runs.wait(runs.start(localActor, { build: build.id, suite: 'tests' }).id);
    const folder = makeBuildFolder({ files: { salt: 'changed' } });
    const changed = await builds.registerFolder(localActor, 'pocket-roots', { folder });
    const run = await runs.wait(
      runs.start(localActor, {
        build: changed.build.id,
        suite: 'tests',
        against: { kind: 'run', run: base.id },
      }).id,
    );
    expect(run.progress).toMatchObject({ toConfirm: 2, confirmed: 2, unsteady: 1 });
    expect(measuring.confirmed).toHaveLength(2);
    const steady = solves
      .list(run.id, firstPage)
      .items.map((solve) => [solve.case, solve.solver, solve.steady]);
    expect(steady.filter(([, , isSteady]) => isSteady !== null)).toEqual([
      ['pole', 'secant', true],
      ['pole', 'bisection', false],
    ]);
  });

  it('is compared with the reference results once there are some', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const { runs, references, jobRunner } = app.services;
    jobRunner.start();
    const first = await runs.wait(runs.start(localActor, { build: build.id, suite: 'tests' }).id);
    const reference = references.setFirst(localActor, 'pocket-roots', { run: first.id, reason: 'agreed' });
    const second = runs.start(localActor, { build: build.id, suite: 'tests' });
    expect(second.against).toEqual({ kind: 'reference', revision: reference.id });
    const entries = references.readEntries(reference.id);
    expect(entries).toHaveLength(6);
    expect(new Set(entries.map((entry) => entry.run))).toEqual(new Set([first.id]));
  });

  it('goes on where its stored results end after the server was stopped in the middle', async () => {
    const measuring = createFakeMeasuring({ delayMs: 25 });
    const app = openTestApp({ measuring });
    const { build } = await seedLibrary(app);
    const { runs, jobRunner } = app.services;
    jobRunner.start();
    const { id } = runs.start(localActor, { build: build.id, suite: 'tests' });
    await new Promise<void>((resolve) => {
      const check = setInterval(() => {
        if (measuring.measured.length >= 3) {
          clearInterval(check);
          resolve();
        }
      }, 5);
    });
    await jobRunner.stop();
    expect(runs.get(id)).toMatchObject({ status: 'queued', phase: 'measuring' });
    const measuredBefore = measuring.measured.length;
    expect(runs.get(id).progress.stored).toBe(measuredBefore);
    jobRunner.start();
    expect(await runs.wait(id)).toMatchObject({ status: 'finished', progress: { stored: 6, solved: 6 } });
    expect(measuring.measured).toHaveLength(6);
    expect(new Set(measuring.measured).size).toBe(6);
  });

  it('keeps what was measured when it is cancelled, and can be run again', async () => {
    const measuring = createFakeMeasuring({ delayMs: 25 });
    const app = openTestApp({ measuring });
    const { build } = await seedLibrary(app);
    const { runs, jobRunner, bus } = app.services;
    jobRunner.start();
    const { id } = runs.start(localActor, { build: build.id, suite: 'tests', solvers: ['secant'] });
    await new Promise<void>((resolve) => {
      const stop = bus.subscribe((event) => {
        if (event.kind !== 'run' || event.progress.stored === 0) return;
        stop();
        resolve();
      });
    });
    const cancelled = runs.cancel(localActor, id);
    expect(cancelled).toMatchObject({ status: 'cancelled', reason: 'Cancelled by local.' });
    expect(cancelled.progress.stored).toBeGreaterThan(0);
    expect(() => runs.cancel(localActor, id)).toThrow(/has ended already/);
    const again = await runs.wait(runs.again(localActor, id).id);
    expect(again).toMatchObject({ status: 'finished', progress: { planned: 3, stored: 3 } });
    expect(runs.get(id)).toEqual(cancelled);
  });

  it('tells listeners how far it is, and that it has ended', async () => {
    const app = openTestApp({ measuring: createFakeMeasuring({ delayMs: 30 }) });
    const { build } = await seedLibrary(app);
    const { runs, bus, jobRunner } = app.services;
    const events: ServerEvent[] = [];
    bus.subscribe((event) => events.push(event));
    jobRunner.start();
    const { id } = runs.start(localActor, { build: build.id, suite: 'tests' });
    await runs.wait(id);
    const stored = events.flatMap((event) => (event.kind === 'run' ? [event.progress.stored] : []));
    expect(stored).toEqual(stored.toSorted((a, b) => a - b));
    expect(events.at(-1)).toMatchObject({ kind: 'run', run: id, status: 'finished', phase: 'done' });
  });

  it('keeps the results and the reason where measuring stopped early', async () => {
    const measuring = createFakeMeasuring({ stopped: 'The adapter does not start.' });
    const app = openTestApp({ measuring });
    const { build } = await seedLibrary(app);
    const { runs, references, jobRunner } = app.services;
    jobRunner.start();
    const run = await runs.wait(runs.start(localActor, { build: build.id, suite: 'tests' }).id);
    expect(run).toMatchObject({ status: 'stopped', reason: 'The adapter does not start.' });
    expect(run.progress.stored).toBe(6);
    const setFirst = () => references.setFirst(localActor, 'pocket-roots', { run: run.id, reason: 'no' });
    expect(setFirst).toThrow(/only a finished run/);
  });

  it('fails, with a sentence, where the build has changed since it was registered', async () => {
    const app = openTestApp();
    const folder = makeBuildFolder({});
    const { build } = await seedLibrary(app, folder);
    const { runs, jobRunner } = app.services;
    writeFileSync(
      path.join(folder, 'tallyroot.yaml'),
      JSON.stringify({ ...build.recipe, adapter: 'node another.mjs' }),
    );
    jobRunner.start();
    const run = await runs.wait(runs.start(localActor, { build: build.id, suite: 'tests' }).id);
    expect(run.status).toBe('failed');
    expect(run.reason).toMatch(/manifest of build 1 has changed/);
    expect(app.jobErrors).toEqual([]);
  });

  it('fails without telling details where Tallyroot itself fails, and the error is handed on', async () => {
    const measuring = createFakeMeasuring();
    measuring.measure = () => Promise.reject(new Error('a secret detail'));
    const app = openTestApp({ measuring });
    const { build } = await seedLibrary(app);
    const { runs, jobRunner } = app.services;
    jobRunner.start();
    const run = await runs.wait(runs.start(localActor, { build: build.id, suite: 'tests' }).id);
    expect(run.status).toBe('failed');
    expect(run.reason).not.toMatch(/secret/);
    expect(app.jobErrors).toMatchObject([{ message: 'a secret detail' }]);
  });

  it('is given up when it was begun often and never brought anything', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const { runs, jobRunner } = app.services;
    const { id } = runs.start(localActor, { build: build.id, suite: 'tests' });
    app.client.sqlite.prepare('UPDATE jobs SET attempts = 20 WHERE subject = ?').run(id);
    jobRunner.start();
    expect(await runs.wait(id)).toMatchObject({ status: 'failed', progress: { stored: 0 } });
  });
});
