import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { Express } from 'express';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { allEntries } from '../../server/openapi/all-entries.ts';
import { openApiDocument, operationId } from '../../server/openapi/document.ts';
import type { ApiEntry } from '../../server/openapi/entry.ts';
import { html } from '../../server/openapi/html.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { makeBuildFolder, openTestApp, seedLibrary } from '../helpers/app.ts';

const actor = { name: 'local' };
const keyOf = ({ method, path: route }: Pick<ApiEntry, 'method' | 'path'>): string => `${method} ${route}`;

interface Layer {
  route?: { path: unknown; stack: { method?: string }[] };
  handle?: unknown;
}

function layersOf(handle: unknown): Layer[] {
  const stack: unknown =
    (typeof handle === 'function' || typeof handle === 'object') && handle !== null && 'stack' in handle
      ? handle.stack
      : [];
  return Array.isArray(stack) ? stack : [];
}

/** Every route below `/api`, as the routers hold them. */
function routesOf(handle: unknown): string[] {
  return layersOf(handle).flatMap((layer) => {
    if (!layer.route) return routesOf(layer.handle);
    return [...new Set(layer.route.stack.map((one) => `${one.method} ${String(layer.route?.path)}`))];
  });
}

function routesOfApp(app: Express): string[] {
  const router: unknown = Reflect.get(app, 'router');
  return routesOf(router);
}

describe('the description of the API', () => {
  it('has an entry for every route, and a route for every entry', () => {
    const routes = routesOfApp(openTestApp().bare);
    expect(routes.length).toBeGreaterThan(40);
    expect(allEntries.map(keyOf).sort()).toEqual(routes.sort());
    expect(new Set(allEntries.map(operationId)).size).toBe(allEntries.length);
  });

  it('gives one name to one schema, and refers to nothing that is not there', () => {
    const seen = new Map<string, unknown>();
    for (const { body, answers } of allEntries)
      for (const named of [...(body ? [body] : []), ...answers.flatMap((answer) => answer.body ?? [])]) {
        expect(seen.get(named.name) ?? named.schema, named.name).toBe(named.schema);
        seen.set(named.name, named.schema);
      }
    const text = JSON.stringify(openApiDocument(allEntries, '1'));
    const { schemas } = JSON.parse(text).components;
    const used = [...text.matchAll(/"\$ref":"([^"]+)"/g)].map((match) => match[1] ?? '');
    expect(used.length).toBeGreaterThan(80);
    for (const ref of used) expect(schemas, ref).toHaveProperty(ref.replace('#/components/schemas/', ''));
    expect(text).not.toMatch(/"\$(defs|id|schema)"/);
  });

  it('is sent as OpenAPI 3.1 and as a page without script, with everything escaped', async () => {
    const { app } = openTestApp();
    const answer = await request(app).get('/api/openapi.json').expect(200);
    expect(answer.body).toMatchObject({ openapi: '3.1.0', info: { title: 'Tallyroot', version: '0.1.0' } });
    const pairs = answer.body.paths['/comparisons/pairs'].get;
    const candidate = pairs.parameters.find((one: { name: string }) => one.name === 'candidate');
    expect(candidate).toMatchObject({ in: 'query', required: true, schema: { type: 'integer' } });
    expect(Object.keys(pairs.responses)).toEqual(['200', '400', '404', '422', 'default']);
    const page = await request(app).get('/api/docs').expect(200);
    expect(page.headers['content-type']).toMatch(/^text\/html/);
    expect(page.text).not.toMatch(/<script|javascript:|\son\w+=|src=|@import|url\(/);
    const ids = new Set([...page.text.matchAll(/ id="([^"]+)"/g)].map((match) => match[1]));
    for (const [, target] of page.text.matchAll(/href="#([^"]+)"/g)) expect(ids).toContain(target);
    for (const entry of allEntries) expect(ids).toContain(operationId(entry));
    expect(html`<p title="${'"<b>'}">${['<i>', html`<b>${1}</b>`]}</p>`.text).toBe(
      '<p title="&quot;&lt;b&gt;">&lt;i&gt;<b>1</b></p>',
    );
  });

  it('has the colours of the sheet', async () => {
    const tokens = readFileSync(path.join(import.meta.dirname, '../../src/styles/tokens.css'), 'utf8');
    const { text } = await request(openTestApp().app).get('/api/docs');
    const colours = [...text.matchAll(/(--(?!sans|mono)[a-z0-9-]+): (#[0-9a-f]{6});/g)];
    expect(colours.length).toBeGreaterThan(15);
    const printed = text.slice(text.indexOf('@media print'));
    for (const [whole] of colours.filter(([found]) => !printed.includes(found)))
      expect(tokens).toContain(whole);
  });
});

/** A call of each route on the app of the test below. */
const samples: Record<string, { at: string; body?: object; status?: number; isSignedOut?: true }> = {
  'patch /libraries/:library': { at: '/libraries/pocket-roots', body: { name: 'Pocket roots' } },
  'get /libraries': { at: '/libraries' },
  'post /libraries': { at: '/libraries', body: { slug: 'second', name: 'Second' } },
  'get /libraries/:library': { at: '/libraries/pocket-roots' },
  'get /libraries/:library/solvers': { at: '/libraries/pocket-roots/solvers' },
  'get /libraries/:library/trend': { at: '/libraries/pocket-roots/trend?suite=tests' },
  'post /libraries/:library/build-previews': {
    at: '/libraries/pocket-roots/build-previews',
    body: { folder: '' },
  },
  'get /libraries/:library/build-previews/:preview': { at: '/libraries/pocket-roots/build-previews/1' },
  'get /git-refs': { at: '/git-refs?address=relative', status: 400 },
  'get /libraries/:library/builds': { at: '/libraries/pocket-roots/builds?limit=1' },
  'post /libraries/:library/builds': { at: '/libraries/pocket-roots/builds', body: { preview: 1 } },
  'get /builds/:build': { at: '/builds/1' },
  'get /builds/:build/log': { at: '/builds/1/log' },
  'get /builds/:build/log/events': { at: '/builds/1/log/events' },
  'get /suites': { at: '/suites' },
  'get /suites/:suite': { at: '/suites/tests' },
  'get /suites/:suite/revisions': { at: '/suites/tests/revisions' },
  'get /suites/:suite/revisions/:number': { at: '/suites/tests/revisions/1' },
  'get /runs': { at: '/runs?library=pocket-roots&limit=1' },
  'post /runs': { at: '/runs', body: { build: 1, suite: 'tests' } },
  'get /runs/:run': { at: '/runs/1' },
  'post /runs/:run/cancel': { at: '/runs/3/cancel', body: {} },
  'post /runs/:run/again': { at: '/runs/1/again', body: {} },
  'get /runs/:run/solves': { at: '/runs/1/solves?sort=order&direction=down' },
  'get /runs/:run/profile': { at: '/runs/1/profile' },
  'get /runs/:run/events': { at: '/runs/99/events', status: 404 },
  'get /solves/:solve': { at: '/solves/1' },
  'get /strips': { at: '/strips?solves=1,2' },
  'get /events': { at: '/events' },
  'get /comparisons': { at: '/comparisons?candidate=2&reference=1' },
  'get /comparisons/pairs': { at: '/comparisons/pairs?candidate=2&revision=1' },
  'get /comparisons/export': { at: '/comparisons/export?candidate=2&reference=1&format=json' },
  'get /comparisons/code-diff': { at: '/comparisons/code-diff?candidate=2&reference=1' },
  'get /comparisons/profile': { at: '/comparisons/profile?candidate=2&reference=1' },
  'get /libraries/:library/references': { at: '/libraries/pocket-roots/references' },
  'post /libraries/:library/references': {
    at: '/libraries/pocket-roots/references',
    body: { run: 1, reason: 'agreed' },
  },
  'get /references/:revision': { at: '/references/1' },
  'get /references/:revision/entries': { at: '/references/1/entries' },
  'get /libraries/:library/allowances': { at: '/libraries/pocket-roots/allowances' },
  'put /libraries/:library/allowances': {
    at: '/libraries/pocket-roots/allowances',
    body: { allowances: {}, reason: 'as before', basedOn: 0 },
  },
  'get /libraries/:library/allowances/revisions': { at: '/libraries/pocket-roots/allowances/revisions' },
  'get /libraries/:library/allowances/revisions/:number': {
    at: '/libraries/pocket-roots/allowances/revisions/1',
  },
  'get /kits': { at: '/kits' },
  'get /kits/:kit.tar.gz': { at: '/kits/node.tar.gz' },
  'get /libraries/:library/members': { at: '/libraries/pocket-roots/members' },
  'put /libraries/:library/members/:person': {
    at: '/libraries/pocket-roots/members/nobody',
    body: { role: 'reviewer' },
    status: 404,
  },
  'delete /libraries/:library/members/:person': {
    at: '/libraries/pocket-roots/members/nobody',
    status: 404,
  },
  'post /libraries/:library/leave': { at: '/libraries/pocket-roots/leave', status: 409 },
  'get /libraries/:library/invitations': { at: '/libraries/pocket-roots/invitations' },
  'post /libraries/:library/invitations': {
    at: '/libraries/pocket-roots/invitations',
    body: { email: 'new@larkmoor.example', role: 'reviewer' },
  },
  'post /libraries/:library/invitations/:invitation/resend': {
    at: '/libraries/pocket-roots/invitations/1/resend',
  },
  'delete /libraries/:library/invitations/:invitation': { at: '/libraries/pocket-roots/invitations/1' },
  'post /invitations/look': { at: '/invitations/look', body: { token: 'unknown' }, status: 410 },
  'post /invitations/accept': { at: '/invitations/accept', body: { token: 'unknown' }, status: 410 },
  'get /libraries/:library/tokens': { at: '/libraries/pocket-roots/tokens' },
  'post /libraries/:library/tokens': {
    at: '/libraries/pocket-roots/tokens',
    body: { name: 'pipeline', scopes: ['results:read'] },
  },
  'delete /libraries/:library/tokens/:token': { at: '/libraries/pocket-roots/tokens/1' },
  'post /auth/sign-in/email': {
    at: '/auth/sign-in/email',
    body: { email: 'nobody@larkmoor.example', password: 'not the one' },
    status: 401,
  },
  'post /auth/sign-up/email': {
    at: '/auth/sign-up/email',
    body: { name: 'New', email: 'new@larkmoor.example', password: 'a long password' },
  },
  'post /auth/sign-out': { at: '/auth/sign-out', isSignedOut: true },
  'post /auth/request-password-reset': {
    at: '/auth/request-password-reset',
    body: { email: 'new@larkmoor.example' },
  },
  'post /auth/reset-password': {
    at: '/auth/reset-password',
    body: { token: 'unknown', password: 'a long password' },
    status: 410,
  },
  'post /auth/send-verification-email': {
    at: '/auth/send-verification-email',
    body: { email: 'new@larkmoor.example' },
  },
  'post /auth/verify-email': { at: '/auth/verify-email', body: { token: 'unknown' }, status: 410 },
  'get /me': { at: '/me' },
  'patch /account': { at: '/account', body: { name: 'Wren Tolliver' } },
  'post /account/password': {
    at: '/account/password',
    body: { current: 'a', next: 'a long password' },
    status: 400,
  },
  'get /account/sessions': { at: '/account/sessions' },
  'delete /account/sessions/:session': { at: '/account/sessions/none', status: 404 },
  'post /account/sign-out-everywhere': { at: '/account/sign-out-everywhere', status: 401, isSignedOut: true },
  'get /people': { at: '/people?text=wren' },
  'patch /people/:person': { at: '/people/nobody', body: { isDisabled: true }, status: 404 },
  'get /demo/people': { at: '/demo/people' },
  'post /demo/sign-in': { at: '/demo/sign-in', body: { person: 'nobody' }, status: 404 },
  'get /setup': { at: '/setup' },
  'post /setup': {
    at: '/setup',
    body: { code: 'x', name: 'New', email: 'admin@larkmoor.example', password: 'a long password' },
    status: 410,
  },
  'get /site/outbox': { at: '/site/outbox' },
  'post /site/outbox/:mail/retry': { at: '/site/outbox/1/retry', body: {} },
  'get /audit-log': { at: '/audit-log' },
  'get /about': { at: '/about' },
  'get /openapi.json': { at: '/openapi.json' },
  'get /docs': { at: '/docs' },
};

describe('answers of every route', () => {
  it('are what its entry says', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const { runs, jobRunner } = app.services;
    jobRunner.start();
    for (let count = 0; count < 2; count += 1)
      await runs.wait(runs.start(actor, { build: build.id, suite: 'tests' }).id);
    await jobRunner.stop();
    const folder = makeBuildFolder({});
    const isChange = ({ method }: ApiEntry): boolean => method !== 'get';
    // Changes first, in the order of their entries: what they make is then there to be read.
    const order = [...allEntries.filter(isChange), ...allEntries.filter((entry) => !isChange(entry))];
    const late = order.findIndex((entry) => keyOf(entry) === 'post /runs/:run/cancel');
    expect(late).toBeGreaterThan(order.findIndex((entry) => keyOf(entry) === 'post /runs'));
    for (const entry of order) {
      const key = keyOf(entry);
      const sample = samples[key];
      expect(sample, `no sample call of ${key}`).toBeDefined();
      if (!sample || key === 'get /events') continue; // without end: tested where events are
      const body = sample.body && 'folder' in sample.body ? { folder } : sample.body;
      const call = request(sample.isSignedOut ? app.bare : app.app)[entry.method](`/api${sample.at}`);
      const answer = await (body ? call.send(body) : call);
      if (sample.status !== undefined) {
        expect(answer.status, key).toBe(sample.status);
        expect(entry.problems, key).toContain(problem.parse(answer.body).code);
        continue;
      }
      const promised = entry.answers.find((one) => one.status === answer.status);
      expect(promised, `${key} answered ${answer.status} ${answer.text}`).toBeDefined();
      const type = answer.headers['content-type']?.split(';')[0];
      expect(promised?.mediaTypes ?? (promised?.body ? ['application/json'] : [undefined]), key).toContain(
        type,
      );
      if (type === 'application/json' && promised?.body) {
        const parsed = promised.body.schema.safeParse(answer.body);
        expect(parsed.error?.issues ?? [], key).toEqual([]);
      }
    }
  });
});
