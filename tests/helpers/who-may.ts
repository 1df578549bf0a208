import type { Role, TokenScope } from '../../shared/permissions.ts';

/** What is expected of a route, said apart from the table that the product decides by. */
export interface LibraryRow {
  route: string;
  /** Address below /api, made of what a library holds. */
  at: (ids: LibraryIds) => string;
  body?: (ids: LibraryIds) => object;
  /** The lowest role that may. */
  from: Role;
  /** Whether anyone who is signed in may, where the library is public. */
  isOpen?: true;
  admin?: true;
  scopes?: readonly TokenScope[];
}

export interface SiteRow {
  route: string;
  at: string;
  /** Among people; 'members' are those who have a role in any library. */
  who: 'everyone' | 'signed in' | 'members' | 'admins';
  /** Of bots; none where it is left out. */
  scopes?: readonly TokenScope[];
}

export interface LibraryIds {
  library: string;
  build: number;
  run: number;
  solve: number;
  revision: number;
}

const every: readonly TokenScope[] = ['build:write', 'run:write', 'results:read', 'reference:propose'];
const reading = { from: 'contributor', isOpen: true, admin: true, scopes: ['results:read'] } as const;
const following = { ...reading, scopes: ['run:write', 'results:read'] } as const;
const followingBuild = { ...reading, scopes: ['build:write', 'run:write', 'results:read'] } as const;
const registering = { from: 'contributor', scopes: ['build:write'] } as const;
const running = { from: 'contributor', scopes: ['run:write'] } as const;
const onMembers = { from: 'maintainer', admin: true } as const;
const inLibrary = (rest: string) => (ids: LibraryIds) => `/libraries/${ids.library}${rest}`;
const ofComparison = (rest: string) => (ids: LibraryIds) =>
  `/comparisons${rest}candidate=${ids.run}&reference=${ids.run}`;

export const libraryRows: readonly LibraryRow[] = [
  { route: 'get /libraries/:library', at: inLibrary(''), ...reading },
  { route: 'patch /libraries/:library', at: inLibrary(''), from: 'maintainer' },
  { route: 'get /libraries/:library/solvers', at: inLibrary('/solvers'), ...reading },
  { route: 'get /libraries/:library/trend', at: inLibrary('/trend?suite=tests'), ...reading },
  { route: 'get /libraries/:library/builds', at: inLibrary('/builds'), ...reading },
  { route: 'post /libraries/:library/builds', at: inLibrary('/builds'), ...registering },
  { route: 'post /libraries/:library/build-previews', at: inLibrary('/build-previews'), ...registering },
  {
    route: 'get /libraries/:library/build-previews/:preview',
    at: inLibrary('/build-previews/1'),
    ...registering,
  },
  { route: 'get /builds/:build', at: ({ build }) => `/builds/${build}`, ...followingBuild },
  { route: 'get /builds/:build/log', at: ({ build }) => `/builds/${build}/log`, ...followingBuild },
  {
    route: 'get /builds/:build/log/events',
    at: ({ build }) => `/builds/${build}/log/events`,
    ...followingBuild,
  },
  {
    route: 'post /runs',
    at: () => '/runs',
    body: ({ build }) => ({ build, suite: 'no-such-suite' }),
    ...running,
  },
  { route: 'get /runs/:run', at: ({ run }) => `/runs/${run}`, ...following },
  { route: 'get /runs/:run/events', at: ({ run }) => `/runs/${run}/events`, ...following },
  { route: 'post /runs/:run/cancel', at: ({ run }) => `/runs/${run}/cancel`, ...running },
  { route: 'post /runs/:run/again', at: ({ run }) => `/runs/${run}/again`, ...running },
  { route: 'get /runs/:run/solves', at: ({ run }) => `/runs/${run}/solves`, ...reading },
  { route: 'get /runs/:run/profile', at: ({ run }) => `/runs/${run}/profile`, ...reading },
  { route: 'get /solves/:solve', at: ({ solve }) => `/solves/${solve}`, ...reading },
  { route: 'get /comparisons', at: ofComparison('?'), ...reading },
  { route: 'get /comparisons/pairs', at: ofComparison('/pairs?'), ...reading },
  { route: 'get /comparisons/export', at: ofComparison('/export?format=csv&'), ...reading },
  { route: 'get /comparisons/code-diff', at: ofComparison('/code-diff?'), ...reading },
  { route: 'get /comparisons/profile', at: ofComparison('/profile?'), ...reading },
  { route: 'get /libraries/:library/references', at: inLibrary('/references'), ...reading },
  { route: 'post /libraries/:library/references', at: inLibrary('/references'), from: 'reviewer' },
  { route: 'get /references/:revision', at: ({ revision }) => `/references/${revision}`, ...reading },
  {
    route: 'get /references/:revision/entries',
    at: ({ revision }) => `/references/${revision}/entries`,
    ...reading,
  },
  { route: 'get /libraries/:library/allowances', at: inLibrary('/allowances'), ...reading },
  { route: 'put /libraries/:library/allowances', at: inLibrary('/allowances'), from: 'maintainer' },
  {
    route: 'get /libraries/:library/allowances/revisions',
    at: inLibrary('/allowances/revisions'),
    ...reading,
  },
  {
    route: 'get /libraries/:library/allowances/revisions/:number',
    at: inLibrary('/allowances/revisions/0'),
    ...reading,
  },
  { route: 'get /libraries/:library/members', at: inLibrary('/members'), from: 'contributor', admin: true },
  { route: 'put /libraries/:library/members/:person', at: inLibrary('/members/none'), ...onMembers },
  { route: 'delete /libraries/:library/members/:person', at: inLibrary('/members/none'), ...onMembers },
  { route: 'get /libraries/:library/invitations', at: inLibrary('/invitations'), ...onMembers },
  { route: 'post /libraries/:library/invitations', at: inLibrary('/invitations'), ...onMembers },
  {
    route: 'post /libraries/:library/invitations/:invitation/resend',
    at: inLibrary('/invitations/99/resend'),
    ...onMembers,
  },
  {
    route: 'delete /libraries/:library/invitations/:invitation',
    at: inLibrary('/invitations/99'),
    ...onMembers,
  },
  { route: 'get /libraries/:library/tokens', at: inLibrary('/tokens'), from: 'maintainer' },
  { route: 'post /libraries/:library/tokens', at: inLibrary('/tokens'), from: 'maintainer' },
  { route: 'delete /libraries/:library/tokens/:token', at: inLibrary('/tokens/99'), from: 'maintainer' },
  { route: 'get /audit-log', at: ({ library }) => `/audit-log?library=${library}`, ...onMembers },
  // Ends memberships, so that it stands last.
  { route: 'post /libraries/:library/leave', at: inLibrary('/leave'), from: 'contributor' },
];

export const siteRows: readonly SiteRow[] = [
  { route: 'get /libraries', at: '/libraries', who: 'signed in', scopes: ['results:read'] },
  { route: 'post /libraries', at: '/libraries', who: 'signed in' },
  { route: 'get /git-refs', at: '/git-refs', who: 'members', scopes: ['build:write'] },
  { route: 'get /suites', at: '/suites', who: 'signed in', scopes: ['run:write', 'results:read'] },
  {
    route: 'get /suites/:suite',
    at: '/suites/tests',
    who: 'signed in',
    scopes: ['run:write', 'results:read'],
  },
  {
    route: 'get /suites/:suite/revisions',
    at: '/suites/tests/revisions',
    who: 'signed in',
    scopes: ['run:write', 'results:read'],
  },
  {
    route: 'get /suites/:suite/revisions/:number',
    at: '/suites/tests/revisions/1',
    who: 'signed in',
    scopes: ['run:write', 'results:read'],
  },
  { route: 'get /runs', at: '/runs', who: 'signed in', scopes: ['results:read'] },
  { route: 'get /strips', at: '/strips?solves=1', who: 'signed in', scopes: ['results:read'] },
  { route: 'get /events', at: '/events', who: 'signed in', scopes: ['run:write', 'results:read'] },
  { route: 'get /about', at: '/about', who: 'everyone', scopes: every },
  { route: 'get /me', at: '/me', who: 'everyone', scopes: every },
  { route: 'get /kits', at: '/kits', who: 'everyone', scopes: every },
  { route: 'get /kits/:kit.tar.gz', at: '/kits/node.tar.gz', who: 'everyone', scopes: every },
  { route: 'get /openapi.json', at: '/openapi.json', who: 'everyone', scopes: every },
  { route: 'get /docs', at: '/docs', who: 'everyone', scopes: every },
  { route: 'get /setup', at: '/setup', who: 'everyone' },
  { route: 'post /setup', at: '/setup', who: 'everyone' },
  { route: 'get /demo/people', at: '/demo/people', who: 'everyone' },
  { route: 'post /demo/sign-in', at: '/demo/sign-in', who: 'everyone' },
  { route: 'post /invitations/look', at: '/invitations/look', who: 'everyone' },
  { route: 'post /invitations/accept', at: '/invitations/accept', who: 'signed in' },
  { route: 'post /auth/sign-in/email', at: '/auth/sign-in/email', who: 'everyone' },
  { route: 'post /auth/sign-up/email', at: '/auth/sign-up/email', who: 'everyone' },
  { route: 'post /auth/request-password-reset', at: '/auth/request-password-reset', who: 'everyone' },
  { route: 'post /auth/reset-password', at: '/auth/reset-password', who: 'everyone' },
  { route: 'post /auth/send-verification-email', at: '/auth/send-verification-email', who: 'everyone' },
  { route: 'post /auth/verify-email', at: '/auth/verify-email', who: 'everyone' },
  { route: 'patch /account', at: '/account', who: 'signed in' },
  { route: 'post /account/password', at: '/account/password', who: 'signed in' },
  { route: 'get /account/sessions', at: '/account/sessions', who: 'signed in' },
  { route: 'delete /account/sessions/:session', at: '/account/sessions/none', who: 'signed in' },
  { route: 'get /people', at: '/people', who: 'admins' },
  { route: 'patch /people/:person', at: '/people/none', who: 'admins' },
  { route: 'get /site/outbox', at: '/site/outbox', who: 'admins' },
  { route: 'post /site/outbox/:mail/retry', at: '/site/outbox/99/retry', who: 'admins' },
  { route: 'get /audit-log', at: '/audit-log', who: 'admins' },
  // These end sessions, so that they stand last.
  { route: 'post /account/sign-out-everywhere', at: '/account/sign-out-everywhere', who: 'signed in' },
  { route: 'post /auth/sign-out', at: '/auth/sign-out', who: 'everyone' },
];
