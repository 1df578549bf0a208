import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { z } from 'zod';
import { roles, tokenScopes } from '../../../shared/permissions.ts';
import { json, time } from '../columns.ts';
import { libraries } from './libraries.ts';

/** The sign-in package reads and writes dates as such. */
const date = (name: string) => integer(name, { mode: 'timestamp_ms' });

/** People are disabled, never deleted: what they did stays theirs. */
export const users = sqliteTable(
  'users',
  {
    id: text('id').primaryKey(),
    name: text('name').notNull(),
    email: text('email').notNull(),
    emailVerified: integer('email_verified', { mode: 'boolean' }).notNull(),
    image: text('image'),
    isAdmin: integer('is_admin', { mode: 'boolean' }).notNull().default(false),
    /** Invented people of the demo: they have no password and exist for the server while the demo is on. */
    isDemo: integer('is_demo', { mode: 'boolean' }).notNull().default(false),
    disabledAt: date('disabled_at'),
    createdAt: date('created_at').notNull(),
    updatedAt: date('updated_at').notNull(),
  },
  (table) => [uniqueIndex('users_email').on(table.email), index('users_name').on(table.name, table.id)],
);

export const sessions = sqliteTable(
  'sessions',
  {
    id: text('id').primaryKey(),
    token: text('token').notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    expiresAt: date('expires_at').notNull(),
    ipAddress: text('ip_address'),
    userAgent: text('user_agent'),
    createdAt: date('created_at').notNull(),
    updatedAt: date('updated_at').notNull(),
  },
  (table) => [uniqueIndex('sessions_token').on(table.token), index('sessions_user').on(table.userId)],
);

/** How a person signs in; for now always a password, hashed. */
export const accounts = sqliteTable(
  'accounts',
  {
    id: text('id').primaryKey(),
    accountId: text('account_id').notNull(),
    providerId: text('provider_id').notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    accessToken: text('access_token'),
    refreshToken: text('refresh_token'),
    idToken: text('id_token'),
    accessTokenExpiresAt: date('access_token_expires_at'),
    refreshTokenExpiresAt: date('refresh_token_expires_at'),
    scope: text('scope'),
    password: text('password'),
    createdAt: date('created_at').notNull(),
    updatedAt: date('updated_at').notNull(),
  },
  (table) => [index('accounts_user').on(table.userId)],
);

/** What a mail's link proves, under a hash of it. */
export const verifications = sqliteTable(
  'verifications',
  {
    id: text('id').primaryKey(),
    identifier: text('identifier').notNull(),
    value: text('value').notNull(),
    expiresAt: date('expires_at').notNull(),
    createdAt: date('created_at').notNull(),
    updatedAt: date('updated_at').notNull(),
  },
  (table) => [index('verifications_identifier').on(table.identifier)],
);

/** Who has which role in a library. */
export const members = sqliteTable(
  'members',
  {
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    userId: text('user_id')
      .notNull()
      .references(() => users.id),
    role: text('role', { enum: roles }).notNull(),
    since: time('since').notNull(),
  },
  (table) => [
    primaryKey({ columns: [table.libraryId, table.userId] }),
    index('members_user').on(table.userId, table.libraryId),
  ],
);

export const invitations = sqliteTable(
  'invitations',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    email: text('email').notNull(),
    role: text('role', { enum: roles }).notNull(),
    /** sha-256, hex, of what the mail's link carries. */
    tokenHash: text('token_hash').notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
    expiresAt: time('expires_at').notNull(),
    acceptedAt: time('accepted_at'),
    revokedAt: time('revoked_at'),
  },
  (table) => [
    uniqueIndex('invitations_token').on(table.tokenHash),
    index('invitations_library').on(table.libraryId, table.id),
  ],
);

/** What programs sign in with. The token itself is nowhere. */
export const botTokens = sqliteTable(
  'bot_tokens',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    libraryId: integer('library_id')
      .notNull()
      .references(() => libraries.id),
    name: text('name').notNull(),
    /** The first characters, by which people tell tokens apart. */
    prefix: text('prefix').notNull(),
    /** sha-256, hex, of the whole token: 256 random bits need no slow hash. */
    tokenHash: text('token_hash').notNull(),
    scopes: json('scopes', z.array(z.enum(tokenScopes))).notNull(),
    createdAt: time('created_at').notNull(),
    createdBy: text('created_by').notNull(),
    expiresAt: time('expires_at'),
    lastUsedAt: time('last_used_at'),
    revokedAt: time('revoked_at'),
  },
  (table) => [
    uniqueIndex('bot_tokens_hash').on(table.tokenHash),
    index('bot_tokens_library').on(table.libraryId, table.id),
  ],
);
