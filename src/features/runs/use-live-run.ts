import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { serverEvent } from '../../../shared/schemas/events.ts';
import type { RunDetail } from '../../../shared/schemas/runs.ts';
import { runKeys, runQuery, solvesQuery } from './runs.queries.ts';

const readAgainMs = 1500;

/** Keeps a run that goes on fresh: its progress as the server pushes it, its solves a little less often. */
export function useLiveRun(id: number, isLive: boolean): void {
  const client = useQueryClient();
  useEffect(() => {
    if (!isLive) return;
    const source = new EventSource(`/api/runs/${id}/events`);
    let timer: number | undefined;
    function readAgain(): void {
      timer ??= window.setTimeout(() => {
        timer = undefined;
        void client.invalidateQueries({ queryKey: solvesQuery(id).queryKey });
      }, readAgainMs);
    }
    source.onmessage = (message: MessageEvent<string>) => {
      const parsed = serverEvent.safeParse(JSON.parse(message.data));
      if (!parsed.success || parsed.data.kind !== 'run') return;
      const { status, phase, progress } = parsed.data;
      client.setQueryData<RunDetail>(
        runQuery(id).queryKey,
        (run) => run && { ...run, status, phase, progress },
      );
      if (status === 'queued' || status === 'running') readAgain();
      else void client.invalidateQueries({ queryKey: runKeys.all });
    };
    return () => {
      source.close();
      window.clearTimeout(timer);
    };
  }, [client, id, isLive]);
}
