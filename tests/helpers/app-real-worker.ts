/**
 * A program that works on the runs of a database file until none is left, as the server does. Tests end it
 * without warning.
 */
import { setTimeout as wait } from 'node:timers/promises';
import { openServices } from '../../server/open-services.ts';

const [databaseFile = ''] = process.argv.slice(2);
const { services, client } = openServices({
  databaseFile,
  lanes: 1,
  hasBuiltInSuites: false,
  onJobError: (_job, error) => {
    process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
    process.exitCode = 1;
  },
});
services.jobRunner.start();
const open = client.sqlite
  .prepare<[], number>("SELECT count(*) FROM jobs WHERE status IN ('queued', 'running')")
  .pluck();
while (open.get() !== 0) await wait(20);
await services.jobRunner.stop();
client.close();
