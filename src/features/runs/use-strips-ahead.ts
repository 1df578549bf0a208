import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import type { SolveView } from '../../../shared/schemas/runs.ts';
import { stripQuery } from './runs.queries.ts';

const restMs = 2500;
const most = 2000;

/**
 * Reads the strips of all solves once the page has come to rest, so that a long table prints with all of them.
 * A run that goes on is left until it is over, and of a very large one only the first are read.
 */
export function useStripsAhead(solves: readonly SolveView[], isLive: boolean): void {
  const client = useQueryClient();
  useEffect(() => {
    if (isLive) return;
    const timer = window.setTimeout(() => {
      for (const solve of solves.slice(0, most)) {
        if (solve.outcome !== 'not applicable') void client.prefetchQuery(stripQuery(solve.id));
      }
    }, restMs);
    return () => window.clearTimeout(timer);
  }, [client, solves, isLive]);
}
