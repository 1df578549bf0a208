import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { AppError } from '../../shared/errors.ts';

/**
 * What the server has said for good is not asked again; a hiccup is, twice. Wherever the server says that
 * nobody is signed in, `onSignedOut` hears of it.
 */
export function createQueryClient(onSignedOut: (client: QueryClient) => void = () => {}): QueryClient {
  const hear = (error: unknown): void => {
    if (error instanceof AppError && error.code === 'unauthenticated') onSignedOut(client);
  };
  const client = new QueryClient({
    queryCache: new QueryCache({ onError: hear }),
    mutationCache: new MutationCache({ onError: hear }),
    defaultOptions: {
      queries: {
        staleTime: 15_000,
        retry: (failures, error) =>
          failures < 2 &&
          !(error instanceof AppError && error.code !== 'unavailable' && error.code !== 'internal'),
      },
    },
  });
  return client;
}
