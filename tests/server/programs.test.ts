import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import express from 'express';
import request from 'supertest';
import { afterAll, describe, expect, it } from 'vitest';
import { isClientStale } from '../../server/build-client.ts';
import { readConfig } from '../../server/config.ts';
import { staticSite } from '../../server/http/static-site.ts';

const folder = mkdtempSync(path.join(tmpdir(), 'tallyroot-programs-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

describe('readConfig', () => {
  it('listens to this machine alone unless told otherwise', () => {
    expect(readConfig({})).toMatchObject({ host: '127.0.0.1', port: 5170, hasDemo: true });
    expect(readConfig({ HOST: '::', PORT: '80', DEMO: 'off', LANES: '3' })).toMatchObject({
      host: '::',
      port: 80,
      hasDemo: false,
      lanes: 3,
    });
    expect(readConfig({ ALLOWED_HOSTS: ' a.example, b.example ,' }).allowedHosts).toEqual([
      'a.example',
      'b.example',
    ]);
  });

  it('names every variable that it cannot use', () => {
    expect(() => readConfig({ PORT: '70000', LANES: 'many', DEMO: 'maybe' })).toThrow(/PORT.*LANES.*DEMO/);
  });
});

describe('isClientStale', () => {
  it('wants the client built where it never was, or where a source is newer', async () => {
    const project = path.join(folder, 'project');
    mkdirSync(path.join(project, 'src', 'deep'), { recursive: true });
    mkdirSync(path.join(project, 'dist'));
    const source = path.join(project, 'src', 'deep', 'page.tsx');
    const page = path.join(project, 'dist', 'index.html');
    writeFileSync(source, '');
    expect(await isClientStale(project)).toBe(true);
    writeFileSync(page, '');
    for (const file of [source, path.dirname(source), path.join(project, 'src')])
      utimesSync(file, 1000, 1000);
    utimesSync(page, 2000, 2000);
    expect(await isClientStale(project)).toBe(false);
    utimesSync(source, 3000, 3000);
    expect(await isClientStale(project)).toBe(true);
  });
});

describe('staticSite', () => {
  it('sends the one page for every page address, and hashed files to be kept', async () => {
    const dist = path.join(folder, 'dist');
    mkdirSync(path.join(dist, 'assets'), { recursive: true });
    writeFileSync(path.join(dist, 'index.html'), '<title>the page</title>');
    writeFileSync(path.join(dist, 'assets', 'main-1a2b.js'), 'let a;');
    const app = express();
    for (const handler of staticSite(dist)) app.use(handler);
    const passedOn: string[] = [];
    app.use((passed, response) => {
      passedOn.push(passed.originalUrl);
      response.status(404).end();
    });
    const deep = await request(app).get('/libraries/x/runs/3').set('Accept', 'text/html').expect(200);
    expect(deep.text).toBe('<title>the page</title>');
    expect(deep.headers['cache-control']).toBe('no-cache');
    const file = await request(app).get('/assets/main-1a2b.js').expect(200);
    expect(file.headers['cache-control']).toMatch(/immutable/);
    await request(app).get('/assets/gone.js').expect(404);
    await request(app).post('/libraries/x').set('Accept', 'text/html').expect(404);
    expect(passedOn).toEqual(['/assets/gone.js', '/libraries/x']);
    await request(app).get('/..%2fpackage.json').set('Accept', 'application/json').expect(404);
  });
});
