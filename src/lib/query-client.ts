import { QueryClient } from '@tanstack/react-query';
import { AppError } from '../../shared/errors.ts';

/** What the server has said for good is not asked again; a hiccup is, twice. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (failures, error) =>
          failures < 2 &&
          !(error instanceof AppError && error.code !== 'unavailable' && error.code !== 'internal'),
      },
    },
  });
}
