import { AppError } from '../../../shared/errors.ts';
import type { CreateLibraryBody, LibraryView } from '../../../shared/schemas/libraries.ts';
import type { Page, PageQuery } from '../../../shared/schemas/paging.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { decodeCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { AuditService } from '../audit/audit.service.ts';
import { presentLibrary } from './libraries.present.ts';
import { createLibrariesRepo, type LibraryRow } from './libraries.repo.ts';

export function createLibrariesService(deps: {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  audit: AuditService;
}) {
  const repo = createLibrariesRepo(deps.client.db);

  function missing(slug: string): AppError {
    return new AppError('not_found', `There is no library “${slug}”.`);
  }

  return {
    create(actor: Actor, body: CreateLibraryBody): LibraryView {
      const library = inTransaction(deps.client, () => {
        const row = repo.insert({ ...body, createdAt: deps.clock(), createdBy: actor.name });
        deps.audit.record(actor, 'library created', row.id, row.slug);
        return row;
      });
      deps.bus.publish({ kind: 'library', library: library.slug });
      return presentLibrary({ library, solverCount: 0, buildCount: 0, runCount: 0 });
    },
    list(query: PageQuery): Page<LibraryView> {
      const after = decodeCursor(query.cursor, ['string'])?.[0]?.toString();
      const rows = repo.listQuery({ after, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, (row) => [row.library.slug], presentLibrary);
    },
    get(slug: string): LibraryView {
      const row = repo.findCounted(slug);
      if (!row) throw missing(slug);
      return presentLibrary(row);
    },
    slugOf(id: number): string {
      const row = repo.findById(id);
      if (!row) throw new AppError('not_found', `There is no library ${id}.`);
      return row.slug;
    },
    /** The row itself, for other services. */
    require(slug: string): LibraryRow {
      const row = repo.find(slug);
      if (!row) throw missing(slug);
      return row;
    },
  };
}

export type LibrariesService = ReturnType<typeof createLibrariesService>;
