import { pathToFileURL } from 'node:url';
import { solveColumns, solveToValues } from '../../server/features/runs/solve-row.ts';
import type { NewSolve } from '../../server/features/runs/solves.repo.ts';
import { openBenchStore, shortest, solveCount, timed } from './stored-solves.ts';

const batchSize = 200;
const rounds = 4;

export interface InsertBench {
  /** Solves stored in a second through the repo, over bare prepared inserts of the same values: 1 is no loss. */
  ratio: number;
  solvesPerSecond: number;
  barePerSecond: number;
  /** Size of the database for each solve with its path and its share of the indexes. */
  bytesPerSolve: number;
}

/** Stores 20,000 solves with their paths, through the repo and with bare statements, in turns. */
export async function benchInserts(): Promise<InsertBench> {
  const store = await openBenchStore();
  const { client, repo } = store;
  const names = ['run_id', 'solver', 'case_id', 'start', ...solveColumns];
  const bareSolve = client.sqlite.prepare<unknown[]>(
    `INSERT INTO solves (${names.join(', ')}) VALUES (${names.map(() => '?').join(', ')})`,
  );
  const barePath = client.sqlite.prepare<unknown[]>('INSERT INTO paths (solve_id, data) VALUES (?, ?)');
  const batchesOf = <T>(items: T[]): T[][] =>
    Array.from({ length: Math.ceil(items.length / batchSize) }, (_, index) =>
      items.slice(index * batchSize, (index + 1) * batchSize),
    );

  function throughRepo(runId: number, solves: NewSolve[]): number {
    const batches = batchesOf(solves);
    return timed(() => {
      for (const batch of batches) repo.insertMany(runId, batch);
    });
  }
  function bare(runId: number, solves: NewSolve[]): number {
    // The values are ready, so that what is timed is SQLite alone.
    const batches = batchesOf(
      solves.map((solve) => ({
        values: [runId, solve.solver, solve.caseId, solve.start, ...solveToValues(solve.record)],
        path: solve.path,
      })),
    );
    const insert = client.sqlite.transaction((batch: (typeof batches)[number]) => {
      for (const { values, path } of batch) barePath.run(bareSolve.run(...values).lastInsertRowid, path);
    });
    return timed(() => {
      for (const batch of batches) insert.immediate(batch);
    });
  }

  const times: { repo: number[]; bare: number[] } = { repo: [], bare: [] };
  const pages = () => Number(client.sqlite.pragma('page_count', { simple: true }));
  const before = pages();
  for (let round = 0; round < rounds; round += 1) {
    const [first, second] = [store.newRun(), store.newRun()];
    times.repo.push(throughRepo(first, store.solves(first, round)));
    times.bare.push(bare(second, store.solves(second, round)));
  }
  const pageBytes = Number(client.sqlite.pragma('page_size', { simple: true }));
  const bytesPerSolve = ((pages() - before) * pageBytes) / (2 * rounds * solveCount);
  store.close();
  const [ours, theirs] = [shortest(times.repo), shortest(times.bare)];
  return {
    ratio: theirs / ours,
    solvesPerSecond: (1000 * solveCount) / ours,
    barePerSecond: (1000 * solveCount) / theirs,
    bytesPerSolve,
  };
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  const { ratio, solvesPerSecond, barePerSecond, bytesPerSolve } = await benchInserts();
  process.stdout.write(
    `inserts: ${Math.round(solvesPerSecond)} solves/s stored with their paths, ${Math.round(barePerSecond)} bare: ` +
      `ratio ${ratio.toFixed(2)} (no less than 0.5 is asked); ${Math.round(bytesPerSolve)} bytes a solve\n`,
  );
}
