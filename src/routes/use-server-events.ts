import { type QueryClient, useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { type ServerEvent, serverEvent } from '../../shared/schemas/events.ts';
import { buildKeys } from '../features/builds/builds.queries.ts';
import { libraryKeys } from '../features/libraries/libraries.queries.ts';
import { runKeys } from '../features/runs/runs.queries.ts';
import { sessionKeys } from '../features/session/session.queries.ts';
import { suiteKeys } from '../features/suites/suites.queries.ts';

const again = (client: QueryClient, queryKey: readonly unknown[]): void => {
  void client.invalidateQueries({ queryKey });
};

function handle(client: QueryClient, event: ServerEvent): void {
  switch (event.kind) {
    case 'run':
      // The page of a run listens for itself; lists are read again when a run begins or ends.
      if (event.status !== 'running' || event.progress.stored === 0) again(client, [...runKeys.all, 'list']);
      return;
    case 'suite':
      again(client, suiteKeys.all);
      return;
    case 'build':
      again(client, buildKeys.all);
      again(client, libraryKeys.one(event.library));
      return;
    case 'library':
      // Somebody who makes a library has a role in it.
      again(client, libraryKeys.all);
      again(client, sessionKeys.me);
      return;
    default:
      again(client, libraryKeys.one(event.library));
  }
}

/** Reads again what the server says has changed. */
export function useServerEvents(): void {
  const client = useQueryClient();
  useEffect(() => {
    const source = new EventSource('/api/events');
    source.onmessage = (message: MessageEvent<string>) => {
      const parsed = serverEvent.safeParse(JSON.parse(message.data));
      if (parsed.success) handle(client, parsed.data);
    };
    // A stream that is not to be opened again has been refused: perhaps nobody is signed in any more.
    source.onerror = () => {
      if (source.readyState === EventSource.CLOSED) again(client, sessionKeys.me);
    };
    return () => source.close();
  }, [client]);
}
