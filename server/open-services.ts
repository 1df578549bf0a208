import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { readManifest } from './builds/manifest.ts';
import { type DatabaseClient, openDatabase } from './db/client.ts';
import { migrateDatabase } from './db/migrate.ts';
import { runnerMeasuring } from './features/runs/runner-measuring.ts';
import { createServices, type Services, type ServicesOptions } from './features/services.ts';
import { loadBuiltInSuites } from './features/suites/built-in-suites.ts';
import { describeEnvironment } from './runner/environment.ts';

export interface OpenServicesOptions {
  databaseFile: string;
  lanes: number;
  /** Whether requests may name folders and repositories of this machine. */
  allowsLocalPaths?: boolean;
  /** Where people reach the server. */
  address?: () => string;
  onJobError: ServicesOptions['onJobError'];
  /** Left out where a process only looks, and for tests that bring suites of their own. */
  hasBuiltInSuites?: boolean;
}

/**
 * The product on a database file, ready for work: migrated, with the suites that come with it. For the web
 * server, the command line and the demo; nothing runs until `services.jobRunner.start()`.
 */
export function openServices(options: OpenServicesOptions): { client: DatabaseClient; services: Services } {
  mkdirSync(path.dirname(options.databaseFile), { recursive: true });
  const client = openDatabase(options.databaseFile);
  migrateDatabase(client);
  const services = createServices({
    client,
    measuring: runnerMeasuring,
    readManifest,
    environment: describeEnvironment('unconfined'),
    lanes: options.lanes,
    allowsLocalPaths: options.allowsLocalPaths ?? false,
    ...(options.address ? { address: options.address } : {}),
    onJobError: options.onJobError,
  });
  if (options.hasBuiltInSuites ?? true) loadBuiltInSuites(services.suites);
  return { client, services };
}
