import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { mailStates } from '../../../shared/schemas/site.ts';
import { time } from '../columns.ts';

/** Mails wait here until a mail server has taken them. Their text, which may hold a link, goes when they do. */
export const mailOutbox = sqliteTable(
  'mail_outbox',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    recipient: text('recipient').notNull(),
    subject: text('subject').notNull(),
    text: text('text'),
    html: text('html'),
    state: text('state', { enum: mailStates }).notNull(),
    attempts: integer('attempts').notNull(),
    nextAt: time('next_at').notNull(),
    error: text('error'),
    createdAt: time('created_at').notNull(),
    sentAt: time('sent_at'),
  },
  (table) => [
    index('mail_outbox_due').on(table.state, table.nextAt),
    index('mail_outbox_state').on(table.state, table.id),
  ],
);
