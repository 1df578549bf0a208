import { randomUUID } from 'node:crypto';
import express, { type Express } from 'express';
import request from 'supertest';
import { localActor } from '../../server/actor.ts';
import type { Services } from '../../server/features/services.ts';
import type { Role, TokenScope } from '../../shared/permissions.ts';

/** A person who is signed in on an app under test. */
export interface SignedIn {
  id: string;
  name: string;
  email: string;
  cookie: string;
}

/** The pairs of a Set-Cookie header, as a browser sends them back. */
export function cookieOf(headers: Record<string, unknown>): string {
  const given: unknown = headers['set-cookie'];
  const lines = Array.isArray(given) ? given.map(String) : [];
  return lines.map((line) => line.split(';')[0] ?? '').join('; ');
}

/** Makes a person without a password, as the demo does, and signs them in over HTTP. */
export async function signInAs(
  app: { bare: Express; services: Services },
  given: { name?: string; isAdmin?: boolean; roles?: Record<string, Role> } = {},
): Promise<SignedIn> {
  const name = given.name ?? 'Somebody Else';
  const email = `${randomUUID()}@larkmoor.example`;
  const { people, members, libraries } = app.services;
  const user = people.ensureDemoPerson({ name, email, isAdmin: given.isAdmin ?? false });
  for (const [library, role] of Object.entries(given.roles ?? {}))
    members.add(localActor, libraries.require(library).id, user.id, role);
  const answer = await request(app.bare).post('/api/demo/sign-in').send({ person: user.id }).expect(204);
  return { id: user.id, name, email, cookie: cookieOf(answer.headers) };
}

/** A token of a library, as the header that it is sent in. */
export function botHeader(services: Services, library: string, scopes: TokenScope[]): string {
  return `Bearer ${services.tokens.make(localActor, library, { name: 'pipeline', scopes, days: 1 }).token}`;
}

const defaultPerson = { name: 'Wren Tolliver', email: 'wren@larkmoor.example', isAdmin: true };

/** The app behind one that adds the cookie of a session, which is opened by the first request. */
export function signInDefault(bare: Express, services: Services, hasDemo = true) {
  const { id, name } = hasDemo ? services.people.ensureDemoPerson(defaultPerson) : { id: '', name: '' };
  const open = async () =>
    cookieOf((await request(bare).post('/api/demo/sign-in').send({ person: id }).expect(204)).headers);
  let cookie: Promise<string> | undefined;
  const app = express();
  app.use(async (incoming, _response, next) => {
    cookie ??= open();
    incoming.headers.cookie ??= await cookie;
    next();
  });
  app.use(bare);
  return { app, person: { id, name } };
}
