import type { Response } from 'express';
import type { ServerEvent } from '../../shared/schemas/events.ts';
import type { EventBus } from '../jobs/event-bus.ts';

export interface EventStreamOptions {
  bus: EventBus;
  filter?: (event: ServerEvent) => boolean;
  /** Sent first, so that a client that comes back has the state of now. */
  first?: ServerEvent | undefined;
  /** Asked before anything is sent; the stream ends where it says no. */
  mayGoOn?: () => boolean;
  keepAliveMs?: number;
  /** At most one event of a run in this time; the last one is always sent. */
  throttleMs?: number;
}

/** Sends events to one client (server-sent events, as the HTML standard has them) until it leaves. */
export function sendEvents(response: Response, options: EventStreamOptions): void {
  const { bus, filter = () => true, mayGoOn = () => true, keepAliveMs = 20_000, throttleMs = 200 } = options;
  response.status(200).set({
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.flushHeaders();
  response.write('retry: 2000\n\n');

  const held = new Map<number, ServerEvent>();
  const timers = new Map<number, NodeJS.Timeout>();
  const write = (text: string) => {
    if (mayGoOn()) response.write(text);
    else response.end();
  };
  const send = (event: ServerEvent) => {
    // Asked once more for one that was held back: what was visible then may not be now.
    if (!response.writableEnded && filter(event)) write(`data: ${JSON.stringify(event)}\n\n`);
  };

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

  if (options.first) write(`data: ${JSON.stringify(options.first)}\n\n`);
  const unsubscribe = bus.subscribe((event) => {
    if (!response.writableEnded && filter(event)) offer(event);
  });
  const forget = bus.onClose(() => response.end());
  const keepAlive = setInterval(() => write(': still here\n\n'), keepAliveMs);
  response.on('close', () => {
    unsubscribe();
    forget();
    clearInterval(keepAlive);
    for (const timer of timers.values()) clearTimeout(timer);
    timers.clear();
  });
}
