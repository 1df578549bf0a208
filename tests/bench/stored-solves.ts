import { createHash } from 'node:crypto';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { type DatabaseClient, openDatabase } from '../../server/db/client.ts';
import { migrateDatabase } from '../../server/db/migrate.ts';
import { createSolvesRepo, type NewSolve, type SolvesRepo } from '../../server/features/runs/solves.repo.ts';
import { createServices, type Services } from '../../server/features/services.ts';
import { pathToBytes } from '../../server/runner/path-bytes.ts';
import { recipe } from '../../shared/schemas/builds.ts';
import { createFakeMeasuring } from '../helpers/app-fake-measuring.ts';
import {
  buildCase,
  buildPath,
  buildRevision,
  buildSolve,
  buildSolver,
  testEnvironment,
} from '../helpers/builders.ts';

const solverCount = 20;
const caseCount = 250;
const startCount = 4;
export const solveCount = solverCount * caseCount * startCount;

export interface BenchStore {
  client: DatabaseClient;
  services: Services;
  repo: SolvesRepo;
  /** Starts a run that nobody works on, so that it can be filled by hand; of the first build, or of another. */
  newRun(build?: number): number;
  newBuild(label: string): Promise<number>;
  solves(runId: number, variant: number): NewSolve[];
  close(): void;
}

/**
 * A database with a library, a build of 20 solvers and a suite of 250 cases with four starts each. In a folder that
 * is given it is kept, and found again the next time.
 */
export async function openBenchStore(kept?: string): Promise<BenchStore> {
  const folder = kept ?? mkdtempSync(path.join(tmpdir(), 'tallyroot-bench-'));
  mkdirSync(folder, { recursive: true });
  const client = openDatabase(path.join(folder, 'bench.db'));
  migrateDatabase(client);
  const services = createServices({
    client,
    measuring: createFakeMeasuring(),
    readManifest: (text) => recipe.parse(JSON.parse(text)),
    environment: testEnvironment,
    lanes: 1,
    onJobError: () => {},
  });
  const actor = { name: 'bench' };
  const starts = Array.from({ length: startCount }, (_, index) => [String(index), String(index + 1)]);
  const cases = Array.from({ length: caseCount }, (_, index) => buildCase({ id: `case-${index}`, starts }));
  const solvers = Array.from({ length: solverCount }, (_, index) => buildSolver({ name: `solver-${index}` }));
  const manifest = { library: 'Bench', prepare: [], adapter: 'true', environment: {}, solvers };
  writeFileSync(path.join(folder, 'tallyroot.yaml'), JSON.stringify(manifest));
  const newBuild = async (label: string): Promise<number> =>
    (await services.builds.registerFolder(actor, 'bench', { folder, label })).build.id;
  if (services.libraries.list({ limit: 1 }).items.length === 0) {
    services.libraries.create(actor, { slug: 'bench', name: 'Bench', description: '', homepage: null });
    const revision = buildRevision({ id: 'bench', cases });
    services.suites.addRevision(actor, { revision, source: '', builtIn: false, note: '' });
    await newBuild('first');
  }
  const first = services.builds.list('bench', { limit: 500 }).items.at(-1)?.id ?? 0;

  return {
    client,
    services,
    repo: createSolvesRepo(client),
    newBuild,
    newRun: (build = first) => services.runs.start(actor, { build, suite: 'bench', against: null }).id,
    solves(runId, variant) {
      const { caseIdOf } = services.runSolves.keysOf(services.runs.requireRun(runId));
      return solvers.flatMap((solver, position) =>
        cases.flatMap((item) =>
          starts.map((_, start): NewSolve => {
            const key = `${solver.name} ${item.id} ${start}`;
            // Every tenth solve is another one in another variant.
            const isOther = createHash('sha256').update(key).digest().readUInt32LE(0) % 10 === 0;
            const digest = createHash('sha256')
              .update(isOther ? `${key} ${variant}` : key)
              .digest();
            const evaluations = 6 + (digest.readUInt32LE(4) % 40);
            const record = buildSolve({
              solver: solver.name,
              case: item.id,
              start,
              evaluations,
              f: evaluations,
              root: digest.readUInt32LE(8) / 3e9,
              digits: 10 + (digest.readUInt32LE(12) % 600) / 100,
              pathHash: digest.toString('hex'),
            });
            const bytes = pathToBytes(buildPath(evaluations));
            return { solver: position, caseId: caseIdOf.get(item.id) ?? 0, start, record, path: bytes };
          }),
        ),
      );
    },
    close() {
      client.close();
      if (kept === undefined) rmSync(folder, { recursive: true, force: true });
    },
  };
}

/** The shortest of several times, in ms: what the machine can do when nothing else wants it. */
export function shortest(times: readonly number[]): number {
  return Math.min(...times);
}

export function timed(work: () => void): number {
  const from = performance.now();
  work();
  return performance.now() - from;
}
