import { spawn } from 'node:child_process';
import { copyFileSync, existsSync, readdirSync, readlinkSync, realpathSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { describe, expect, it, vi } from 'vitest';
import { openDatabase } from '../../../server/db/client.ts';
import { openServices } from '../../../server/open-services.ts';
import {
  freshDatabaseFile,
  makeBuildFolder,
  openTestApp,
  scratchFolder,
  seedLibrary,
} from '../../helpers/app.ts';
import { bundleEnvironment, bundleProgram } from '../../helpers/app-bundle.ts';
import { cubeRoots, writeRealBuild } from '../../helpers/app-real-build.ts';
import { buildCase, buildRevision } from '../../helpers/builders.ts';

const actor = { name: 'local' };
const kills = 22;

/** Whole numbers below a bound, the same in every run of the test (Lehmer's generator, modulus 2^31 - 1). */
function createDraw(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (state * 16_807) % 2_147_483_647;
    return state % below;
  };
}

interface Program {
  argv: string[];
  environment: NodeJS.ProcessEnv;
}

/** Works on a database until all is done, or until it is killed once `isTime` says so. */
async function work(
  program: Program,
  databaseFile: string,
  isTime?: () => boolean,
): Promise<{ code: number | null; errors: string }> {
  const child = spawn(process.execPath, [...program.argv, databaseFile], {
    stdio: ['ignore', 'ignore', 'pipe'],
    env: program.environment,
  });
  let hasEnded = false;
  const ended = new Promise<number | null>((resolve) => {
    child.on('exit', (code) => {
      hasEnded = true;
      resolve(code);
    });
  });
  let errors = '';
  child.stderr.on('data', (chunk: Buffer) => {
    errors += chunk.toString();
  });
  if (isTime) {
    while (!hasEnded && !isTime()) await wait(5);
    child.kill('SIGKILL');
  }
  return { code: await ended, errors };
}

/** Everything that a run stored, but for what the clock decides. */
function resultsOf(databaseFile: string, runId: number): unknown[] {
  const { sqlite, close } = openDatabase(databaseFile);
  const columns = sqlite
    .prepare<[], string>(
      "SELECT name FROM pragma_table_info('solves') WHERE name NOT IN ('id', 'elapsed_ms')",
    )
    .pluck()
    .all();
  const rows = sqlite
    .prepare(
      `SELECT ${columns.map((name) => `s.${name}`).join(', ')}, hex(p.data) AS path FROM solves AS s
       LEFT JOIN paths AS p ON p.solve_id = s.id WHERE run_id = ? ORDER BY solver, case_id, start`,
    )
    .all(runId);
  close();
  return rows;
}

/** What must hold at every moment, however the process ended. */
function checkStore(databaseFile: string, runId: number): { stored: number; confirmed: number } {
  const { sqlite, close } = openDatabase(databaseFile);
  expect(sqlite.pragma('quick_check', { simple: true })).toBe('ok');
  expect(sqlite.pragma('foreign_key_check')).toEqual([]);
  const row = sqlite
    .prepare<
      [number],
      Record<'stored' | 'counted' | 'solved' | 'countedSolved' | 'confirmed' | 'marked', number>
    >(
      `SELECT stored, solved, confirmed,
         (SELECT count(*) FROM solves WHERE run_id = r.id) AS counted,
         (SELECT count(*) FROM solves WHERE run_id = r.id AND outcome = 1) AS countedSolved,
         (SELECT count(*) FROM solves WHERE run_id = r.id AND steady IS NOT NULL) AS marked
       FROM runs AS r WHERE id = ?`,
    )
    .get(runId);
  close();
  expect(row).toMatchObject({ counted: row?.stored, countedSolved: row?.solved, marked: row?.confirmed });
  return { stored: row?.stored ?? -1, confirmed: row?.confirmed ?? -1 };
}

/** Processes of this machine that work in a folder, where the system can be asked. */
function processesIn(folder: string): string[] {
  if (!existsSync('/proc/self/cwd')) return [];
  return readdirSync('/proc').filter((name) => {
    if (!/^\d+$/.test(name)) return false;
    try {
      return readlinkSync(`/proc/${name}/cwd`) === folder;
    } catch {
      return false; // ended meanwhile, or of another user
    }
  });
}

/** A suite whose paths differ between the two builds of `changedShape` in one case of ten. */
const manyCases = buildRevision({
  cases: Array.from({ length: 150 }, (_, index) => buildCase({ id: `case-${index}` })),
});

describe('a run whose server is killed', () => {
  it('ends with nothing lost, nothing twice and the results of a run that was left alone', async () => {
    const entry = fileURLToPath(new URL('../../helpers/app-worker.ts', import.meta.url));
    const bundle = await bundleProgram(entry, path.join(scratchFolder, 'bundle'));
    const program = { argv: [bundle], environment: bundleEnvironment };
    const app = openTestApp();
    const { suites, builds, runs, references } = app.services;
    const { build } = await seedLibrary(app);
    const content = { ...manyCases, id: 'many' };
    suites.addRevision(actor, { revision: content, source: '', builtIn: false, note: '' });
    const before = runs.start(actor, { build: build.id, suite: 'many' });
    app.services.jobRunner.start();
    await runs.wait(before.id);
    references.setFirst(actor, 'pocket-roots', { run: before.id, reason: 'agreed' });
    await app.services.jobRunner.stop();
    const folder = makeBuildFolder({ files: { salt: 'changed' } });
    const changed = await builds.registerFolder(actor, 'pocket-roots', { folder });
    const settings = { confirm: 'all' as const };
    const { id } = runs.start(actor, { build: changed.build.id, suite: 'many', settings });
    app.client.sqlite.pragma('wal_checkpoint(TRUNCATE)');
    const killed = `${app.file}.killed`;
    const undisturbed = `${app.file}.undisturbed`;
    copyFileSync(app.file, killed);
    copyFileSync(app.file, undisturbed);
    expect(await work(program, undisturbed)).toEqual({ code: 0, errors: '' });

    // Killed after a number of solves more that is drawn, and a moment later that is drawn as well, so that
    // the kills fall everywhere, in the middle of a transaction too, on fast and on slow machines.
    const watcher = openDatabase(killed);
    const doneOf = watcher.sqlite
      .prepare<[number], number>('SELECT stored + confirmed FROM runs WHERE id = ?')
      .pluck();
    const draw = createDraw(20_260);
    let progress = { stored: 0, confirmed: 0 };
    let inMeasuring = 0;
    let inConfirming = 0;
    for (let kill = 0; kill < kills; kill += 1) {
      const goal = progress.stored + progress.confirmed + draw(60);
      const delayMs = draw(60);
      let from = Number.POSITIVE_INFINITY;
      await work(program, killed, () => {
        if (from === Number.POSITIVE_INFINITY && (doneOf.get(id) ?? 0) >= goal) from = performance.now();
        return performance.now() - from >= delayMs;
      });
      const now = checkStore(killed, id);
      expect(now.stored).toBeGreaterThanOrEqual(progress.stored);
      expect(now.confirmed).toBeGreaterThanOrEqual(progress.confirmed);
      if (now.stored > progress.stored && now.stored < 300) inMeasuring += 1;
      if (now.confirmed > progress.confirmed && now.confirmed < 300) inConfirming += 1;
      progress = now;
    }
    watcher.close();
    expect(inMeasuring).toBeGreaterThan(1);
    expect(inConfirming).toBeGreaterThan(1);
    expect(await work(program, killed)).toEqual({ code: 0, errors: '' });

    checkStore(killed, id);
    const results = resultsOf(killed, id);
    expect(results).toHaveLength(300);
    expect(results).toEqual(resultsOf(undisturbed, id));
    const run = openTestApp({ file: killed }).services.runs.get(id);
    expect(run).toMatchObject({ status: 'finished', phase: 'done' });
    expect(run.progress).toMatchObject({
      planned: 300,
      stored: 300,
      toConfirm: 300,
      confirmed: 300,
      unsteady: 0,
    });
  }, 120_000);

  it('is taken up by the next one with the real runner, and no adapter is left behind', async () => {
    const file = freshDatabaseFile();
    const first = openServices({
      databaseFile: file,
      lanes: 1,
      hasBuiltInSuites: false,
      onJobError: () => {},
    });
    const { libraries, suites, builds, runs } = first.services;
    libraries.create(actor, { slug: 'cube-roots', name: 'Cube roots', description: '', homepage: null });
    suites.addRevision(actor, { revision: cubeRoots(20), source: '', builtIn: false, note: '' });
    const folder = writeRealBuild(path.join(scratchFolder, 'cube-roots'), { form: 'first', pauseMs: 120 });
    const { build } = await builds.registerFolder(actor, 'cube-roots', { folder });
    const { id } = runs.start(actor, { build: build.id, suite: 'cube-roots' });
    const program = fileURLToPath(new URL('../../helpers/app-real-worker.ts', import.meta.url));
    const child = spawn(process.execPath, ['--import', 'tsx', program, file], { stdio: 'ignore' });
    await vi.waitFor(() => expect(runs.get(id).progress.stored).toBeGreaterThan(1), { timeout: 60_000 });
    child.kill('SIGKILL');
    await new Promise((resolve) => child.on('exit', resolve));
    const { stored } = checkStore(file, id);
    expect(stored).toBeLessThan(40);
    first.services.jobRunner.start();
    expect(await runs.wait(id)).toMatchObject({ status: 'finished', progress: { planned: 40, stored: 40 } });
    checkStore(file, id);
    const detail = runs.getDetail(id);
    expect(detail.adapterText).toBe('cube roots 1.0');
    // One case has no bracket, so that bisection does not apply to it.
    expect(detail.solvers.map((solver) => solver.outcomes)).toEqual([
      { 'not applicable': 1, solved: 19 },
      { solved: 20 },
    ]);
    await first.services.jobRunner.stop();
    first.client.close();
    await vi.waitFor(() => expect(processesIn(realpathSync(folder))).toEqual([]), { timeout: 10_000 });
  }, 120_000);
});
