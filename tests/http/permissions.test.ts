import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Router } from 'express';
import { describe, expect, it } from 'vitest';
import { localActor } from '../../server/actor.ts';
import { declaredRoutes } from '../../server/http/permissions.ts';
import { roles, tokenScopes, type Visibility } from '../../shared/permissions.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { makeBuildFolder, openTestApp, type TestApp } from '../helpers/app.ts';
import { buildRevision } from '../helpers/builders.ts';
import { botHeader, signInAs } from '../helpers/sign-in.ts';
import { type LibraryIds, type LibraryRow, libraryRows, type SiteRow, siteRows } from '../helpers/who-may.ts';

type Answer = 'allowed' | 'refused' | 'signed out' | 'unseen';
type Asker = { name: string; headers: Record<string, string> };

const unseen =
  /^There is no (library “[^”]+”|build \d+|run \d+|solve \d+|revision of reference results \d+)\.$/;

/** A library with everything in it that a row can name. */
async function fill(app: TestApp, slug: string, visibility: Visibility): Promise<LibraryIds> {
  const { services } = app;
  services.libraries.create(localActor, { slug, name: slug, description: '', homepage: null, visibility });
  const folder = makeBuildFolder({ files: { 'about.txt': slug } });
  const { build } = await services.builds.registerFolder(localActor, slug, { folder });
  const run = await services.runs.wait(
    services.runs.start(localActor, { build: build.id, suite: 'tests' }).id,
  );
  const revision = services.references.setFirst(localActor, slug, { run: run.id, reason: 'agreed' });
  const [solve] = services.solves.list(run.id, { limit: 1, sort: 'solver', direction: 'up' }).items;
  return { library: slug, build: build.id, run: run.id, solve: solve?.id ?? 0, revision: revision.id };
}

/** Everyone there is to try, from the point of view of two libraries in which they have the same role. */
async function everyone(app: TestApp, libraries: readonly string[]): Promise<Asker[]> {
  const { services } = app;
  services.libraries.create(localActor, { slug: 'elsewhere', name: 'E', description: '', homepage: null });
  const askers: Asker[] = [{ name: 'nobody', headers: {} }];
  const add = async (name: string, given: Parameters<typeof signInAs>[1]) =>
    askers.push({ name, headers: { cookie: (await signInAs(app, given)).cookie } });
  await add('outsider', { roles: { elsewhere: 'maintainer' } });
  await add('newcomer', {});
  for (const role of roles)
    await add(role, { roles: Object.fromEntries(libraries.map((one) => [one, role])) });
  await add('admin', { isAdmin: true });
  return askers;
}

function bots(app: TestApp, library: string): Asker[] {
  const header = (of: string, scopes: Parameters<typeof botHeader>[2]) => ({
    authorization: botHeader(app.services, of, scopes),
  });
  return [
    ...tokenScopes.map((scope) => ({ name: scope, headers: header(library, [scope]) })),
    { name: 'bot of another library', headers: header('elsewhere', [...tokenScopes]) },
  ];
}

function expectedInLibrary(row: LibraryRow, asker: string, visibility: Visibility): Answer {
  const isOpen = row.isOpen === true && visibility === 'public';
  if (asker === 'nobody') return 'signed out';
  if (asker === 'bot of another library') return 'unseen';
  if (asker === 'outsider' || asker === 'newcomer')
    return visibility === 'private' ? 'unseen' : isOpen ? 'allowed' : 'refused';
  if (asker === 'admin') return row.admin || isOpen ? 'allowed' : 'refused';
  const role = roles.findIndex((one) => one === asker);
  if (role !== -1) return role >= roles.indexOf(row.from) ? 'allowed' : 'refused';
  return row.scopes?.some((scope) => scope === asker) ? 'allowed' : 'refused';
}

function expectedOnSite({ who, scopes = [] }: SiteRow, asker: string): Answer {
  if (asker === 'bot of another library') return scopes.length > 0 ? 'allowed' : 'refused';
  const scope = tokenScopes.find((one) => one === asker);
  if (scope !== undefined) return scopes.includes(scope) ? 'allowed' : 'refused';
  if (who === 'everyone') return 'allowed';
  if (asker === 'nobody') return 'signed out';
  if (who === 'signed in') return 'allowed';
  if (who === 'admins') return asker === 'admin' ? 'allowed' : 'refused';
  return asker === 'admin' || asker === 'newcomer' ? 'refused' : 'allowed';
}

/** Calls a route; a stream is left as soon as it has begun. What changes something is sent an empty body. */
async function call(base: string, route: string, at: string, asker: Asker, body: object): Promise<Answer> {
  const method = route.split(' ')[0]?.toUpperCase() ?? '';
  const hasBody = !['GET', 'DELETE'].includes(method);
  const headers = { ...asker.headers, ...(hasBody ? { 'content-type': 'application/json' } : {}) };
  const leave = new AbortController();
  const { signal } = leave;
  const init = { method, headers, signal, ...(hasBody ? { body: JSON.stringify(body) } : {}) };
  const answer = await fetch(`${base}${at}`, init);
  const isProblem = answer.headers.get('content-type')?.startsWith('application/problem+json') ?? false;
  const detail = isProblem ? problem.parse(await answer.json()).detail : '';
  leave.abort();
  expect(answer.status, `${asker.name}: ${route}`).toBeLessThan(500);
  if (answer.status === 401) return 'signed out';
  if (answer.status === 403) return 'refused';
  return answer.status === 404 && unseen.test(detail) ? 'unseen' : 'allowed';
}

async function listening(app: TestApp): Promise<{ base: string; close(): Promise<void> }> {
  const server = createServer(app.bare);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  const close = async () => {
    server.closeAllConnections();
    await new Promise<void>((resolve) => server.close(() => resolve()));
  };
  return { base: `http://127.0.0.1:${port}/api`, close };
}

describe('every route of the API', () => {
  it('has a row in the table of who may', () => {
    const router: unknown = Reflect.get(openTestApp().bare, 'router');
    const found = declaredRoutes(router as Router).map(({ method, path }) => `${method} ${path}`);
    expect(found.length).toBeGreaterThan(75);
    const rows = new Set([...libraryRows, ...siteRows].map((row) => row.route));
    expect([...rows].sort()).toEqual(found.sort());
  });

  it('answers each role, each scope, outsiders, admins and nobody as the table says', async () => {
    const app = openTestApp();
    app.services.jobRunner.start();
    app.services.suites.addRevision(localActor, {
      revision: buildRevision(),
      source: 'format: 1',
      builtIn: false,
      note: '',
    });
    const filled = [
      { visibility: 'public' as const, ids: await fill(app, 'open-roots', 'public') },
      { visibility: 'private' as const, ids: await fill(app, 'hidden-roots', 'private') },
    ];
    const people = await everyone(app, ['open-roots', 'hidden-roots']);
    // Somebody has to stay when the others leave.
    await signInAs(app, { roles: { 'open-roots': 'maintainer', 'hidden-roots': 'maintainer' } });
    const { base, close } = await listening(app);
    const wrong: string[] = [];
    const note = (what: string, asker: string, answer: Answer, expected: Answer) => {
      if (answer !== expected) wrong.push(`${asker}, ${what}: ${answer}, not ${expected}`);
    };
    for (const { visibility, ids } of filled)
      for (const row of libraryRows)
        for (const asker of [...people, ...bots(app, ids.library)]) {
          const answer = await call(base, row.route, row.at(ids), asker, row.body?.(ids) ?? {});
          note(
            `${row.route} (${visibility})`,
            asker.name,
            answer,
            expectedInLibrary(row, asker.name, visibility),
          );
        }
    // Those who have left are members again: of a library that the rows on the site do not look at.
    for (const asker of await everyoneAgain(app, people)) people[asker.index] = asker.asker;
    for (const row of siteRows)
      for (const asker of [...people, ...bots(app, 'open-roots')])
        note(
          row.route,
          asker.name,
          await call(base, row.route, row.at, asker, {}),
          expectedOnSite(row, asker.name),
        );
    await close();
    expect(wrong).toEqual([]);
  });

  it('is not started where it does not say what it needs', () => {
    const router = Router();
    router.get('/forgotten', (_request, response) => response.json({}));
    expect(() => declaredRoutes(Router().use(router))).toThrow(/\/forgotten does not say what it needs/);
  });
});

/** Everyone who has a role, with it in another library. */
async function everyoneAgain(app: TestApp, people: readonly Asker[]) {
  const found: { index: number; asker: Asker }[] = [];
  for (const role of roles) {
    const { cookie } = await signInAs(app, { roles: { elsewhere: role } });
    found.push({
      index: people.findIndex(({ name }) => name === role),
      asker: { name: role, headers: { cookie } },
    });
  }
  return found;
}
