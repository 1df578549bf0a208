import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { auditActions, auditDetail } from '../../../shared/schemas/audit.ts';
import { json, time } from '../columns.ts';
import { libraries } from './libraries.ts';

/** `subject` is the row that the job is about, by kind. A job is owned from its claim to its end. */
export const jobs = sqliteTable(
  'jobs',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    kind: text('kind', { enum: ['run', 'prepare'] }).notNull(),
    subject: integer('subject').notNull(),
    status: text('status', { enum: ['queued', 'running', 'done', 'failed', 'cancelled'] }).notNull(),
    /** How often it was claimed since it last stored something. */
    attempts: integer('attempts').notNull(),
    owner: text('owner'),
    leaseUntil: time('lease_until'),
    error: text('error'),
    createdAt: time('created_at').notNull(),
    finishedAt: time('finished_at'),
  },
  (table) => [
    index('jobs_status').on(table.status, table.id),
    index('jobs_subject').on(table.kind, table.subject),
  ],
);

/** Who did what. Only ever added to: a trigger refuses every update and delete. */
export const auditLog = sqliteTable(
  'audit_log',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    at: time('at').notNull(),
    actor: text('actor').notNull(),
    /** The person's; null for tokens and for programs on the server itself. */
    actorId: text('actor_id'),
    action: text('action', { enum: auditActions }).notNull(),
    libraryId: integer('library_id').references(() => libraries.id),
    subject: text('subject').notNull(),
    detail: json('detail', auditDetail).notNull(),
  },
  (table) => [index('audit_log_library').on(table.libraryId, table.id)],
);
