import { and, asc, count, desc, eq, gt, inArray, isNull, ne, sql } from 'drizzle-orm';
import { AppError } from '../../../shared/errors.ts';
import { type Db, isConstraintError } from '../../db/client.ts';
import { libraries } from '../../db/schema/libraries.ts';
import { accounts, members, sessions, users } from '../../db/schema/people.ts';

export type UserRow = typeof users.$inferSelect;
export type SessionRow = typeof sessions.$inferSelect;

const isActiveAdmin = and(eq(users.isAdmin, true), isNull(users.disabledAt));
const libraryCount = sql<number>`(select count(*) from members as m where m.user_id = users.id)`;

export function createPeopleRepo(db: Db) {
  return {
    insert(row: typeof users.$inferInsert): UserRow {
      try {
        return db.insert(users).values(row).returning().get();
      } catch (error) {
        if (!isConstraintError(error, 'UNIQUE')) throw error;
        throw new AppError('conflict', 'This address has an account already.', { cause: error });
      }
    },
    find: (id: string): UserRow | undefined => db.select().from(users).where(eq(users.id, id)).get(),
    findByEmail: (email: string): UserRow | undefined =>
      db.select().from(users).where(eq(users.email, email)).get(),
    update: (id: string, change: Partial<typeof users.$inferInsert>): UserRow | undefined =>
      db.update(users).set(change).where(eq(users.id, id)).returning().get(),
    /** People who are not of the demo, disabled ones among them. */
    hasRealPeople: (): boolean =>
      db.select({ id: users.id }).from(users).where(eq(users.isDemo, false)).limit(1).get() !== undefined,
    countOtherAdmins: (id: string): number =>
      db
        .select({ n: count() })
        .from(users)
        .where(and(isActiveAdmin, ne(users.id, id)))
        .get()?.n ?? 0,
    listDemo: (): UserRow[] =>
      db
        .select()
        .from(users)
        .where(and(eq(users.isDemo, true), isNull(users.disabledAt)))
        .orderBy(asc(users.name))
        .all(),
    /** By name; `text` is in the name or the address. */
    listQuery: (options: {
      text?: string | undefined;
      after?: [string, string] | undefined;
      limit: number;
    }) => {
      const like = `%${(options.text ?? '').replace(/[\\%_]/g, '\\$&')}%`;
      const { after } = options;
      return db
        .select({ user: users, libraryCount })
        .from(users)
        .where(
          and(
            options.text === undefined
              ? undefined
              : sql`(${users.name} like ${like} escape '\\' or ${users.email} like ${like} escape '\\')`,
            after && sql`(${users.name}, ${users.id}) > (${after[0]}, ${after[1]})`,
          ),
        )
        .orderBy(asc(users.name), asc(users.id))
        .limit(options.limit);
    },
    membershipsOf: (id: string) =>
      db
        .select({
          library: libraries.slug,
          name: libraries.name,
          visibility: libraries.visibility,
          role: members.role,
        })
        .from(members)
        .innerJoin(libraries, eq(libraries.id, members.libraryId))
        .where(eq(members.userId, id))
        .orderBy(asc(libraries.slug))
        .all(),

    setPassword(userId: string, hash: string, id: string, now: Date): void {
      db.delete(accounts).where(eq(accounts.userId, userId)).run();
      db.insert(accounts)
        .values({
          id,
          accountId: userId,
          providerId: 'credential',
          userId,
          password: hash,
          createdAt: now,
          updatedAt: now,
        })
        .run();
    },

    listSessions: (userId: string, now: Date): SessionRow[] =>
      db
        .select()
        .from(sessions)
        .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, now)))
        .orderBy(desc(sessions.createdAt))
        .all(),
    findSession: (id: string): SessionRow | undefined =>
      db.select().from(sessions).where(eq(sessions.id, id)).get(),
    deleteSessions: (userId: string, ids?: readonly string[]): number =>
      db
        .delete(sessions)
        .where(and(eq(sessions.userId, userId), ids && inArray(sessions.id, [...ids])))
        .run().changes,
  };
}

export type PeopleRepo = ReturnType<typeof createPeopleRepo>;
