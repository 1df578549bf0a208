import { compareRuns } from '../../../shared/comparison/compare.ts';
import type { Comparison } from '../../../shared/comparison/comparison.ts';
import { AppError } from '../../../shared/errors.ts';
import type {
  ComparisonQuery,
  ComparisonView,
  PairsQuery,
  PairView,
} from '../../../shared/schemas/comparisons.ts';
import type { Page } from '../../../shared/schemas/paging.ts';
import { encodeCursor, numberCursor } from '../../db/cursor.ts';
import type { AllowancesService } from '../allowances/allowances.service.ts';
import { loadReferenceSide, loadRunSide, type Side, type SideDeps } from './comparable.ts';
import { presentComparison, presentPair, type SolveIds } from './comparisons.present.ts';
import { filterPairs, sortPairs } from './filter-pairs.ts';

export interface LoadedComparison {
  comparison: Comparison;
  reference: Side;
  candidate: Side;
  ids: SolveIds;
  library: string;
  suite: string;
  allowances: number;
}

const keptComparisons = 4;

export function createComparisonsService(deps: SideDeps & { allowances: AllowancesService }) {
  // Only what cannot change any more is kept: both runs ended, and allowances of a given number.
  const kept = new Map<string, LoadedComparison>();

  function loadSides(query: ComparisonQuery): { reference: Side; candidate: Side } {
    const candidate = loadRunSide(deps, query.candidate);
    const reference =
      query.reference === undefined
        ? loadReferenceSide(deps, query.revision ?? 0)
        : loadRunSide(deps, query.reference);
    if (reference.libraryId !== candidate.libraryId)
      throw new AppError('unprocessable', 'The two belong to different libraries.');
    if (reference.suiteId !== candidate.suiteId)
      throw new AppError('unprocessable', 'The two were measured on different suites.');
    return { reference, candidate };
  }

  function load(query: ComparisonQuery): LoadedComparison {
    const { library, suite } = deps.runs.get(query.candidate);
    const { number, allowances } = deps.allowances.get(library, query.allowances);
    const key = JSON.stringify([query.candidate, query.reference, query.revision, number]);
    const known = kept.get(key);
    if (known) return known;
    const { reference, candidate } = loadSides(query);
    const comparison = compareRuns(reference.run, candidate.run, allowances);
    const ids = new Map([...reference.run.solves, ...candidate.run.solves].map((solve) => [solve, solve.id]));
    const loaded = { comparison, reference, candidate, ids, library, suite: suite.slug, allowances: number };
    if (reference.isSettled && candidate.isSettled) {
      const oldest = kept.keys().next().value;
      if (kept.size >= keptComparisons && oldest !== undefined) kept.delete(oldest);
      kept.set(key, loaded);
    }
    return loaded;
  }

  return {
    /** The comparison itself, for reports and the command line. */
    load,
    get(query: ComparisonQuery): ComparisonView {
      const loaded = load(query);
      return presentComparison(
        { library: loaded.library, suite: loaded.suite, allowances: loaded.allowances },
        loaded,
        loaded.comparison,
      );
    },
    listPairs(query: PairsQuery): Page<PairView> {
      const { comparison, ids } = load(query);
      const pairs = sortPairs(filterPairs(comparison.pairs, query), query.sort);
      const from = numberCursor(query.cursor, 1)?.[0] ?? 0;
      const items = pairs.slice(from, from + query.limit).map((pair) => presentPair(pair, ids));
      const end = from + query.limit;
      return { items, next: end < pairs.length ? encodeCursor([end]) : null };
    },
  };
}

export type ComparisonsService = ReturnType<typeof createComparisonsService>;
