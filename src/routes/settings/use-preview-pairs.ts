import { useQueries, useQuery } from '@tanstack/react-query';
import { comparableOf, type Judgeable } from '../../features/allowances/rejudge.ts';
import { buildsQuery } from '../../features/builds/builds.queries.ts';
import { newestPairs } from '../../features/libraries/newest-pairs.ts';
import { runQuery, runsQuery, solvesQuery } from '../../features/runs/runs.queries.ts';
import { suiteRevisionQuery } from '../../features/suites/suites.queries.ts';
import { formatCommit } from '../../lib/format.ts';
import { suitesByUse } from '../library/newest-runs.ts';

export interface PreviewPair extends Judgeable {
  candidateRun: number;
  referenceRun: number;
  commit: string;
  label: string;
}

export interface PreviewPairs {
  pairs: PreviewPair[];
  suite: string | undefined;
  traits: string[];
  isReading: boolean;
  error: Error | null;
}

const most = 4;

/** The newest builds, each with the one before, whole: so that the browser can judge them by other limits. */
export function usePreviewPairs(library: string): PreviewPairs {
  const builds = useQuery(buildsQuery(library));
  const runs = useQuery(runsQuery({ library }));
  const [suite] = suitesByUse(runs.data ?? []);
  // Against the build before also where the run was made against a reference: a run can be read whole.
  const bare = (runs.data ?? []).map((run) => ({ ...run, against: null }));
  const wanted = newestPairs(builds.data ?? [], bare, suite ?? '', most).flatMap(({ build, run, base }) => {
    const before = base.kind === 'run' ? bare.find(({ id }) => id === base.run) : undefined;
    return before === undefined ? [] : [{ build, run, before }];
  });
  const all = [
    ...new Map(wanted.flatMap(({ run, before }) => [run, before]).map((run) => [run.id, run])).values(),
  ];
  const details = useQueries({ queries: all.map((run) => runQuery(run.id)) });
  const solves = useQueries({ queries: all.map((run) => solvesQuery(run.id)) });
  const revisions = useQueries({
    queries: all.map((run) => suiteRevisionQuery(run.suite.slug, run.suite.revision)),
  });
  const sideOf = (id: number) => {
    const index = all.findIndex((run) => run.id === id);
    const [detail, own, revision] = [details[index]?.data, solves[index]?.data, revisions[index]?.data];
    return detail && own && revision ? comparableOf(detail, own, revision) : undefined;
  };
  const queries = [builds, runs, ...details, ...solves, ...revisions];
  return {
    pairs: wanted.flatMap(({ build, run, before }) => {
      const [candidate, reference] = [sideOf(run.id), sideOf(before.id)];
      if (candidate === undefined || reference === undefined) return [];
      const { id: candidateRun } = run;
      const label = build.subject ?? build.label;
      const commit = formatCommit(build.commit ?? build.label);
      return [{ candidate, reference, candidateRun, referenceRun: before.id, commit, label }];
    }),
    suite,
    traits: [...new Set(revisions[0]?.data?.cases.flatMap((one) => one.traits))].sort(),
    isReading: queries.some((query) => query.isPending),
    error: queries.find((query) => query.error !== null)?.error ?? null,
  };
}
