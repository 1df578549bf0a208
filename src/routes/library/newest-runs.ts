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
