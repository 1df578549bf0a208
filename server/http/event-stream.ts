import type { Response } from 'express';
import type { ServerEvent } from '../../shared/schemas/events.ts';
import type { EventBus } from '../jobs/event-bus.ts';

export interface EventStreamOptions {
  bus: EventBus;
  filter?: (event: ServerEvent) => boolean;
  /** Sent first, so that a client that comes back has the state of now. */
  first?: ServerEvent | undefined;
  keepAliveMs?: number;
  /** At most one event of a run in this time; the last one is always sent. */
  throttleMs?: number;
}

/** Sends events to one client (server-sent events, as the HTML standard has them) until it leaves. */
export function sendEvents(response: Response, options: EventStreamOptions): void {
  const { bus, filter = () => true, keepAliveMs = 20_000, throttleMs = 200 } = options;
  response.status(200).set({
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.flushHeaders();
  response.write('retry: 2000\n\n');

  const held = new Map<number, ServerEvent>();
  const timers = new Map<number, NodeJS.Timeout>();
  const send = (event: ServerEvent) => response.write(`data: ${JSON.stringify(event)}\n\n`);

  function offer(event: ServerEvent): void {
    if (event.kind !== 'run') {
      send(event);
      return;
    }
    if (timers.has(event.run)) {
      held.set(event.run, event);
      return;
    }
    send(event);
    const { run } = event;
    timers.set(
      run,
      setTimeout(() => {
        timers.delete(run);
        const last = held.get(run);
        held.delete(run);
        if (last) offer(last);
      }, throttleMs),
    );
  }

  if (options.first) send(options.first);
  const unsubscribe = bus.subscribe((event) => {
    if (filter(event)) offer(event);
  });
  const forget = bus.onClose(() => response.end());
  const keepAlive = setInterval(() => response.write(': still here\n\n'), keepAliveMs);
  response.on('close', () => {
    unsubscribe();
    forget();
    clearInterval(keepAlive);
    for (const timer of timers.values()) clearTimeout(timer);
    timers.clear();
  });
}
