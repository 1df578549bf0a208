import { useQuery } from '@tanstack/react-query';
import type { RunDetail } from '../../../shared/schemas/runs.ts';
import { newestReferenceQuery } from './references.queries.ts';

/** Whether a run could be the first that its library agrees on, for its suite and platform; false until known. */
export function useLacksReference(run: RunDetail): boolean {
  const { environment } = run;
  const canBe = run.status === 'finished' && environment !== null;
  const query = useQuery({
    ...newestReferenceQuery({
      library: run.library,
      suite: run.suite.slug,
      platform: environment === null ? '' : `${environment.platform}-${environment.arch}`,
    }),
    enabled: canBe,
  });
  return canBe && query.data?.items.length === 0;
}
