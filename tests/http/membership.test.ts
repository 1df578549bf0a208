import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Writable } from 'node:stream';
import { pino } from 'pino';
import { pinoHttp } from 'pino-http';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { createApp } from '../../server/app.ts';
import { createLogger } from '../../server/serve.ts';
import { auditPage } from '../../shared/schemas/audit.ts';
import { invitationView } from '../../shared/schemas/invitations.ts';
import { libraryPage } from '../../shared/schemas/libraries.ts';
import { memberList } from '../../shared/schemas/members.ts';
import { meView } from '../../shared/schemas/people.ts';
import { madeTokenView, tokenList } from '../../shared/schemas/tokens.ts';
import { openTestApp, seedLibrary, type TestApp } from '../helpers/app.ts';
import { cookieOf, signInAs } from '../helpers/sign-in.ts';

const library = '/api/libraries/pocket-roots';

function lastToken(app: TestApp): string {
  const [mail] = app.services.outbox.listQuery({ limit: 1 }).all();
  return decodeURIComponent(/#token=(\S+)/.exec(mail?.text ?? '')?.[1] ?? '');
}

describe('members of a library', () => {
  it('never lose their last maintainer, by removal, by another role or by leaving', async () => {
    const app = openTestApp();
    await seedLibrary(app);
    const me = `${library}/members/${app.person.id}`;
    await request(app.app).delete(me).expect(409);
    await request(app.app).put(me).send({ role: 'reviewer' }).expect(409);
    await request(app.app).post(`${library}/leave`).expect(409);
    const other = await signInAs(app, { roles: { 'pocket-roots': 'maintainer' } });
    // A maintainer who is disabled keeps nothing going.
    await request(app.app).patch(`/api/people/${other.id}`).send({ isDisabled: true }).expect(200);
    await request(app.app).post(`${library}/leave`).expect(409);
    await request(app.app).patch(`/api/people/${other.id}`).send({ isDisabled: false }).expect(200);
    await request(app.app).post(`${library}/leave`).expect(204);
  });

  it('show their addresses to those who decide about members, and to no other', async () => {
    const app = openTestApp();
    await seedLibrary(app);
    const reader = await signInAs(app, { roles: { 'pocket-roots': 'contributor' } });
    const asReader = await request(app.bare)
      .get(`${library}/members`)
      .set('Cookie', reader.cookie)
      .expect(200);
    expect(memberList.parse(asReader.body).items.map((item) => item.email)).toEqual([null, null]);
    const asMaintainer = await request(app.app).get(`${library}/members`).expect(200);
    expect(memberList.parse(asMaintainer.body).items.every((item) => item.email !== null)).toBe(true);
  });

  it('are not found out by trying ids: a maintainer sets roles of members only', async () => {
    const app = openTestApp();
    await seedLibrary(app);
    const maintainer = await signInAs(app, { roles: { 'pocket-roots': 'maintainer' } });
    const stranger = await signInAs(app);
    for (const id of [stranger.id, 'nobody'])
      await request(app.bare)
        .put(`${library}/members/${id}`)
        .set('Cookie', maintainer.cookie)
        .send({ role: 'reviewer' })
        .expect(404);
  });
});

describe('an invitation', () => {
  it('makes a member of one who signs up with its link, without another mail, and is good once', async () => {
    const app = openTestApp({ signUp: 'invited' });
    await seedLibrary(app);
    const invite = { email: 'Ilse@larkmoor.example', role: 'reviewer' };
    const sent = await request(app.app).post(`${library}/invitations`).send(invite).expect(201);
    expect(invitationView.parse(sent.body)).toMatchObject({ email: 'ilse@larkmoor.example', state: 'open' });
    const token = lastToken(app);
    expect(JSON.stringify(sent.body)).not.toContain(token);
    const look = await request(app.bare).post('/api/invitations/look').send({ token }).expect(200);
    expect(look.body).toMatchObject({ library: 'pocket-roots', role: 'reviewer', hasAccount: false });
    const person = { name: 'Ilse', password: 'a long enough password', invitation: token };
    const post = (email: string) =>
      request(app.bare)
        .post('/api/auth/sign-up/email')
        .send({ ...person, email });
    await post('other@larkmoor.example').expect(403);
    const made = await post('ilse@larkmoor.example').expect(201);
    const me = await request(app.bare).get('/api/me').set('Cookie', cookieOf(made.headers));
    expect(meView.parse(me.body).person?.memberships).toMatchObject([
      { library: 'pocket-roots', role: 'reviewer' },
    ]);
    await post('ilse@larkmoor.example').expect(410);
  });

  it('is for its address alone, and not good once it is revoked, sent anew or too old', async () => {
    let now = Date.now();
    const app = openTestApp({ clock: () => now });
    await seedLibrary(app);
    const ilse = await signInAs(app, { name: 'Ilse' });
    const other = await signInAs(app);
    const accept = (token: string, { cookie } = ilse) =>
      request(app.bare).post('/api/invitations/accept').set('Cookie', cookie).send({ token });
    const invite = async () => {
      const body = { email: ilse.email, role: 'contributor' };
      const { id } = (await request(app.app).post(`${library}/invitations`).send(body).expect(201)).body;
      return { id: Number(id), token: lastToken(app) };
    };
    const first = await invite();
    await request(app.app)
      .post(`${library}/invitations`)
      .send({ email: ilse.email, role: 'reviewer' })
      .expect(409);
    await accept(first.token, other).expect(403);
    await request(app.app).post(`${library}/invitations/${first.id}/resend`).expect(200);
    await accept(first.token).expect(410);
    await request(app.app).delete(`${library}/invitations/${first.id}`).expect(204);
    await accept(lastToken(app)).expect(410);
    const second = await invite();
    now += 7 * 24 * 60 * 60 * 1000;
    await accept(second.token).expect(410);
    const third = await invite();
    await accept(third.token).expect(200, { library: 'pocket-roots' });
    const actions = auditPage
      .parse((await request(app.app).get('/api/audit-log').query({ library: 'pocket-roots' })).body)
      .items.map((entry) => [entry.action, entry.actor]);
    expect(actions.slice(0, 2)).toEqual([
      ['member role set', 'Ilse'],
      ['invitation accepted', 'Ilse'],
    ]);
    expect(actions).toContainEqual(['invitation revoked', 'Wren Tolliver']);
  });
});

describe('a token of a bot', () => {
  it('is shown once, kept as a hash, knows its last use, and stops when it is revoked or too old', async () => {
    let now = Date.now();
    const app = openTestApp({ clock: () => now });
    await seedLibrary(app);
    const body = { name: 'pipeline', scopes: ['results:read'], days: 1 };
    const made = await request(app.app).post(`${library}/tokens`).send(body).expect(201);
    const { token, made: view } = madeTokenView.parse(made.body);
    const get = () => request(app.bare).get(library).set('Authorization', `Bearer ${token}`);
    await get().expect(200);
    const list = await request(app.app).get(`${library}/tokens`).expect(200);
    expect(tokenList.parse(list.body).items).toMatchObject([
      { prefix: token.slice(0, 12), state: 'good', lastUsedAt: new Date(now).toISOString() },
    ]);
    const kept = app.client.sqlite.prepare('SELECT * FROM bot_tokens').all();
    const audit = app.client.sqlite.prepare('SELECT * FROM audit_log').all();
    expect(JSON.stringify([kept, audit, list.body])).not.toContain(token);
    await request(app.bare).get(library).set('Authorization', `Bearer ${token}x`).expect(401);
    now += 24 * 60 * 60 * 1000;
    await get().expect(401);
    now -= 1000;
    await get().expect(200);
    await request(app.app).delete(`${library}/tokens/${view.id}`).expect(204);
    await get().expect(401);
  });

  it('is taken at its word: a bad one is not mended by a cookie', async () => {
    const { app } = openTestApp();
    await request(app).get('/api/libraries').set('Authorization', 'Bearer nonsense').expect(401);
    await request(app).get('/api/libraries').set('Authorization', 'Basic bWF1ZDptYXVk').expect(401);
  });

  it('is in no log, nor is a cookie', async () => {
    const app = openTestApp();
    const lines: string[] = [];
    const sink = new Writable({ write: (chunk, _encoding, done) => done(void lines.push(String(chunk))) });
    const logger = createLogger({ logLevel: 'trace' }, sink);
    const { services, identity } = app;
    const requestLog = pinoHttp({ logger, customLogLevel: () => 'debug' });
    const logged = createApp({
      services,
      identity,
      logger: pino({ level: 'silent' }),
      allowedHosts: [],
      requestLog,
    });
    const { cookie } = await signInAs({ bare: logged, services });
    await request(logged).get('/api/libraries').set('Cookie', cookie).expect(200);
    await request(logged).get('/api/libraries').set('Authorization', 'Bearer tally_secret').expect(401);
    expect(lines.length).toBeGreaterThan(2);
    expect(lines.join('')).not.toContain('tally_secret');
    expect(lines.join('')).not.toContain(cookie.split('=')[1]);
  });
});

describe('a private library', () => {
  it('is in no list of those who are no members, and comes and goes with its visibility', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    app.services.runs.start(app.person, { build: build.id, suite: 'tests' });
    const stranger = await signInAs(app);
    const count = async () => {
      const get = (path: string) => request(app.bare).get(path).set('Cookie', stranger.cookie).expect(200);
      return [
        libraryPage.parse((await get('/api/libraries')).body).items.length,
        (await get('/api/runs')).body.items.length,
      ];
    };
    expect(await count()).toEqual([1, 1]);
    await request(app.app).patch(library).send({ visibility: 'private' }).expect(200);
    expect(await count()).toEqual([0, 0]);
    const hidden = await request(app.bare).get(library).set('Cookie', stranger.cookie).expect(404);
    const missing = await request(app.bare)
      .get('/api/libraries/none')
      .set('Cookie', stranger.cookie)
      .expect(404);
    expect(hidden.body.detail.replace('pocket-roots', 'none')).toBe(missing.body.detail);
  });

  it('is silent to strangers in the stream of events, which ends when its listener is disabled', async () => {
    const app = openTestApp();
    await seedLibrary(app);
    await request(app.app).patch(library).send({ visibility: 'private' }).expect(200);
    const stranger = await signInAs(app);
    const server = createServer(app.bare);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.address() as AddressInfo;
    const stream = await fetch(`http://127.0.0.1:${port}/api/events`, {
      headers: { cookie: stranger.cookie },
    });
    const { bus, people } = app.services;
    bus.publish({ kind: 'library', library: 'pocket-roots' });
    bus.publish({ kind: 'suite', suite: 'tests', revision: 1 });
    people.change(app.person, stranger.id, { isDisabled: true });
    bus.publish({ kind: 'suite', suite: 'tests', revision: 2 });
    const text = await stream.text(); // to its end
    expect(text).toContain('"revision":1');
    expect(text).not.toContain('"revision":2');
    expect(text).not.toContain('pocket-roots');
    server.closeAllConnections();
    await new Promise<void>((resolve) => server.close(() => resolve()));
  });
});

describe('admins of the site', () => {
  it('never lose the last of them', async () => {
    const app = openTestApp();
    const me = `/api/people/${app.person.id}`;
    await request(app.app).patch(me).send({ isAdmin: false }).expect(409);
    await request(app.app).patch(me).send({ isDisabled: true }).expect(409);
    const other = await signInAs(app);
    await request(app.app).patch(`/api/people/${other.id}`).send({ isAdmin: true }).expect(200);
    await request(app.app).patch(me).send({ isAdmin: false }).expect(200);
    await request(app.app).get('/api/people').expect(403);
    const list = await request(app.bare)
      .get('/api/people?text=somebody')
      .set('Cookie', other.cookie)
      .expect(200);
    expect(list.body.items).toHaveLength(1);
  });
});
