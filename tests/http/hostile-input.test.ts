import { readdirSync } from 'node:fs';
import { createServer } from 'node:http';
import { type AddressInfo, connect } from 'node:net';
import path from 'node:path';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { readManifest } from '../../server/builds/manifest.ts';
import { buildPreviewView, buildView } from '../../shared/schemas/builds.ts';
import { libraryView } from '../../shared/schemas/libraries.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { openTestApp } from '../helpers/app.ts';
import { tarOf } from '../helpers/archives.ts';

const script = '<script>alert(1)</script>';
const library = { slug: 'pocket-roots', name: script, description: `"><img src=x onerror=alert(1)>` };
const mebibyte = 1024 * 1024;

/** Sends the head of a request and not its body; gives the first line of the answer. */
async function sendHead(port: number, lines: string[]): Promise<string> {
  const socket = connect(port, '127.0.0.1');
  socket.write(`${lines.join('\r\n')}\r\n\r\n`);
  let text = '';
  for await (const chunk of socket) {
    text += String(chunk);
    if (text.includes('\r\n')) break;
  }
  socket.destroy();
  return text.split('\r\n')[0] ?? '';
}

describe('requests that mean harm', () => {
  it('of 10 MB, or an archive of 200 MB, are refused by their head, before the body has come', async () => {
    const app = openTestApp();
    await request(app.app)
      .post('/api/libraries')
      .send({ ...library, slug: 'x' })
      .expect(201);
    const server = createServer(app.app);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.address() as AddressInfo;
    const head = [
      'POST /api/libraries HTTP/1.1',
      `Host: 127.0.0.1:${port}`,
      'Content-Type: application/json',
    ];
    expect(await sendHead(port, [...head, `Content-Length: ${10 * mebibyte}`])).toMatch(/^HTTP\/1.1 413 /);
    const form = [...head.slice(0, 2), 'Content-Type: multipart/form-data; boundary=x'];
    form[0] = 'POST /api/libraries/x/build-previews HTTP/1.1';
    expect(await sendHead(port, [...form, `Content-Length: ${200 * mebibyte}`])).toMatch(/^HTTP\/1.1 413 /);
    server.closeAllConnections();
    await new Promise<void>((resolve) => server.close(() => resolve()));
  });

  it('of an archive larger than the limit are refused, and what has come is removed', async () => {
    const app = openTestApp({ readManifest });
    await request(app.app).post('/api/libraries').send(library).expect(201);
    const answer = await request(app.app)
      .post('/api/libraries/pocket-roots/build-previews')
      .attach('archive', Buffer.alloc(100 * mebibyte + 1), 'large.tar')
      .expect(413);
    expect(problem.parse(answer.body).detail).toBe('The archive is larger than 100 MiB.');
    expect(readdirSync(path.join(`${app.file}.files`, 'uploads'))).toEqual([]);
  });

  it('with a key that JavaScript gives a meaning change nothing', async () => {
    const { app } = openTestApp();
    const text =
      '{"slug":"x","name":"x","__proto__":{"isAdmin":true},"constructor":{"prototype":{"isAdmin":true}}}';
    await request(app).post('/api/libraries').type('application/json').send(text).expect(400);
    expect(Reflect.get({}, 'isAdmin')).toBeUndefined();
    await request(app).get('/api/runs?library[slug]=x&__proto__[a]=b').expect(400);
    await request(app).get('/api/runs?library=a&library=b').expect(400);
  });

  it('with script in names have them stored and given back as text', async () => {
    const app = openTestApp({ readManifest });
    const made = await request(app.app).post('/api/libraries').send(library).expect(201);
    expect(libraryView.parse(made.body)).toMatchObject(library);
    const manifest = `format: 1\nlibrary: "${script}"\nadapter: "echo '${script}'"\nsolvers: [{ name: s, takes: bracket }]\n`;
    const sent = await request(app.app)
      .post('/api/libraries/pocket-roots/build-previews')
      .attach('archive', tarOf({ name: 'tallyroot.yaml', body: manifest }), `${script.replace('/', '')}.tar`)
      .expect(201);
    const { id, recipe } = buildPreviewView.parse(sent.body);
    expect(recipe?.library).toBe(script);
    const body = { preview: id, label: `${script}\u202e` };
    const answer = await request(app.app).post('/api/libraries/pocket-roots/builds').send(body).expect(201);
    expect(buildView.parse(answer.body)).toMatchObject({
      label: `${script}\u202e`,
      recipe: { library: script },
    });
    expect(answer.headers).toMatchObject({
      'content-type': expect.stringMatching(/^application\/json/),
      'x-content-type-options': 'nosniff',
    });
    // An address of an error is told back as text as well.
    const missing = await request(app.app)
      .get(`/api/${encodeURIComponent(script)}`)
      .set('Accept', 'text/html');
    expect(missing.headers['content-type']).toMatch(/^application\/problem\+json/);
  });
});
