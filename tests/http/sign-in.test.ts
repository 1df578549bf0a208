import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { meView, sessionList } from '../../shared/schemas/people.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { openTestApp, type TestApp } from '../helpers/app.ts';
import { cookieOf, signInAs } from '../helpers/sign-in.ts';

const password = 'a long enough password';
const maud = { name: 'Maud Ferreday', email: 'maud@larkmoor.example', password };

/** Mails in the outbox, oldest first, with what their links carry. */
function mailsOf(app: TestApp): { to: string; subject: string; token: string }[] {
  return app.services.outbox
    .listQuery({ limit: 100 })
    .all()
    .reverse()
    .map(({ recipient, subject, text }) => ({
      to: recipient,
      subject,
      token: decodeURIComponent(/#token=(\S+)/.exec(text ?? '')?.[1] ?? ''),
    }));
}

async function signUp(app: TestApp, person = maud): Promise<void> {
  await request(app.bare).post('/api/auth/sign-up/email').send(person).expect(202, { isSignedIn: false });
  const token = mailsOf(app).findLast((mail) => mail.to === person.email)?.token;
  await request(app.bare).post('/api/auth/verify-email').send({ token }).expect(204);
}

const signIn = (app: TestApp, { email, password }: { email: string; password: string } = maud) =>
  request(app.bare).post('/api/auth/sign-in/email').send({ email, password });

describe('POST /api/setup', () => {
  const admin = { name: 'First', email: 'first@larkmoor.example', password };

  it('makes the first admin with the code that was printed, and is closed for ever after', async () => {
    const app = openTestApp({ hasDemo: false });
    await request(app.bare).get('/api/setup').expect(200, { isOpen: true });
    await request(app.bare).post('/api/auth/sign-up/email').send(maud).expect(409);
    const wrong = await request(app.bare)
      .post('/api/setup')
      .send({ ...admin, code: 'guess' })
      .expect(403);
    expect(JSON.stringify(wrong.body)).not.toContain(app.identity.setUp.code);
    const { code } = app.identity.setUp;
    const made = await request(app.bare)
      .post('/api/setup')
      .send({ ...admin, code })
      .expect(201);
    const me = await request(app.bare).get('/api/me').set('Cookie', cookieOf(made.headers)).expect(200);
    expect(meView.parse(me.body).person).toMatchObject({ name: 'First', isAdmin: true });
    await request(app.bare).get('/api/setup').expect(200, { isOpen: false });
    await request(app.bare)
      .post('/api/setup')
      .send({ ...admin, email: 'b@larkmoor.example', code })
      .expect(410);
    await signIn(app, admin).expect(204);
  });

  it('stays shut in the demo, and people of the demo are nobody once it is over', async () => {
    const app = openTestApp();
    const { cookie } = await signInAs(app);
    await request(app.bare).get('/api/setup').expect(200, { isOpen: false });
    const after = openTestApp({ hasDemo: false, file: app.file });
    const me = await request(after.bare).get('/api/me').set('Cookie', cookie).expect(200);
    expect(me.body).toEqual({ person: null });
    await request(after.bare).get('/api/setup').expect(200, { isOpen: true });
    await request(after.bare).get('/api/demo/people').expect(404);
    await request(after.bare).post('/api/demo/sign-in').send({ person: app.person.id }).expect(404);
  });
});

describe('a session', () => {
  it('is in a cookie that no script reads and no other site sends, and by https alone where that is how people come', async () => {
    for (const isSecure of [false, true]) {
      const app = openTestApp({ isSecure });
      await signUp(app);
      const { headers } = await signIn(app).expect(204);
      const [line = ''] = headers['set-cookie'] ?? [];
      expect(line).toMatch(isSecure ? /^__Secure-tallyroot\.session_token=/ : /^tallyroot\.session_token=/);
      expect(line).toMatch(/; HttpOnly/i);
      expect(line).toMatch(/; SameSite=Lax/i);
      expect(/; Secure/i.test(line)).toBe(isSecure);
      expect(line).not.toMatch(/; Domain/i);
    }
  });

  it('is never the one that a browser brings along: signing in makes another', async () => {
    const app = openTestApp();
    await signUp(app);
    const planted = (await signInAs(app)).cookie;
    const answer = await signIn(app).set('Cookie', planted).expect(204);
    const own = cookieOf(answer.headers);
    expect(own).not.toBe(planted);
    const who = async (cookie: string) =>
      meView.parse((await request(app.bare).get('/api/me').set('Cookie', cookie)).body).person?.name;
    expect(await who(own)).toBe('Maud Ferreday');
    expect(await who(planted)).toBe('Somebody Else');
    // The token without the server's signature is nothing.
    const [session] = app.client.sqlite.prepare('SELECT token FROM sessions').pluck().all();
    expect(await who(`tallyroot.session_token=${String(session)}`)).toBeUndefined();
    expect(await who('tallyroot.session_token=chosen-by-somebody.c2lnbmF0dXJl')).toBeUndefined();
  });

  it('is listed without what it could be taken over by, and ends one by one or everywhere', async () => {
    const app = openTestApp();
    await signUp(app);
    const [first, second] = [cookieOf((await signIn(app)).headers), cookieOf((await signIn(app)).headers)];
    const list = await request(app.bare).get('/api/account/sessions').set('Cookie', first).expect(200);
    const { items } = sessionList.parse(list.body);
    expect(items.map((item) => item.isCurrent).sort()).toEqual([false, true]);
    const tokens = app.client.sqlite.prepare('SELECT token FROM sessions').pluck().all().map(String);
    for (const token of tokens) expect(JSON.stringify(list.body)).not.toContain(token);
    const other = items.find((item) => !item.isCurrent)?.id;
    await request(app.bare).delete(`/api/account/sessions/${other}`).set('Cookie', first).expect(204);
    await request(app.bare).get('/api/account/sessions').set('Cookie', second).expect(401);
    const third = cookieOf((await signIn(app)).headers);
    await request(app.bare).post('/api/account/sign-out-everywhere').set('Cookie', third).expect(204);
    for (const cookie of [first, third])
      await request(app.bare).get('/api/account/sessions').set('Cookie', cookie).expect(401);
  });

  it('ends at once when its person is disabled, and there is no new one', async () => {
    const app = openTestApp();
    await signUp(app);
    const cookie = cookieOf((await signIn(app)).headers);
    const { person } = meView.parse((await request(app.bare).get('/api/me').set('Cookie', cookie)).body);
    await request(app.app).patch(`/api/people/${person?.id}`).send({ isDisabled: true }).expect(200);
    const refused = await request(app.bare).get('/api/libraries').set('Cookie', cookie).expect(401);
    expect(problem.parse(refused.body).code).toBe('unauthenticated');
    expect(refused.headers['www-authenticate']).toBe('Bearer');
    expect(problem.parse((await signIn(app).expect(403)).body).detail).toMatch(/disabled/);
    await request(app.app).patch(`/api/people/${person?.id}`).send({ isDisabled: false }).expect(200);
    await signIn(app).expect(204);
  });

  it('ends with the password that it was opened with', async () => {
    const app = openTestApp();
    await signUp(app);
    const cookie = cookieOf((await signIn(app)).headers);
    await request(app.bare).post('/api/auth/request-password-reset').send({ email: maud.email }).expect(202);
    const { token } = mailsOf(app).at(-1) ?? {};
    const reset = { token, password: 'another long password' };
    await request(app.bare).post('/api/auth/reset-password').send(reset).expect(204);
    await request(app.bare).get('/api/libraries').set('Cookie', cookie).expect(401);
    await request(app.bare).post('/api/auth/reset-password').send(reset).expect(410);
    await signIn(app).expect(401);
    await signIn(app, { ...maud, password: reset.password }).expect(204);
    expect(mailsOf(app).at(-1)?.subject).toBe('Your password has been changed');
  });
});

describe('guessing', () => {
  it('an address by signing up, resetting or confirming gives the same answer for known and unknown ones', async () => {
    const app = openTestApp();
    await signUp(app);
    const stranger = 'stranger@larkmoor.example';
    const same = async (path: string, body: (email: string) => object) => {
      const [known, unknown] = [
        await request(app.bare).post(`/api/auth/${path}`).send(body(maud.email)),
        await request(app.bare).post(`/api/auth/${path}`).send(body(stranger)),
      ];
      expect([known.status, known.body], path).toEqual([unknown.status, unknown.body]);
      expect(known.headers['set-cookie']).toEqual(unknown.headers['set-cookie']);
    };
    await same('request-password-reset', (email) => ({ email }));
    await same('send-verification-email', (email) => ({ email }));
    await same('sign-up/email', (email) => ({ name: 'New', email, password }));
    const wrong = await Promise.all(
      [maud.email, 'nobody@larkmoor.example'].map((email) => signIn(app, { email, password: 'not the one' })),
    );
    const [a, b] = wrong.map(({ status, body }) => [status, problem.parse(body).detail]);
    expect(a).toEqual(b);
    expect(a?.[0]).toBe(401);
    // Only the owner of the address learns of it.
    expect(
      mailsOf(app)
        .filter((mail) => mail.to === maud.email)
        .map((mail) => mail.subject),
    ).toEqual(['Confirm your address', 'A new password', 'You have an account already']);
  });

  it('a password is stopped with 429 and says when to come back', async () => {
    const app = openTestApp();
    await signUp(app);
    const wrong = () => signIn(app, { ...maud, password: 'not the one' });
    for (let count = 0; count < 10; count += 1) await wrong().expect(401);
    const stopped = await wrong().expect(429);
    expect(problem.parse(stopped.body)).toMatchObject({ code: 'too_many', status: 429 });
    expect(Number(stopped.headers['retry-after'])).toBeGreaterThan(0);
    // Counted for the account: another one is not shut out with it.
    await signIn(app, { email: 'other@larkmoor.example', password }).expect(401);
  });

  it('is not helped by an account that was made with somebody else’s address and never confirmed', async () => {
    const app = openTestApp();
    await request(app.bare).post('/api/auth/sign-up/email').send(maud).expect(202);
    const answer = await signIn(app).expect(403);
    expect(problem.parse(answer.body).detail).toMatch(/confirmed/);
    expect(answer.headers['set-cookie']).toBeUndefined();
  });
});

describe('POST /api/auth/sign-up/email', () => {
  it('is for the invited alone where the site says so', async () => {
    const app = openTestApp({ signUp: 'invited' });
    await request(app.bare).post('/api/auth/sign-up/email').send(maud).expect(403);
    expect(mailsOf(app)).toEqual([]);
  });

  it('takes nothing that would make an admin', async () => {
    const { bare } = openTestApp();
    await request(bare)
      .post('/api/auth/sign-up/email')
      .send({ ...maud, isAdmin: true })
      .expect(400);
    await request(bare).post('/api/auth/update-user').send({ isAdmin: true }).expect(404);
  });
});
