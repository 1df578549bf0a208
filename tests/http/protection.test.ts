import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import request from 'supertest';
import { describe, expect, it, vi } from 'vitest';
import { serverEvent } from '../../shared/schemas/events.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { openTestApp, seedLibrary } from '../helpers/app.ts';
import { createFakeMeasuring } from '../helpers/app-fake-measuring.ts';

const body = { slug: 'pocket-roots', name: 'Pocket roots' };

describe('origin check', () => {
  it.each([
    ['another origin', { Origin: 'https://elsewhere.example' }],
    ['an origin without a name', { Origin: 'null' }],
    ['a page of another site', { 'Sec-Fetch-Site': 'cross-site' }],
    ['a page of a sibling name', { 'Sec-Fetch-Site': 'same-site' }],
  ])('refuses a change from %s', async (_from, headers) => {
    const { app, services } = openTestApp();
    const answer = await request(app).post('/api/libraries').set(headers).send(body).expect(403);
    expect(problem.parse(answer.body).code).toBe('forbidden');
    expect(services.libraries.list({ limit: 5 }).items).toEqual([]);
  });

  it('takes a change from its own page, and from a program that has no origin', async () => {
    const { app } = openTestApp();
    const own = { Host: '127.0.0.1:5170', Origin: 'http://127.0.0.1:5170', 'Sec-Fetch-Site': 'same-origin' };
    await request(app).post('/api/libraries').set(own).send(body).expect(201);
    await request(app)
      .post('/api/libraries')
      .send({ ...body, slug: 'second' })
      .expect(201);
  });

  it('does not answer for a host name that somebody has pointed at it', async () => {
    const { app } = openTestApp();
    await request(app).get('/api/libraries').set('Host', 'rebound.example').expect(403);
    await request(app).get('/api/libraries').set('Host', 'localhost:5170').expect(200);
    await request(app).get('/api/libraries').set('Host', '[::1]:5170').expect(200);
  });

  it('reads no body but JSON, so that a form of another site has nothing to send', async () => {
    const { app } = openTestApp();
    const answer = await request(app).post('/api/libraries').type('form').send(body).expect(400);
    expect(problem.parse(answer.body).issues?.length).toBeGreaterThan(0);
  });
});

describe('answers', () => {
  it('carry a content security policy without inline scripts and without eval', async () => {
    const { app } = openTestApp();
    const { headers } = await request(app).get('/api/about').expect(200);
    const policy = headers['content-security-policy'] ?? '';
    expect(policy).toMatch(/default-src 'none'/);
    expect(policy).toMatch(/script-src 'self'(;|$)/);
    expect(policy).not.toMatch(/unsafe-eval/);
    expect(headers).toMatchObject({ 'x-content-type-options': 'nosniff', 'cache-control': 'no-store' });
    expect(headers).not.toHaveProperty('x-powered-by');
  });

  it('keep the id of a request that has a sound one, and give another to one that has not', async () => {
    const { app } = openTestApp();
    const kept = await request(app).get('/api/about').set('X-Request-Id', 'proxy-12345678');
    expect(kept.headers['x-request-id']).toBe('proxy-12345678');
    const replaced = await request(app).get('/api/about').set('X-Request-Id', 'a b"c');
    expect(replaced.headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('tell nothing of an unexpected error but the id to look for', async () => {
    const { app, client } = openTestApp();
    client.sqlite.exec('DROP TABLE jobs; DROP TABLE audit_log');
    const answer = await request(app).get('/api/audit-log').expect(500);
    const { detail, code, requestId } = problem.parse(answer.body);
    expect(code).toBe('internal');
    expect(`${detail}${JSON.stringify(answer.body)}`).not.toMatch(/audit_log|SQL|\.ts/i);
    expect(requestId).toBe(answer.headers['x-request-id']);
  });

  it('say that there is nothing at an unknown address, as problem details', async () => {
    const { app } = openTestApp();
    const answer = await request(app).get('/api/nothing?x=1').expect(404);
    expect(problem.parse(answer.body)).toMatchObject({ detail: 'There is nothing at GET /api/nothing.' });
    await request(app).get('/api/runs/abc').expect(400);
    await request(app).get('/api/runs/7').expect(404);
    await request(app).get('/api/solves/7').expect(404);
  });
});

describe('GET /api/runs/:run/events', () => {
  it('sends the state of now, then what changes, and the end; and forgets who has left', async () => {
    const app = openTestApp({ measuring: createFakeMeasuring({ delayMs: 20 }) });
    const { build } = await seedLibrary(app);
    const { runs, bus, jobRunner } = app.services;
    const { id } = runs.start({ name: 'local' }, { build: build.id, suite: 'tests' });
    const server = createServer(app.app);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.address() as AddressInfo;
    const listenersBefore = bus.size();
    const response = await fetch(`http://127.0.0.1:${port}/api/runs/${id}/events`);
    expect(response.headers.get('content-type')).toMatch(/^text\/event-stream/);
    jobRunner.start();
    const events = [];
    let text = '';
    const decoder = new TextDecoder();
    for await (const chunk of response.body ?? []) {
      text += decoder.decode(chunk, { stream: true });
      const blocks = text.split('\n\n');
      text = blocks.pop() ?? '';
      for (const block of blocks)
        if (block.startsWith('data: ')) events.push(serverEvent.parse(JSON.parse(block.slice(6))));
      const last = events.at(-1);
      if (last?.kind === 'run' && last.status === 'finished') break; // leaves the stream
    }
    expect(events[0]).toMatchObject({ kind: 'run', run: id, status: 'queued' });
    expect(events.at(-1)).toMatchObject({ status: 'finished', progress: { stored: 6 } });
    await new Promise<void>((resolve) => server.close(() => resolve()));
    // The server forgets the connection first and tells the response in the next turn.
    await vi.waitFor(() => expect(bus.size()).toBe(listenersBefore));
  });
});
