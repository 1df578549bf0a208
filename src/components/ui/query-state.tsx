import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { LoadingStrokes } from './loading-strokes.tsx';
import { ProblemNote } from './problem-note.tsx';

export interface QueryStateProps<Data> {
  query: UseQueryResult<Data>;
  /** What is being read, e.g. "the builds". */
  what: string;
  /** Whether the data has nothing to show; then `empty` stands for it. */
  isEmpty?: (data: Data) => boolean;
  empty?: ReactNode;
  children: (data: Data) => ReactNode;
}

/** The four states of data: pending, error with a way to try again, empty with what to do next, data. */
export function QueryState<Data>({ query, what, isEmpty, empty, children }: QueryStateProps<Data>) {
  if (query.data !== undefined) {
    return isEmpty?.(query.data) === true && empty !== undefined ? empty : children(query.data);
  }
  if (query.isError) {
    return (
      <ProblemNote
        title={`${what.charAt(0).toUpperCase()}${what.slice(1)} could not be read`}
        error={query.error}
        onRetry={() => void query.refetch()}
      />
    );
  }
  return <LoadingStrokes label={`Reading ${what}`} />;
}
