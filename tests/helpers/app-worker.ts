/**
 * A program that works on the runs of a database file until none is left, as the server does, with a stand-in
 * for the measuring. Tests end it without warning.
 */
import { setTimeout as wait } from 'node:timers/promises';
import { openDatabase } from '../../server/db/client.ts';
import { createServices } from '../../server/features/services.ts';
import { recipe } from '../../shared/schemas/builds.ts';
import { createFakeMeasuring } from './app-fake-measuring.ts';
import { changedShape, testEnvironment } from './builders.ts';

async function work(databaseFile: string): Promise<void> {
  const client = openDatabase(databaseFile);
  const { jobRunner } = createServices({
    client,
    measuring: createFakeMeasuring({ delayMs: 4, shape: changedShape }),
    readManifest: (text) => recipe.parse(JSON.parse(text)),
    environment: testEnvironment,
    lanes: 1,
    onJobError: (_job, error) => {
      process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
      process.exitCode = 1;
    },
  });
  jobRunner.start();
  const open = client.sqlite
    .prepare<[], number>("SELECT count(*) FROM jobs WHERE status IN ('queued', 'running')")
    .pluck();
  while (open.get() !== 0) await wait(20);
  await jobRunner.stop();
  client.close();
}

void work(process.argv[2] ?? '');
