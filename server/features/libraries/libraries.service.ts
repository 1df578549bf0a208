import { AppError } from '../../../shared/errors.ts';
import type { ChangeLibraryBody, CreateLibraryBody, LibraryView } from '../../../shared/schemas/libraries.ts';
import type { Page, PageQuery } from '../../../shared/schemas/paging.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { decodeCursor, toPage } from '../../db/cursor.ts';
import type { VisibleLibraries } from '../../db/visible-libraries.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { MembersRepo } from '../members/members.repo.ts';
import { presentLibrary } from './libraries.present.ts';
import { createLibrariesRepo, type LibraryRow } from './libraries.repo.ts';

export function createLibrariesService(deps: {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  audit: AuditService;
  members: Pick<MembersRepo, 'set'>;
}) {
  const repo = createLibrariesRepo(deps.client.db);

  function missing(slug: string): AppError {
    return new AppError('not_found', `There is no library “${slug}”.`);
  }

  function requireLibrary(slug: string): LibraryRow {
    const row = repo.find(slug);
    if (!row) throw missing(slug);
    return row;
  }

  function get(slug: string): LibraryView {
    const row = repo.findCounted(slug);
    if (!row) throw missing(slug);
    return presentLibrary(row);
  }

  return {
    create(actor: Actor, body: CreateLibraryBody): LibraryView {
      const library = inTransaction(deps.client, () => {
        const now = deps.clock();
        const visibility = body.visibility ?? 'private';
        const row = repo.insert({ ...body, visibility, createdAt: now, createdBy: actor.name });
        // Somebody has to have the say in it; a program on the server itself is nobody.
        if (actor.id !== undefined)
          deps.members.set({ libraryId: row.id, userId: actor.id, role: 'maintainer', since: now });
        deps.audit.record(actor, 'library created', row.id, row.slug);
        return row;
      });
      deps.bus.publish({ kind: 'library', library: library.slug });
      return presentLibrary({ library, solverCount: 0, buildCount: 0, runCount: 0 });
    },
    change(actor: Actor, slug: string, body: ChangeLibraryBody): LibraryView {
      const { id, name, description, homepage, visibility } = requireLibrary(slug);
      inTransaction(deps.client, () => {
        const after = {
          name: body.name ?? name,
          description: body.description ?? description,
          homepage: body.homepage === undefined ? homepage : body.homepage,
          visibility: body.visibility ?? visibility,
        };
        repo.update(id, after);
        deps.audit.record(actor, 'library settings changed', id, slug, { ...after, was: visibility });
      });
      deps.bus.publish({ kind: 'library', library: slug });
      return get(slug);
    },
    /** Those that are visible; all of them where it does not matter who asks. */
    list(query: PageQuery, visible?: VisibleLibraries): Page<LibraryView> {
      const after = decodeCursor(query.cursor, ['string'])?.[0]?.toString();
      const rows = repo.listQuery({ after, visible, limit: query.limit + 1 }).all();
      return toPage(rows, query.limit, (row) => [row.library.slug], presentLibrary);
    },
    get,
    slugOf(id: number): string {
      const row = repo.findById(id);
      if (!row) throw new AppError('not_found', `There is no library ${id}.`);
      return row.slug;
    },
    requireById(id: number): LibraryRow {
      const row = repo.findById(id);
      if (!row) throw new AppError('not_found', `There is no library ${id}.`);
      return row;
    },
    /** The row itself, for other services. */
    require: requireLibrary,
  };
}

export type LibrariesService = ReturnType<typeof createLibrariesService>;
