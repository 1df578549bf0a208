import type { z } from 'zod';
import { AppError } from '../../../shared/errors.ts';
import type {
  AllowanceRevisionView,
  setAllowancesBody,
} from '../../../shared/schemas/allowance-revisions.ts';
import type { Page, PageQuery } from '../../../shared/schemas/paging.ts';
import type { Actor } from '../../actor.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import { numberCursor, toPage } from '../../db/cursor.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { presentAllowances, presentDefaultAllowances } from './allowances.present.ts';
import { createAllowancesRepo } from './allowances.repo.ts';

export function createAllowancesService(deps: {
  client: DatabaseClient;
  clock: Clock;
  bus: EventBus;
  audit: AuditService;
  libraries: LibrariesService;
}) {
  const repo = createAllowancesRepo(deps.client.db);

  return {
    /** The revision with this number, or the one that holds now. */
    get(slug: string, number?: number): AllowanceRevisionView {
      const { id } = deps.libraries.require(slug);
      if (number === 0) return presentDefaultAllowances(slug);
      const row =
        number === undefined ? repo.listQuery({ libraryId: id, limit: 1 }).get() : repo.find(id, number);
      if (row) return presentAllowances(slug, row);
      if (number === undefined) return presentDefaultAllowances(slug);
      throw new AppError('not_found', `Library “${slug}” has no allowances number ${number}.`);
    },
    list(slug: string, query: PageQuery): Page<AllowanceRevisionView> {
      const { id } = deps.libraries.require(slug);
      const before = numberCursor(query.cursor, 1)?.[0];
      const rows = repo.listQuery({ libraryId: id, before, limit: query.limit + 1 }).all();
      return toPage(
        rows,
        query.limit,
        (row) => [row.number],
        (row) => presentAllowances(slug, row),
      );
    },
    /** Adds a revision. `basedOn` keeps two authors from undoing each other unseen. */
    set(actor: Actor, slug: string, body: z.output<typeof setAllowancesBody>): AllowanceRevisionView {
      const { id } = deps.libraries.require(slug);
      const row = inTransaction(deps.client, () => {
        const current = repo.listQuery({ libraryId: id, limit: 1 }).get()?.number ?? 0;
        if (current !== body.basedOn)
          throw new AppError(
            'conflict',
            `The allowances are at number ${current} by now; look at them and try again.`,
            { issues: [{ path: 'basedOn', message: `the current number is ${current}` }] },
          );
        const added = repo.insert({
          libraryId: id,
          number: current + 1,
          allowances: body.allowances,
          reason: body.reason,
          createdAt: deps.clock(),
          createdBy: actor.name,
        });
        deps.audit.record(actor, 'allowances set', id, slug, { number: added.number, reason: added.reason });
        return added;
      });
      deps.bus.publish({ kind: 'allowances', library: slug, number: row.number });
      return presentAllowances(slug, row);
    },
  };
}

export type AllowancesService = ReturnType<typeof createAllowancesService>;
