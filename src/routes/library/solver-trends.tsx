import { type UseQueryResult, useQueries } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { BuildView } from '../../../shared/schemas/builds.ts';
import type { SolverView } from '../../../shared/schemas/libraries.ts';
import type { RunView, SolveView } from '../../../shared/schemas/runs.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import { ProblemNote } from '../../components/ui/problem-note.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { trendSeries } from '../../features/libraries/trend.ts';
import { TrendTable } from '../../features/libraries/trend-table.tsx';
import { solvesQuery } from '../../features/runs/runs.queries.ts';
import { formatCommit, formatCount } from '../../lib/format.ts';

export interface SolverTrendsProps {
  /** Builds with their newest finished run on the suite, oldest first. */
  shown: readonly { build: BuildView; run: RunView }[];
  solvers: readonly SolverView[];
  suite: string;
}

/** All lists once all are there. Kept the same object while nothing changes, so that the series are made once. */
function combineSolves(queries: UseQueryResult<SolveView[]>[]) {
  const lists = queries.flatMap((query) => (query.data === undefined ? [] : [query.data]));
  return {
    solves: lists.length === queries.length ? lists : undefined,
    failed: queries.find((query) => query.isError),
  };
}

/** How each solver came along over the builds. */
export function SolverTrends({ shown, solvers, suite }: SolverTrendsProps) {
  const { solves, failed } = useQueries({
    queries: shown.map(({ run }) => solvesQuery(run.id)),
    combine: combineSolves,
  });
  const series = useMemo(
    () => solves && trendSeries(solves.map((list, index) => ({ label: String(index), solves: list }))),
    [solves],
  );
  return (
    <Entry
      title="Solvers"
      note={
        <>
          <p>
            {formatCount(shown.length, 'build')} on {suite}, left to right. Evaluations are counted over the
            solves that every build shown has solved.
          </p>
          <p>A diamond is a turn for the worse, a large dot one for the better.</p>
        </>
      }
    >
      {shown.length === 0 ? (
        <StateNote title="No build has been run on this suite">
          Open a build and run it; its figures appear here.
        </StateNote>
      ) : failed !== undefined ? (
        <ProblemNote
          title="The solves could not be read"
          error={failed.error}
          onRetry={() => void failed.refetch()}
        />
      ) : series !== undefined ? (
        <TrendTable
          series={series}
          labels={shown.map(({ build }) => formatCommit(build.commit ?? build.label))}
          solvers={solvers}
        />
      ) : (
        <LoadingStrokes label={`Reading the solves of ${formatCount(shown.length, 'build')}`} />
      )}
    </Entry>
  );
}
