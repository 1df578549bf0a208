import { pathToFileURL } from 'node:url';
import { loadRunSide } from '../../server/features/comparisons/comparable.ts';
import { compareRuns } from '../../shared/comparison/compare.ts';
import { openBenchStore, shortest, timed } from './stored-solves.ts';

const rounds = 5;

export interface ComparisonBench {
  /** Time to read and compare both runs, over the bare read of the same rows: at least 1. */
  ratio: number;
  pairs: number;
  compareMs: number;
  bareReadMs: number;
}

/** Compares 20,000 pairs from the database, against reading the same rows with a bare statement. */
export async function benchComparison(): Promise<ComparisonBench> {
  const store = await openBenchStore();
  const { client, repo, services } = store;
  const [reference, candidate] = [store.newRun(), store.newRun()];
  repo.insertMany(reference, store.solves(reference, 1));
  repo.insertMany(candidate, store.solves(candidate, 2));
  const { allowances } = services.allowances.get('bench');
  const bare = client.sqlite.prepare<[number]>('SELECT * FROM solves WHERE run_id = ?').raw();
  let pairs = 0;
  const times: { compare: number[]; bare: number[] } = { compare: [], bare: [] };
  for (let round = 0; round < rounds; round += 1) {
    times.bare.push(
      timed(() => {
        if (bare.all(reference).length !== bare.all(candidate).length) throw new Error('rows are missing');
      }),
    );
    times.compare.push(
      timed(() => {
        // Not through the service, which would keep the first result.
        const sides = [reference, candidate].map((id) => loadRunSide(services, id));
        const [before, after] = sides;
        if (before && after) pairs = compareRuns(before.run, after.run, allowances).pairs.length;
      }),
    );
  }
  store.close();
  const [compareMs, bareReadMs] = [shortest(times.compare), shortest(times.bare)];
  return { ratio: compareMs / bareReadMs, pairs, compareMs, bareReadMs };
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  const { ratio, pairs, compareMs, bareReadMs } = await benchComparison();
  process.stdout.write(
    `comparison: ${pairs} pairs in ${compareMs.toFixed(0)} ms, bare read of the rows ${bareReadMs.toFixed(0)} ms: ` +
      `ratio ${ratio.toFixed(2)} (no more than 5 is asked)\n`,
  );
}
