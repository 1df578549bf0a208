import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { type BuildLog, buildLogEvent } from '../../../shared/schemas/builds.ts';
import { buildLogQuery } from './build-sources.queries.ts';
import { buildKeys } from './builds.queries.ts';
import { isOver, withLogEvent } from './log-text.ts';

/** What preparing a build wrote; while it goes on, as it is written. */
export function useBuildLog(build: number) {
  const client = useQueryClient();
  const query = useQuery(buildLogQuery(build));
  const isLive = query.data !== undefined && !isOver(query.data.state);
  useEffect(() => {
    if (!isLive) return;
    const source = new EventSource(`/api/builds/${build}/log/events`);
    source.onmessage = (message: MessageEvent<string>) => {
      const parsed = buildLogEvent.safeParse(JSON.parse(message.data));
      if (!parsed.success) return;
      const event = parsed.data;
      client.setQueryData<BuildLog>(buildLogQuery(build).queryKey, (log) => log && withLogEvent(log, event));
      if (event.kind !== 'state') return;
      void client.invalidateQueries({ queryKey: buildKeys.all });
      if (isOver(event.state)) source.close();
    };
    return () => source.close();
  }, [client, build, isLive]);
  return query;
}
