import type { TrendQuery, TrendView } from '../../../shared/schemas/trends.ts';
import type { DatabaseClient } from '../../db/client.ts';
import type { RunsRepo } from '../runs/runs.repo.ts';
import type { SuitesService } from '../suites/suites.service.ts';
import type { LibrariesService } from './libraries.service.ts';
import { createTrendsRepo, type TrendRow } from './trends.repo.ts';

const keptTrends = 16;

/** How the solvers of a library came along over its builds on a suite. */
export function createTrendsService(deps: {
  client: DatabaseClient;
  libraries: LibrariesService;
  suites: SuitesService;
  runs: RunsRepo;
}) {
  const repo = createTrendsRepo(deps.client);
  // Finished runs do not change, so that the same runs always give the same.
  const kept = new Map<string, TrendRow[]>();

  function read(runIds: readonly number[]): TrendRow[] {
    const key = runIds.join(' ');
    const known = kept.get(key);
    if (known) return known;
    const rows = repo.read(runIds);
    kept.set(key, rows);
    const oldest = kept.keys().next().value;
    if (kept.size > keptTrends && oldest !== undefined) kept.delete(oldest);
    return rows;
  }

  return {
    get(slug: string, query: TrendQuery): TrendView {
      const library = deps.libraries.require(slug);
      const suite = deps.suites.requireSuite(query.suite);
      const shown = repo.newestRuns(library.id, suite.id, query.builds).reverse();
      const rows = read(shown.map((build) => build.run));
      const newest = shown.at(-1);
      const names = newest ? deps.runs.readSolvers(newest.run).map((solver) => solver.name) : [];
      return {
        library: slug,
        suite: query.suite,
        builds: shown.map(({ run, build, label, commit }) => ({ id: build, label, commit, run })),
        solvers: names.flatMap((solver) => {
          const own = shown.map(({ run }) => rows.find((row) => row.run === run && row.solver === solver));
          const last = own.at(-1);
          if (!last) return [];
          const over = last.common;
          return {
            solver,
            evaluations: own.map((row) => (row && over > 0 ? row.evaluations : null)),
            over,
            solved: own.map((row) => row?.solved ?? null),
            of: last.applies,
            order: own.map((row) => row?.order ?? null),
          };
        }),
      };
    },
  };
}

export type TrendsService = ReturnType<typeof createTrendsService>;
