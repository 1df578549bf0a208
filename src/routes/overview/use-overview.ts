import { useQueries, useQuery } from '@tanstack/react-query';
import type { BuildView } from '../../../shared/schemas/builds.ts';
import type { ComparisonView } from '../../../shared/schemas/comparisons.ts';
import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import type { RunView } from '../../../shared/schemas/runs.ts';
import { buildsQuery } from '../../features/builds/builds.queries.ts';
import { comparisonQuery } from '../../features/comparisons/comparisons.queries.ts';
import { librariesQuery } from '../../features/libraries/libraries.queries.ts';
import { type NewestPair, newestPairs } from '../../features/libraries/newest-pairs.ts';
import { referenceChainsQuery } from '../../features/references/chains.queries.ts';
import { runsQuery } from '../../features/runs/runs.queries.ts';
import { usePerson } from '../../features/session/use-may.ts';
import { suitesByUse } from '../library/newest-runs.ts';

export interface JudgedBuild extends NewestPair<BuildView> {
  library: LibraryView;
  /** Undefined while it is read. */
  comparison: ComparisonView | undefined;
}

export interface Overview {
  /** Those that one is a member of; all that one may see where one is a member of none. */
  libraries: LibraryView[];
  isMember: boolean;
  running: RunView[];
  /** The newest builds of each library on the suite that it is run on most, newest first. */
  judged: JudgedBuild[];
  failedBuilds: BuildView[];
  failedRuns: RunView[];
  /** Suites on which a library was run, though no results have been agreed on. */
  withoutReference: { library: LibraryView; suite: string; run: RunView }[];
  isReading: boolean;
  errors: number;
}

const judgedBuilds = 4;
const failuresShown = 8;

/** Suites of the finished runs that no reference results are there for, each with its newest run. */
export function lacksReference(runs: readonly RunView[], agreed: ReadonlySet<string>): RunView[] {
  const newest = new Map<string, RunView>();
  for (const run of runs)
    if (run.status === 'finished' && !agreed.has(run.suite.slug) && !newest.has(run.suite.slug))
      newest.set(run.suite.slug, run);
  return [...newest.values()];
}

/** Everything that the overview shows, put together from what the other pages read too. */
export function useOverview(): Overview {
  const person = usePerson();
  const all = useQuery(librariesQuery);
  const own = new Set(person?.memberships.map((membership) => membership.library));
  const mine = (all.data ?? []).filter((library) => own.has(library.slug));
  const libraries = mine.length > 0 ? mine : (all.data ?? []);
  const builds = useQueries({ queries: libraries.map((one) => buildsQuery(one.slug)) });
  const runs = useQueries({ queries: libraries.map((one) => runsQuery({ library: one.slug })) });
  const references = useQueries({ queries: libraries.map((one) => referenceChainsQuery(one.slug)) });

  const pairs = libraries.flatMap((library, index) => {
    const ofLibrary = runs[index]?.data ?? [];
    const [suite] = suitesByUse(ofLibrary);
    if (suite === undefined) return [];
    return newestPairs(builds[index]?.data ?? [], ofLibrary, suite, judgedBuilds).map((pair) => ({
      ...pair,
      library,
    }));
  });
  const comparisons = useQueries({ queries: pairs.map(({ run, base }) => comparisonQuery(run.id, base)) });

  const allRuns = runs.flatMap((query) => query.data ?? []);
  const queries = [all, ...builds, ...runs, ...references, ...comparisons];
  return {
    libraries,
    isMember: mine.length > 0,
    running: allRuns.filter((run) => run.status === 'running' || run.status === 'queued'),
    judged: pairs.map((pair, index) => ({ ...pair, comparison: comparisons[index]?.data })),
    failedBuilds: builds
      .flatMap((query) => query.data ?? [])
      .filter((build) => build.state === 'failed')
      .slice(0, failuresShown),
    failedRuns: allRuns
      .filter((run) => run.status === 'failed' || run.status === 'stopped')
      .slice(0, failuresShown),
    withoutReference: libraries.flatMap((library, index) => {
      const agreed = references[index]?.data;
      if (agreed === undefined) return [];
      return lacksReference(runs[index]?.data ?? [], new Set(agreed.map((one) => one.suite))).map((run) => ({
        library,
        suite: run.suite.slug,
        run,
      }));
    }),
    isReading: queries.some((query) => query.isPending),
    errors: queries.filter((query) => query.isError).length,
  };
}
