import type { RunView } from '../../../shared/schemas/runs.ts';

/** The newest finished run of each build on a suite, by build. Runs come newest first. */
export function newestRuns(runs: readonly RunView[], suite: string): Map<number, RunView> {
  const newest = new Map<number, RunView>();
  for (const run of runs) {
    if (run.suite.slug !== suite || run.status !== 'finished') continue;
    if (!newest.has(run.build.id)) newest.set(run.build.id, run);
  }
  return newest;
}

/** Suites that the library was run on, the one with the most builds first; of equals the one run last. */
export function suitesByUse(runs: readonly RunView[]): string[] {
  const names = [...new Set(runs.map((run) => run.suite.slug))];
  const uses = new Map(names.map((name) => [name, newestRuns(runs, name).size]));
  return names.toSorted((a, b) => (uses.get(b) ?? 0) - (uses.get(a) ?? 0));
}
