import { AppError } from '../../shared/errors.ts';
import type { Page } from '../../shared/schemas/paging.ts';
import type { OutboxMailView, OutboxQuery } from '../../shared/schemas/site.ts';
import type { Actor } from '../actor.ts';
import { type DatabaseClient, inTransaction } from '../db/client.ts';
import { numberCursor, toPage } from '../db/cursor.ts';
import type { AuditService } from '../features/audit/audit.service.ts';
import { toIso, toIsoOrNull } from '../features/present-time.ts';
import type { Clock } from '../jobs/clock.ts';
import type { OutboxRepo, OutboxRow } from './outbox.repo.ts';
import type { Mail } from './templates.ts';

function present(row: OutboxRow): OutboxMailView {
  const { id, recipient, subject, state, attempts, error, createdAt, nextAt, sentAt } = row;
  return {
    id,
    to: recipient,
    subject,
    state,
    attempts,
    error,
    createdAt: toIso(createdAt),
    nextAt: state === 'waiting' ? toIso(nextAt) : null,
    sentAt: toIsoOrNull(sentAt),
  };
}

/** Puts mails into the outbox, in the transaction of what they are about; sending them is for later. */
export function createMailService(deps: {
  client: DatabaseClient;
  clock: Clock;
  audit: AuditService;
  outbox: OutboxRepo;
}) {
  const { outbox, clock } = deps;
  let wake = () => {};
  return {
    send(recipient: string, mail: Mail): void {
      const now = clock();
      outbox.insert({ ...mail, recipient, state: 'waiting', attempts: 0, nextAt: now, createdAt: now });
      wake();
    },
    /** Calls `listener` when there is a mail to send. */
    onSend(listener: () => void): void {
      wake = listener;
    },
    list(query: OutboxQuery): Page<OutboxMailView> {
      const before = numberCursor(query.cursor, 1)?.[0];
      const rows = outbox.listQuery({ state: query.state, before, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, (row) => [row.id], present);
    },
    /** Tries one at once that waits for its next attempt or was given up. */
    retry(actor: Actor, id: number): OutboxMailView {
      const row = inTransaction(deps.client, () => {
        const found = outbox.find(id);
        if (!found) throw new AppError('not_found', `There is no mail ${id}.`);
        if (found.state === 'sent') throw new AppError('conflict', `Mail ${id} has been sent already.`);
        outbox.updateFrom(found, { state: 'waiting', attempts: 0, nextAt: clock() });
        deps.audit.record(actor, 'mail retried', null, `mail ${id}`);
        return outbox.find(id) ?? found;
      });
      wake();
      return present(row);
    },
  };
}

export type MailService = ReturnType<typeof createMailService>;
