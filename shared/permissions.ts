/** Who may do what: one table, by which the server decides and the client shows. */

/** In rising order: a role may do all that the one before it may. */
export const roles = ['contributor', 'reviewer', 'maintainer'] as const;
export type Role = (typeof roles)[number];

/** Anyone who is signed in reads a public library; a private one exists for its members only. */
export const visibilities = ['public', 'private'] as const;
export type Visibility = (typeof visibilities)[number];

/** What a bot's token may be given. */
export const tokenScopes = ['build:write', 'run:write', 'results:read', 'reference:propose'] as const;
export type TokenScope = (typeof tokenScopes)[number];

interface Permission {
  /** Whether it is asked about a library, or about the site as a whole. */
  on: 'library' | 'site';
  /**
   * Everyone, signed in or not; anyone who is signed in (in a library: a public one); otherwise only whom
   * the rest names.
   */
  who: 'everyone' | 'signed in' | 'named';
  /** Roles in the library; for the site, in any library. */
  roles: readonly Role[];
  admin: boolean;
  scopes: readonly TokenScope[];
}

const everyRole: readonly Role[] = roles;
const judges: readonly Role[] = ['reviewer', 'maintainer'];
const maintainers: readonly Role[] = ['maintainer'];

function inLibrary(
  allowed: readonly Role[],
  more: { scopes?: readonly TokenScope[]; admin?: boolean; who?: Permission['who'] } = {},
): Permission {
  return { on: 'library', who: 'named', roles: allowed, admin: false, scopes: [], ...more };
}

function onSite(
  who: Permission['who'],
  more: { roles?: readonly Role[]; scopes?: readonly TokenScope[]; admin?: boolean } = {},
): Permission {
  return { on: 'site', who, roles: [], admin: false, scopes: [], ...more };
}

/**
 * A site admin sees every library and can set its members, so that none is left without; being one gives no
 * say in its builds, runs and references.
 */
export const permissions = {
  'library.read': inLibrary(everyRole, { who: 'signed in', admin: true, scopes: ['results:read'] }),
  'library.settings': inLibrary(maintainers),
  'library.leave': inLibrary(everyRole),
  'build.register': inLibrary(everyRole, { scopes: ['build:write'] }),
  'build.follow': inLibrary(everyRole, {
    who: 'signed in',
    admin: true,
    scopes: ['build:write', 'run:write', 'results:read'],
  }),
  'run.start': inLibrary(everyRole, { scopes: ['run:write'] }),
  'run.cancel': inLibrary(everyRole, { scopes: ['run:write'] }),
  'run.follow': inLibrary(everyRole, {
    who: 'signed in',
    admin: true,
    scopes: ['run:write', 'results:read'],
  }),
  'reference.propose': inLibrary(everyRole, { scopes: ['reference:propose'] }),
  'reference.accept': inLibrary(judges),
  'allowances.edit': inLibrary(maintainers),
  'members.read': inLibrary(everyRole, { admin: true }),
  'members.edit': inLibrary(maintainers, { admin: true }),
  'tokens.edit': inLibrary(maintainers),
  'audit.read': inLibrary(maintainers, { admin: true }),

  'library.create': onSite('signed in'),
  'library.list': onSite('signed in', { scopes: ['results:read'] }),
  'suite.read': onSite('signed in', { scopes: ['results:read', 'run:write'] }),
  'suite.edit': onSite('named', { roles: maintainers }),
  'git.look': onSite('named', { roles: everyRole, scopes: ['build:write'] }),
  'events.follow': onSite('signed in', { scopes: ['results:read', 'run:write'] }),
  'account.use': onSite('signed in'),
  'session.open': onSite('everyone'),
  'about.read': onSite('everyone', { scopes: tokenScopes }),
  'site.people': onSite('named', { admin: true }),
  'site.mail': onSite('named', { admin: true }),
  'site.audit': onSite('named', { admin: true }),
} as const satisfies Record<string, Permission>;

export type Action = keyof typeof permissions;

/** Who asks. A bot belongs to one library and has no role. */
export type Asker =
  | { kind: 'nobody' }
  | { kind: 'person'; isAdmin: boolean /** In any library. */; roles: readonly Role[] }
  | { kind: 'bot'; scopes: readonly TokenScope[] };

/** The asker's standing in the library that is asked about. */
export interface Standing {
  visibility: Visibility;
  /** Of a person; null for one who is no member. */
  role: Role | null;
  /** Whether a bot's token is of this library. */
  isOwn: boolean;
}

/** Whether a library exists at all for who asks; to others it is as if it were not there. */
export function canSee(asker: Asker, { visibility, role, isOwn }: Standing): boolean {
  if (asker.kind === 'nobody') return false;
  if (asker.kind === 'bot') return isOwn;
  return visibility === 'public' || role !== null || asker.isAdmin;
}

/** Whether an action is allowed; `standing` goes with the actions on a library. */
export function mayDo(action: Action, asker: Asker, standing?: Standing): boolean {
  const permission: Permission = permissions[action];
  if (permission.on === 'library' && !(standing && canSee(asker, standing))) return false;
  // A token that is sent along is a claim to be a bot, and is held to its scopes, even where nobody may.
  if (asker.kind === 'bot') return permission.scopes.some((scope) => asker.scopes.includes(scope));
  if (permission.who === 'everyone') return true;
  if (asker.kind === 'nobody') return false;
  if (permission.admin && asker.isAdmin) return true;
  if (permission.on === 'site')
    return permission.who === 'signed in' || permission.roles.some((role) => asker.roles.includes(role));
  if (permission.who === 'signed in' && standing?.visibility === 'public') return true;
  const role = standing?.role ?? null;
  return role !== null && permission.roles.includes(role);
}
