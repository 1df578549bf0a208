import { AppError } from '../../shared/errors.ts';
import {
  type Action,
  type Asker,
  canSee,
  mayDo,
  permissions,
  type Standing,
} from '../../shared/permissions.ts';
import type { VisibleLibraries } from '../db/visible-libraries.ts';
import type { AccessRepo, Target, TargetLibrary } from './access.repo.ts';
import { actorFor, type Caller, type PersonCaller } from './caller.ts';

function missing(target: Target): AppError {
  const [kind, name] = Object.entries(target)[0] ?? ['thing', ''];
  const words = kind === 'reference' ? 'revision of reference results' : kind;
  const quoted = typeof name === 'string' ? `“${name}”` : String(name);
  return new AppError('not_found', `There is no ${words} ${quoted}.`);
}

export interface AccessDeps {
  repo: AccessRepo;
  /** Whether the session or the token that a caller came with still counts. */
  isStillGood(caller: Caller): boolean;
}

/**
 * What one caller may do. Nothing is remembered: every question is answered from the database as it is now,
 * so that streams of events, which last, notice what has changed.
 */
export function createAccess({ repo, isStillGood }: AccessDeps, caller: Caller) {
  function asker(): Asker {
    if (caller.kind === 'person') return { ...caller, roles: repo.rolesOf(caller.id) };
    return caller;
  }

  function standingIn({ id, visibility }: TargetLibrary): Standing {
    const role = caller.kind === 'person' ? repo.roleIn(id, caller.id) : null;
    return { visibility, role, isOwn: caller.kind === 'bot' && caller.libraryId === id };
  }

  function refuse(): never {
    if (caller.kind === 'nobody') throw new AppError('unauthenticated', 'Sign in first.');
    const may = caller.kind === 'bot' ? 'This token is not good for that.' : 'You may not do this here.';
    throw new AppError('forbidden', may);
  }

  return {
    caller,
    actor: actorFor(caller),
    /** The person; for routes that only people may use. */
    person(): PersonCaller {
      return caller.kind === 'person' ? caller : refuse();
    },
    may(action: Action, target?: Target): boolean {
      if (target === undefined) return mayDo(action, asker());
      const library = repo.libraryOf(target);
      return library !== undefined && mayDo(action, asker(), standingIn(library));
    },
    /**
     * Throws unless the action is allowed on everything that the request is about. What the caller cannot
     * see is answered as what is not there, in the same words.
     */
    require(action: Action, targets: readonly Target[]): void {
      if (caller.kind === 'nobody' && permissions[action].who !== 'everyone') refuse();
      const who = asker();
      if (permissions[action].on === 'site') {
        if (!mayDo(action, who)) refuse();
        return;
      }
      if (targets.length === 0) throw new TypeError(`${action} was asked about no library`);
      const standings = targets.map((target) => {
        const library = repo.libraryOf(target);
        const standing = library && standingIn(library);
        if (!standing || !canSee(who, standing)) throw missing(target);
        return standing;
      });
      if (!standings.every((standing) => mayDo(action, who, standing))) refuse();
    },
    canSee(slug: string): boolean {
      const library = repo.libraryOf({ library: slug });
      return library !== undefined && canSee(asker(), standingIn(library));
    },
    visible(): VisibleLibraries {
      if (caller.kind === 'nobody') return { kind: 'none' };
      if (caller.kind === 'bot') return { kind: 'one', library: caller.libraryId };
      return caller.isAdmin ? { kind: 'all' } : { kind: 'of person', person: caller.id };
    },
    isStillGood: () => isStillGood(caller),
  };
}

export type Access = ReturnType<typeof createAccess>;
