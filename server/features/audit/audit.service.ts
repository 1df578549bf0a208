import { AppError } from '../../../shared/errors.ts';
import type { AuditAction, AuditDetail, AuditEntryView, AuditQuery } from '../../../shared/schemas/audit.ts';
import type { Page } from '../../../shared/schemas/paging.ts';
import type { Actor } from '../../actor.ts';
import type { Db } from '../../db/client.ts';
import { numberCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import { createLibrariesRepo } from '../libraries/libraries.repo.ts';
import { presentAuditEntry } from './audit.present.ts';
import { createAuditRepo } from './audit.repo.ts';

/** The record of who did what. Written by the services, in the transaction of the thing itself. */
export function createAuditService(db: Db, clock: Clock) {
  const repo = createAuditRepo(db);
  const libraries = createLibrariesRepo(db);
  return {
    record(
      actor: Actor,
      action: AuditAction,
      libraryId: number | null,
      subject: string,
      detail: AuditDetail = {},
    ) {
      const { name, id = null } = actor;
      repo.insert({ at: clock(), actor: name, actorId: id, action, libraryId, subject, detail });
    },
    list(query: AuditQuery): Page<AuditEntryView> {
      const library = query.library === undefined ? undefined : libraries.find(query.library);
      if (query.library !== undefined && !library)
        throw new AppError('not_found', `There is no library “${query.library}”.`);
      const before = numberCursor(query.cursor, 1)?.[0];
      const rows = repo.listQuery({ libraryId: library?.id, before, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, (row) => [row.entry.id], presentAuditEntry);
    },
  };
}

export type AuditService = ReturnType<typeof createAuditService>;
