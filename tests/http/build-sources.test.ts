import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { readManifest } from '../../server/builds/manifest.ts';
import {
  type BuildView,
  buildLog,
  buildLogEvent,
  buildPreviewView,
  buildView,
  gitRefs,
} from '../../shared/schemas/builds.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { openTestApp, scratchFolder, seedLibrary, type TestApp } from '../helpers/app.ts';
import { type TarEntry, tarOf, zipOf } from '../helpers/archives.ts';
import { TestRepository } from '../helpers/repositories.ts';

const previews = '/api/libraries/pocket-roots/build-previews';
const builds = '/api/libraries/pocket-roots/builds';

const manifest = (prepare: string[] = []) => `format: 1
library: Pocket roots
prepare: ${JSON.stringify(prepare)}
adapter: node adapter.mjs
solvers:
  - { name: secant, takes: start, starts: 2 }
`;

function openLibrary(given: Parameters<typeof openTestApp>[0] = {}): TestApp {
  const app = openTestApp({ readManifest, ...given });
  const fields = { slug: 'pocket-roots', name: 'Pocket roots', description: '', homepage: null };
  app.services.libraries.create(app.person, fields);
  return app;
}

let count = 0;
function makeRepository(files: Record<string, string>): { repository: TestRepository; commit: string } {
  count += 1;
  const repository = new TestRepository(path.join(scratchFolder, `repository-${count}`));
  for (const [name, text] of Object.entries(files)) repository.put(name, text);
  return { repository, commit: repository.commit('Steffensen without the second start') };
}

const archiveOf = (...entries: TarEntry[]) => gzipSync(tarOf(...entries));
const sendArchive = (app: TestApp, bytes: Buffer, name = 'pocket-roots.tar.gz') =>
  request(app.app).post(previews).attach('archive', bytes, name);

async function previewGit(app: TestApp, address: string, ref = 'main') {
  const answer = await request(app.app).post(previews).send({ git: { address, ref } }).expect(201);
  return buildPreviewView.parse(answer.body);
}

async function whenPrepared(app: TestApp, id: number): Promise<BuildView> {
  for (;;) {
    const answer = await request(app.app).get(`/api/builds/${id}`).expect(200);
    const build = buildView.parse(answer.body);
    if (build.state === 'ready' || build.state === 'failed') return build;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}

describe('POST /api/libraries/:library/build-previews', () => {
  it('shows what a commit would be run by, before anything is run, and makes the build of it', async () => {
    const app = openLibrary();
    const { repository, commit } = makeRepository({ 'tallyroot.yaml': manifest(), 'adapter.mjs': '//' });
    const preview = await previewGit(app, repository.folder);
    const subject = 'Steffensen without the second start';
    expect(preview).toMatchObject({
      source: 'git',
      commit,
      subject,
      ref: 'main',
      existing: null,
      issues: [],
    });
    expect(preview.recipe?.adapter).toBe('node adapter.mjs');
    const made = await request(app.app).post(builds).send({ preview: preview.id }).expect(201);
    const build = buildView.parse(made.body);
    expect(build).toMatchObject({ state: 'ready', label: subject, commit, address: repository.folder });
    expect(readFileSync(path.join(build.folder, 'adapter.mjs'), 'utf8')).toBe('//');
    const twice = await request(app.app).post(builds).send({ preview: preview.id }).expect(200);
    expect(buildView.parse(twice.body).id).toBe(build.id);
    expect((await previewGit(app, repository.folder)).existing).toMatchObject({ id: build.id });
  });

  it('says with line and column what is wrong in a manifest, and makes no build of it', async () => {
    const app = openLibrary();
    const text = manifest().replace('takes: start', 'takes: strat');
    const sent = await sendArchive(app, archiveOf({ name: 'tallyroot.yaml', body: text })).expect(201);
    const preview = buildPreviewView.parse(sent.body);
    expect(preview).toMatchObject({ recipe: null, source: 'archive' });
    expect(preview.issues[0]).toMatchObject({ path: 'solvers.0.takes', line: 6 });
    expect(preview.issues[0]?.column).toBeGreaterThan(1);
    const refused = await request(app.app).post(builds).send({ preview: preview.id }).expect(422);
    expect(problem.parse(refused.body).issues).toEqual(preview.issues);
  });

  it('takes the same files in another archive for the same build', async () => {
    const app = openLibrary();
    const body = manifest();
    const sent = await sendArchive(app, archiveOf({ name: 'top/tallyroot.yaml', body })).expect(201);
    const { id } = buildPreviewView.parse(sent.body);
    const made = buildView.parse(
      (await request(app.app).post(builds).send({ preview: id }).expect(201)).body,
    );
    expect(made).toMatchObject({ source: 'archive', label: 'pocket-roots.tar.gz', commit: null });
    const zipped = await sendArchive(app, zipOf([{ name: 'tallyroot.yaml', body, deflated: true }]), 'x.zip');
    expect(buildPreviewView.parse(zipped.body).existing?.id).toBe(made.id);
    expect(readdirSync(path.join(`${app.file}.files`, 'uploads'))).toEqual([]);
  });

  it('refuses hostile archives and leaves nothing behind', async () => {
    const app = openLibrary();
    const bomb = gzipSync(tarOf({ name: 'big', body: Buffer.alloc(220 * 1024 * 1024) }));
    expect(bomb.length).toBeLessThan(1024 * 1024);
    const hostile: [Buffer, RegExp][] = [
      [bomb, /larger than/],
      [archiveOf({ name: '../outside', body: 'x' }), /\.\./],
      [archiveOf({ name: 'link', type: '2', link: '/etc/passwd' }), /symbolic link/],
      [zipOf([{ name: 'a/../../outside', body: 'x' }]), /\.\./],
      [Buffer.from('no archive at all'), /no tar/],
    ];
    for (const [bytes, message] of hostile) {
      const answer = await sendArchive(app, bytes, '../../evil.tar.gz').expect(422);
      expect(problem.parse(answer.body).detail).toMatch(message);
    }
    const left = readdirSync(`${app.file}.files`, { recursive: true }).map(String);
    expect(left.filter((name) => name.includes('/'))).toEqual([]);
  });

  it('takes a form with one archive and nothing else', async () => {
    const app = openLibrary();
    await request(app.app).post(previews).field('archive', 'no file').expect(400);
    await request(app.app).post(previews).attach('other', Buffer.from('x'), 'x.zip').expect(400);
    await request(app.app).post(previews).send({}).expect(400);
    await request(app.app)
      .post(previews)
      .send({ folder: '/a', git: { address: '/a', ref: 'b' } })
      .expect(400);
    await sendArchive(app, Buffer.from('x')).set('Origin', 'https://elsewhere.example').expect(403);
  });

  it('names folders and repositories of this machine only where that is allowed', async () => {
    const app = openLibrary({ allowsLocalPaths: false });
    const { repository } = makeRepository({ 'tallyroot.yaml': manifest() });
    await request(app.app).post(previews).send({ folder: repository.folder }).expect(403);
    await request(app.app).post(builds).send({ folder: repository.folder }).expect(403);
    const git = { address: repository.folder, ref: 'main' };
    await request(app.app).post(previews).send({ git }).expect(400);
    await request(app.app).get('/api/git-refs').query({ address: repository.folder }).expect(400);
  });

  it('runs no program that a folder names in its configuration', async () => {
    const app = openLibrary();
    const witness = path.join(scratchFolder, `witness-${count}`);
    const program = path.join(scratchFolder, `program-${count}.sh`);
    writeFileSync(program, `#!/bin/sh\ntouch ${witness}\ncat\n`, { mode: 0o755 });
    const { repository, commit } = makeRepository({
      'tallyroot.yaml': manifest(),
      '.gitattributes': '* filter=f',
    });
    repository.git('config', 'core.fsmonitor', program);
    repository.git('config', 'filter.f.clean', program);
    repository.git('config', 'filter.f.required', 'true');
    writeFileSync(path.join(repository.folder, 'tallyroot.yaml'), manifest()); // other times, same bytes
    const answer = await request(app.app).post(previews).send({ folder: repository.folder }).expect(201);
    expect(buildPreviewView.parse(answer.body)).toMatchObject({ source: 'folder', commit });
    const bare = path.join(scratchFolder, `bare-${count}`);
    for (const name of ['objects', 'refs']) mkdirSync(path.join(bare, name), { recursive: true });
    writeFileSync(path.join(bare, 'HEAD'), 'ref: refs/heads/main\n');
    writeFileSync(path.join(bare, 'config'), `[core]\n\tfsmonitor = ${program}\n\tworktree = ${bare}\n`);
    writeFileSync(path.join(bare, 'tallyroot.yaml'), manifest());
    const asBare = await request(app.app).post(previews).send({ folder: bare }).expect(201);
    expect(buildPreviewView.parse(asBare.body).commit).toBeNull();
    expect(() => readFileSync(witness)).toThrow(/ENOENT/);
  });

  it('expires', async () => {
    let now = Date.UTC(2026, 0, 5);
    const app = openLibrary({ clock: () => now });
    const { repository } = makeRepository({ 'tallyroot.yaml': manifest() });
    const { id } = await previewGit(app, repository.folder);
    now += 3_600_001;
    await request(app.app).post(builds).send({ preview: id }).expect(410);
    const sources = path.join(`${app.file}.files`, 'sources');
    expect(readdirSync(sources)).toHaveLength(1);
    now = Date.now() + 3_700_000; // files bear the time of the system
    await app.services.buildPreviews.sweep();
    expect(readdirSync(sources)).toEqual([]);
    expect(readdirSync(path.join(`${app.file}.files`, 'mirrors'))).toEqual([]);
  });
});

describe('preparing a build', () => {
  async function register(app: TestApp, prepare: string[]): Promise<BuildView> {
    const { repository } = makeRepository({ 'tallyroot.yaml': manifest(prepare), 'lib.c': 'int x;\n' });
    const { id } = await previewGit(app, repository.folder);
    return buildView.parse((await request(app.app).post(builds).send({ preview: id }).expect(201)).body);
  }

  it('runs the lines in a copy of the source, under an environment of their own, and keeps the log', async () => {
    const app = openLibrary();
    const lines = ['echo $HOME $SECRET > out; echo "<b>made</b>"', 'cat lib.c >&2'];
    const build = await register(app, lines);
    expect(build.state).toBe('waiting');
    app.services.jobRunner.start();
    const done = await whenPrepared(app, build.id);
    expect(done).toMatchObject({ state: 'ready', reason: null });
    expect(readFileSync(path.join(done.folder, 'out'), 'utf8')).toMatch(/^\/\S+\/home\n$/);
    const log = buildLog.parse((await request(app.app).get(`/api/builds/${build.id}/log`)).body);
    expect(log.pieces.map(({ kind, text }) => [kind, text.replace(/[\d.]+ s$/, 'N s')])).toEqual([
      ['line', lines[0]],
      ['output', '<b>made</b>\n'],
      ['note', 'exit status 0, N s'],
      ['line', lines[1]],
      ['output', 'int x;\n'],
      ['note', 'exit status 0, N s'],
    ]);
  });

  it('fails with the line that failed, is refused for runs, and can be tried again', async () => {
    const app = openLibrary();
    const marker = path.join(scratchFolder, `marker-${count}`);
    const build = await register(app, ['true', `test -e ${marker}`, 'touch never']);
    app.services.jobRunner.start();
    const failed = await whenPrepared(app, build.id);
    expect(failed).toMatchObject({ state: 'failed', reason: 'Prepare line 2 of 3 failed: exit status 1.' });
    expect(readdirSync(failed.folder)).not.toContain('never');
    const refused = await request(app.app)
      .post('/api/runs')
      .send({ build: build.id, suite: 'tests' })
      .expect(409);
    expect(problem.parse(refused.body).detail).toMatch(/could not be prepared .* line 2/);
    writeFileSync(marker, '');
    const { id } = await previewGit(app, failed.address ?? '');
    await request(app.app).post(builds).send({ preview: id }).expect(200);
    expect(await whenPrepared(app, build.id)).toMatchObject({ state: 'ready', reason: null });
  });

  it('ends a line and what it started when the time is over, and keeps the end of a flood', async () => {
    const app = openLibrary({ prepareMs: 1500 });
    const build = await register(app, [
      'yes tallyroot-flood | head -c 3000000; echo last; sleep 60 & sleep 60',
    ]);
    app.services.jobRunner.start();
    const failed = await whenPrepared(app, build.id);
    expect(failed.reason).toMatch(/not done when the 2 s for preparing were over/);
    const log = buildLog.parse((await request(app.app).get(`/api/builds/${build.id}/log`)).body);
    const text = log.pieces.map((piece) => piece.text).join('');
    expect(text.length).toBeLessThan(300_000);
    expect(text).toMatch(/tallyroot-flood\nlast\n/);
  });

  it('lets a run of a build that is not ready wait for it', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    app.client.sqlite.prepare("UPDATE builds SET state = 'preparing' WHERE id = ?").run(build.id);
    const { id } = app.services.runs.start({ name: 'local' }, { build: build.id, suite: 'tests' });
    expect(app.services.queue.claim()).toBeUndefined();
    app.client.sqlite.prepare("UPDATE builds SET state = 'ready' WHERE id = ?").run(build.id);
    expect(app.services.queue.claim()).toMatchObject({ kind: 'run', subject: id });
  });

  it('sends its log as it is written, to the end, and tells a client that has it all to stop', async () => {
    const app = openLibrary();
    const build = await register(app, ['echo one; sleep 0.3; echo two']);
    const server = createServer(app.app);
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    const { port } = server.address() as AddressInfo;
    const address = `http://127.0.0.1:${port}/api/builds/${build.id}/log/events`;
    const stream = await fetch(address);
    app.services.jobRunner.start();
    const text = await stream.text();
    const events = [...text.matchAll(/^data: (.*)$/gm)].map((match) =>
      buildLogEvent.parse(JSON.parse(match[1] ?? '')),
    );
    expect(events.flatMap((event) => (event.kind === 'state' ? [] : [event.kind]))).toEqual([
      'line',
      'output',
      'output',
      'note',
    ]);
    expect(events.at(-1)).toMatchObject({ kind: 'state', state: 'ready' });
    const last = [...text.matchAll(/^id: (\d+)$/gm)].at(-1)?.[1] ?? '';
    expect((await fetch(address, { headers: { 'Last-Event-ID': last } })).status).toBe(204);
    await new Promise<void>((resolve) => server.close(() => resolve()));
  });
});

describe('GET /api/git-refs', () => {
  it('lists branches and tags with their commits', async () => {
    const app = openLibrary();
    const { repository, commit } = makeRepository({ 'tallyroot.yaml': manifest() });
    repository.git('tag', 'v1');
    const answer = await request(app.app)
      .get('/api/git-refs')
      .query({ address: repository.folder })
      .expect(200);
    expect(gitRefs.parse(answer.body)).toEqual({
      defaultBranch: 'main',
      branches: [{ name: 'main', commit }],
      tags: [{ name: 'v1', commit }],
    });
    await request(app.app).get('/api/git-refs').query({ address: 'ext::sh -c true' }).expect(400);
  });
});
