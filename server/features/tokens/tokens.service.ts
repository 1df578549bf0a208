import { createHash, randomBytes } from 'node:crypto';
import { AppError } from '../../../shared/errors.ts';
import type { MadeTokenView, MakeTokenBody, TokenView } from '../../../shared/schemas/tokens.ts';
import type { Actor } from '../../actor.ts';
import type { BotCaller } from '../../auth/caller.ts';
import { type DatabaseClient, inTransaction } from '../../db/client.ts';
import type { Clock } from '../../jobs/clock.ts';
import type { AuditService } from '../audit/audit.service.ts';
import type { LibrariesService } from '../libraries/libraries.service.ts';
import { toIso, toIsoOrNull } from '../present-time.ts';
import { createTokensRepo, type TokenRow } from './tokens.repo.ts';

const dayMs = 24 * 60 * 60 * 1000;
/** The last use is written at most this often, so that a bot's reading is not one write a request. */
const useStepMs = 60_000;
const prefixLength = 12;

export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** Tokens for programs: shown once, kept as a hash, by which they are looked up. */
export function createTokensService(deps: {
  client: DatabaseClient;
  clock: Clock;
  audit: AuditService;
  libraries: LibrariesService;
}) {
  const { client, clock, audit, libraries } = deps;
  const repo = createTokensRepo(client.db);

  const isGood = (row: TokenRow) =>
    row.revokedAt === null && (row.expiresAt === null || row.expiresAt > clock());

  function present(row: TokenRow): TokenView {
    const { id, name, prefix, scopes, createdBy } = row;
    return {
      id,
      name,
      prefix,
      scopes,
      state: row.revokedAt !== null ? 'revoked' : isGood(row) ? 'good' : 'expired',
      createdAt: toIso(row.createdAt),
      createdBy,
      expiresAt: toIsoOrNull(row.expiresAt),
      lastUsedAt: toIsoOrNull(row.lastUsedAt),
    };
  }

  return {
    make(actor: Actor, slug: string, body: MakeTokenBody): MadeTokenView {
      const library = libraries.require(slug);
      const token = `tally_${randomBytes(32).toString('base64url')}`;
      return inTransaction(client, () => {
        const now = clock();
        const row = repo.insert({
          libraryId: library.id,
          name: body.name,
          prefix: token.slice(0, prefixLength),
          tokenHash: hashToken(token),
          scopes: body.scopes,
          createdAt: now,
          createdBy: actor.name,
          expiresAt: body.days === null ? null : now + body.days * dayMs,
        });
        audit.record(actor, 'token made', library.id, `token ${row.id}`, {
          name: row.name,
          scopes: row.scopes.join(', '),
          days: body.days,
        });
        return { token, made: present(row) };
      });
    },
    list: (slug: string): TokenView[] => repo.list(libraries.require(slug).id).map(present),
    revoke(actor: Actor, slug: string, id: number): void {
      const library = libraries.require(slug);
      inTransaction(client, () => {
        const row = repo.findIn(library.id, id);
        if (!row) throw new AppError('not_found', `This library has no token ${id}.`);
        if (row.revokedAt !== null) return;
        repo.update(id, { revokedAt: clock() });
        audit.record(actor, 'token revoked', library.id, `token ${id}`, { name: row.name });
      });
    },
    /**
     * Who holds a token, if it is good. It is found by its hash: how long that takes tells nothing about the
     * token, since nobody can choose what it hashes to.
     */
    identify(token: string): BotCaller | undefined {
      const row = repo.findByHash(hashToken(token));
      if (!row || !isGood(row)) return undefined;
      const now = clock();
      if (row.lastUsedAt === null || now - row.lastUsedAt >= useStepMs)
        repo.update(row.id, { lastUsedAt: now });
      return { kind: 'bot', tokenId: row.id, name: row.name, libraryId: row.libraryId, scopes: row.scopes };
    },
    isStillGood(id: number): boolean {
      const row = repo.find(id);
      return row !== undefined && isGood(row);
    },
  };
}

export type TokensService = ReturnType<typeof createTokensService>;
