import type { PersonView, SessionView } from '../../../shared/schemas/people.ts';
import type { SessionRow, UserRow } from './people.repo.ts';

export function presentPerson({ user, libraryCount }: { user: UserRow; libraryCount: number }): PersonView {
  return {
    id: user.id,
    name: user.name,
    email: user.email,
    isVerified: user.emailVerified,
    isAdmin: user.isAdmin,
    isDemo: user.isDemo,
    disabledAt: user.disabledAt?.toISOString() ?? null,
    createdAt: user.createdAt.toISOString(),
    libraryCount,
  };
}

/** Never with the session's token, by which it could be taken over. */
export function presentSession(row: SessionRow, current: string): SessionView {
  return {
    id: row.id,
    isCurrent: row.id === current,
    createdAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
    address: row.ipAddress === '' ? null : row.ipAddress,
    userAgent: row.userAgent === '' ? null : row.userAgent,
  };
}
