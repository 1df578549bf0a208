import type { RunBase, RunView } from '../../../shared/schemas/runs.ts';

/** A build as far as it matters here. */
interface Registered {
  id: number;
}

export interface NewestPair<Build extends Registered> {
  build: Build;
  run: RunView;
  /** What the run was started against, or else the newest run of the build before. */
  base: RunBase;
}

/**
 * For the newest builds with a finished run on a suite, what each is to be compared with. Builds and runs come
 * newest first. A build that nothing came before, and that has no reference, has no pair.
 */
export function newestPairs<Build extends Registered>(
  builds: readonly Build[],
  runs: readonly RunView[],
  suite: string,
  most: number,
): NewestPair<Build>[] {
  const newest = new Map<number, RunView>();
  for (const run of runs) {
    if (run.suite.slug === suite && run.status === 'finished' && !newest.has(run.build.id))
      newest.set(run.build.id, run);
  }
  const measured = builds.flatMap((build) => {
    const run = newest.get(build.id);
    return run === undefined ? [] : [{ build, run }];
  });
  return measured
    .flatMap(({ build, run }, index): NewestPair<Build>[] => {
      const before = measured[index + 1]?.run;
      if (run.against !== null) return [{ build, run, base: run.against }];
      return before === undefined ? [] : [{ build, run, base: { kind: 'run', run: before.id } }];
    })
    .slice(0, most);
}
