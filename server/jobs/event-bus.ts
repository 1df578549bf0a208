import type { ServerEvent } from '../../shared/schemas/events.ts';

export type EventListener = (event: ServerEvent) => void;

/** Tells whoever listens in this process what has changed. Listeners must not throw. */
export function createEventBus() {
  const listeners = new Set<EventListener>();
  const endings = new Set<() => void>();
  return {
    publish(event: ServerEvent): void {
      for (const listener of [...listeners]) listener(event);
    },
    /** Returns a function that ends the subscription. */
    subscribe(listener: EventListener): () => void {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    size: () => listeners.size,
    /** Ends every stream of events: the server stops. */
    close(): void {
      for (const end of [...endings]) end();
    },
    /** Calls `end` when the bus closes; returns a function that takes it back. */
    onClose(end: () => void): () => void {
      endings.add(end);
      return () => endings.delete(end);
    },
  };
}

export type EventBus = ReturnType<typeof createEventBus>;
