import { copyFileSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import type { Express } from 'express';
import { type Logger, pino } from 'pino';
import { afterAll } from 'vitest';
import { localActor } from '../../server/actor.ts';
import { createApp } from '../../server/app.ts';
import type { Identity } from '../../server/auth/identity.ts';
import { type DatabaseClient, openDatabase } from '../../server/db/client.ts';
import { migrateDatabase } from '../../server/db/migrate.ts';
import { createServices, type Services, type ServicesOptions } from '../../server/features/services.ts';
import { recipe } from '../../shared/schemas/builds.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import { createFakeMeasuring, type FakeMeasuring } from './app-fake-measuring.ts';
import { type IdentityChoices, testIdentity } from './app-identity.ts';
import { buildRevision, buildSolver, testEnvironment } from './builders.ts';
import { signInDefault } from './sign-in.ts';

export const scratchFolder = mkdtempSync(path.join(tmpdir(), 'tallyroot-app-'));
let count = 0;
let template: string | undefined;

/** A path to a fresh copy of a migrated database. Migrated once for all tests of a file. */
export function freshDatabaseFile(): string {
  if (template === undefined) {
    template = path.join(scratchFolder, 'template.db');
    const client = openDatabase(template);
    migrateDatabase(client);
    client.close(); // the last connection to close takes the log back into the file
  }
  count += 1;
  const file = path.join(scratchFolder, `copy-${count}.db`);
  copyFileSync(template, file);
  return file;
}

/** A folder that can be registered as a build. */
export function makeBuildFolder(given: {
  solvers?: SolverDeclaration[];
  adapter?: string;
  files?: Record<string, string>;
}): string {
  count += 1;
  const folder = path.join(scratchFolder, `build-${count}`);
  mkdirSync(folder);
  const content = {
    library: 'Pocket roots',
    prepare: [],
    adapter: given.adapter ?? 'node adapter.mjs',
    environment: {},
    solvers: given.solvers ?? [
      buildSolver(),
      buildSolver({ name: 'bisection', takes: 'bracket', starts: 0, order: 1 }),
    ],
  };
  // JSON is YAML; tests of the manifest itself are elsewhere.
  writeFileSync(path.join(folder, 'tallyroot.yaml'), JSON.stringify(content));
  for (const [name, text] of Object.entries(given.files ?? {})) writeFileSync(path.join(folder, name), text);
  return folder;
}

export interface TestApp {
  client: DatabaseClient;
  services: Services;
  identity: Identity;
  /** The application for one who is signed in: a maintainer of what `seedLibrary` makes, and admin of the site. */
  app: Express;
  /** The application as it is: nobody is signed in. */
  bare: Express;
  person: { id: string; name: string };
  measuring: FakeMeasuring;
  jobErrors: unknown[];
  file: string;
  close(): Promise<void>;
}

const open = new Set<TestApp>();

/** The real application on a database of its own; only the measuring is a stand-in unless one is given. */
export function openTestApp(
  given: { measuring?: FakeMeasuring; file?: string } & Partial<
    Pick<ServicesOptions, 'clock' | 'readManifest' | 'allowsLocalPaths' | 'prepareMs'>
  > &
    IdentityChoices & { logger?: Logger } = {},
): TestApp {
  const file = given.file ?? freshDatabaseFile();
  const client = openDatabase(file);
  const measuring = given.measuring ?? createFakeMeasuring();
  const jobErrors: unknown[] = [];
  const services = createServices({
    client,
    measuring,
    readManifest: given.readManifest ?? ((text) => recipe.parse(JSON.parse(text))),
    environment: testEnvironment,
    lanes: 1,
    dataFolder: `${file}.files`,
    allowsLocalPaths: given.allowsLocalPaths ?? true,
    ...(given.prepareMs === undefined ? {} : { prepareMs: given.prepareMs }),
    onJobError: (_job, error) => jobErrors.push(error),
    pollMs: 20,
    ...(given.clock ? { clock: given.clock } : {}),
  });
  const logger = given.logger ?? pino({ level: 'silent' });
  const identity = testIdentity(client, services, given);
  const bare = createApp({ services, identity, logger, allowedHosts: [] });
  const signedIn = signInDefault(bare, services, given.hasDemo ?? true);
  const opened: TestApp = {
    client,
    services,
    identity,
    app: signedIn.app,
    bare,
    person: signedIn.person,
    measuring,
    jobErrors,
    file,
    async close() {
      open.delete(opened);
      await services.jobRunner.stop();
      client.close();
    },
  };
  open.add(opened);
  return opened;
}

/** A library with one build and the small suite of the builders. */
export async function seedLibrary(app: TestApp, folder = makeBuildFolder({})) {
  const { services } = app;
  const library = services.libraries.create(app.person, {
    slug: 'pocket-roots',
    name: 'Pocket roots',
    description: '',
    homepage: null,
    visibility: 'public',
  });
  const suite = services.suites.addRevision(localActor, {
    revision: buildRevision(),
    source: 'format: 1',
    builtIn: false,
    note: '',
  });
  const { build } = await services.builds.registerFolder(localActor, library.slug, { folder });
  return { library, suite: suite.summary, build };
}

afterAll(async () => {
  for (const opened of [...open]) await opened.close();
  rmSync(scratchFolder, { recursive: true, force: true });
});
