import type { Clock } from '../jobs/clock.ts';
import type { MailService } from './mail.service.ts';
import type { OutboxRepo, OutboxRow } from './outbox.repo.ts';
import type { MailTransport } from './transport.ts';

const secondMs = 1000;
/** While one process sends a mail, others leave it alone for this long; longer than a transport's patience. */
const leaseMs = 120 * secondMs;
const longestPauseMs = 60 * 60 * secondMs;
/** With the pauses below, about two and a half days. */
const mostAttempts = 70;

/** 10 s, 20 s, 40 s, … and an hour at most. */
export function pauseMs(attempts: number): number {
  return Math.min(longestPauseMs, 10 * secondMs * 2 ** Math.min(attempts - 1, 20));
}

export interface MailDeliveryOptions {
  outbox: OutboxRepo;
  mail: MailService;
  transport: MailTransport;
  clock: Clock;
  /** Told where sending has failed; `recipient` and text are for nobody's log. */
  onError(error: unknown, mailId: number, attempts: number): void;
}

/** Sends what is in the outbox, one mail after the other, and tries again what could not be sent. */
export function createMailDelivery(options: MailDeliveryOptions) {
  const { outbox, transport, clock } = options;
  let timer: NodeJS.Timeout | undefined;
  let work: Promise<void> | undefined;
  let isStopped = true;

  async function deliver(row: OutboxRow): Promise<void> {
    const attempts = row.attempts + 1;
    const claimed = { ...row, nextAt: clock() + leaseMs };
    if (!outbox.updateFrom(row, { nextAt: claimed.nextAt, attempts })) return;
    try {
      const { recipient, subject, text, html } = row;
      await transport.send({ to: recipient, subject, text: text ?? '', html: html ?? '' });
      outbox.updateFrom(claimed, { state: 'sent', text: null, html: null, error: null, sentAt: clock() });
    } catch (error) {
      options.onError(error, row.id, attempts);
      const isLast = attempts >= mostAttempts;
      outbox.updateFrom(claimed, {
        state: isLast ? 'given up' : 'waiting',
        error: error instanceof Error ? error.message.slice(0, 500) : 'unknown',
        nextAt: clock() + pauseMs(attempts),
      });
    }
  }

  async function deliverDue(): Promise<void> {
    for (let row = outbox.nextDue(clock()); row && !isStopped; row = outbox.nextDue(clock()))
      await deliver(row);
  }

  function schedule(): void {
    clearTimeout(timer);
    if (isStopped) return;
    const next = outbox.nextTime();
    if (next === undefined) return;
    timer = setTimeout(wake, Math.min(Math.max(next - clock(), 0), longestPauseMs));
    timer.unref();
  }

  function wake(): void {
    if (isStopped || work) return;
    // In a turn of its own: whoever has just written the mail may still be in its transaction.
    work = new Promise<void>((resolve) => setImmediate(resolve))
      .then(deliverDue)
      .catch((error: unknown) => options.onError(error, 0, 0))
      .finally(() => {
        work = undefined;
        schedule();
      });
  }

  return {
    start(): void {
      isStopped = false;
      options.mail.onSend(wake);
      wake();
    },
    /** Waits for the mail that is being sent. */
    async stop(): Promise<void> {
      isStopped = true;
      clearTimeout(timer);
      await work;
      transport.close();
    },
  };
}

export type MailDelivery = ReturnType<typeof createMailDelivery>;
