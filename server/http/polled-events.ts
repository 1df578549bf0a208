import type { Request, Response } from 'express';
import type { EventBus } from '../jobs/event-bus.ts';

export interface PolledEvent {
  /** Rises; the client sends the last one it had when it comes back. Left out: not to be remembered. */
  id?: number;
  data: unknown;
}

export interface PolledEventsOptions {
  bus: EventBus;
  /** What has come since an event, and whether that was all there will ever be. */
  read(after: number): { events: PolledEvent[]; isOver: boolean };
  pollMs?: number;
  keepAliveMs?: number;
}

/**
 * Sends rows as they are added, whichever process adds them (server-sent events, as the HTML standard has them).
 * Ends behind the last one; a client that comes back then gets 204, which tells it to stop.
 */
export function sendPolledEvents(request: Request, response: Response, options: PolledEventsOptions): void {
  const { bus, read, pollMs = 250, keepAliveMs = 20_000 } = options;
  const given = Number(request.get('last-event-id'));
  let last = Number.isSafeInteger(given) && given > 0 ? given : 0;
  let next = read(last);
  if (last > 0 && next.isOver && next.events.every((event) => event.id === undefined)) {
    response.status(204).end();
    return;
  }
  response.status(200).set({
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.flushHeaders();
  response.write('retry: 2000\n\n');
  let timer: NodeJS.Timeout | undefined;
  let sentAt = performance.now();

  function stop(): void {
    clearTimeout(timer);
    forget();
  }
  function step(): void {
    for (const { id, data } of next.events) {
      const name = id === undefined ? '' : `id: ${id}\n`;
      response.write(`${name}data: ${JSON.stringify(data)}\n\n`);
      last = id ?? last;
    }
    if (next.isOver) {
      response.end();
      return;
    }
    if (next.events.length > 0) sentAt = performance.now();
    else if (performance.now() - sentAt > keepAliveMs) {
      response.write(': still here\n\n');
      sentAt = performance.now();
    }
    timer = setTimeout(() => {
      try {
        next = read(last);
      } catch {
        // What it told about is gone.
        response.end();
        return;
      }
      step();
    }, pollMs);
  }
  const forget = bus.onClose(() => response.end());
  response.on('close', stop);
  step();
}
