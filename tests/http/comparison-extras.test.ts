import path from 'node:path';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { readManifest } from '../../server/builds/manifest.ts';
import { codeDiffView } from '../../shared/schemas/code-diff.ts';
import { comparisonFile } from '../../shared/schemas/comparison-file.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { profileView } from '../../shared/schemas/profiles.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import { trendView } from '../../shared/schemas/trends.ts';
import { makeBuildFolder, openTestApp, scratchFolder, seedLibrary } from '../helpers/app.ts';
import { createFakeMeasuring } from '../helpers/app-fake-measuring.ts';
import { buildCase, buildRevision, buildSolver } from '../helpers/builders.ts';
import { TestRepository } from '../helpers/repositories.ts';
import { order } from '../helpers/solve-records.ts';

const actor = { name: 'local' };

/** Evaluations by the letter in the build's file `salt`: the changed secant asks twice as often, and fails once. */
function shape(record: SolveRecord, salt: string): Partial<SolveRecord> {
  const isChanged = salt === 'changed' && record.solver === 'secant';
  if (isChanged && record.case === 'pole')
    return { outcome: 'refused', root: null, digits: null, error: null };
  const evaluations = (record.solver === 'secant' ? 5 : 20) * (isChanged ? 2 : 1);
  return { evaluations, f: evaluations, order: order(isChanged ? 1.2 : 1.6) };
}

async function twoRuns() {
  const app = openTestApp({ measuring: createFakeMeasuring({ shape }) });
  const { build } = await seedLibrary(app);
  const { runs, builds, jobRunner } = app.services;
  jobRunner.start();
  const before = await runs.wait(runs.start(actor, { build: build.id, suite: 'tests' }).id);
  const folder = makeBuildFolder({ files: { salt: 'changed' } });
  const changed = await builds.registerFolder(actor, 'pocket-roots', { folder, label: '=2+5' });
  const after = await runs.wait(runs.start(actor, { build: changed.build.id, suite: 'tests' }).id);
  const get = (address: string, query: object = {}) => request(app.app).get(address).query(query);
  const sides = { candidate: after.id, reference: before.id };
  return { app, before, after, get, sides };
}

describe('GET /api/comparisons/export', () => {
  it('sends each form as a file with a plain name and its media type', async () => {
    const { get, sides } = await twoRuns();
    const name = (ending: string) => `pocket-roots-tests-run-2-against-run-1.${ending}`;
    const forms: [string, string, RegExp, RegExp][] = [
      ['csv', 'csv', /^text\/csv/, /^solver,solver was called,case/],
      ['json', 'json', /^application\/json/, /^\{\n "format": "tallyroot comparison 1"/],
      ['markdown', 'md', /^text\/markdown/, /^\*\*Beyond allowances/],
      ['junit', 'xml', /^application\/xml/, /^<\?xml/],
    ];
    for (const [format, ending, mediaType, start] of forms) {
      const answer = await get('/api/comparisons/export', { ...sides, format })
        .buffer()
        .expect(200);
      expect(answer.headers['content-type']).toMatch(mediaType);
      expect(answer.headers['content-disposition']).toBe(`attachment; filename="${name(ending)}"`);
      expect(answer.headers['x-content-type-options']).toBe('nosniff');
      const text = answer.text ?? Buffer.from(answer.body).toString();
      expect(text).toMatch(start);
      if (format === 'json') expect(comparisonFile.parse(JSON.parse(text)).pairs).toHaveLength(6);
    }
    await get('/api/comparisons/export', { ...sides, format: 'xlsx' }).expect(400);
  });

  it('keeps names that look like formulas or markup harmless', async () => {
    const hostile = ['=HYPERLINK("x")', '@SUM(A1)', '<script>alert(1)</script>'];
    const app = openTestApp();
    await seedLibrary(app);
    const cases = hostile.map((id) => buildCase({ id }));
    const content = {
      revision: buildRevision({ id: 'hostile', cases }),
      source: '',
      builtIn: false,
      note: '',
    };
    app.services.suites.addRevision(actor, content);
    app.services.jobRunner.start();
    const run = await app.services.runs.wait(
      app.services.runs.start(actor, { build: 1, suite: 'hostile' }).id,
    );
    const query = { candidate: run.id, reference: run.id };
    const get = async (format: string) => {
      const answer = await request(app.app)
        .get('/api/comparisons/export')
        .query({ ...query, format })
        .buffer();
      return answer.text ?? Buffer.from(answer.body).toString();
    };
    const csv = await get('csv');
    expect(csv).toContain('"\'=HYPERLINK(""x"")"');
    expect(csv).not.toMatch(/(^|,)"?[=@]/m);
    expect(await get('junit')).not.toContain('<script>');
    const pairs = await request(app.app).get('/api/comparisons/pairs').query(query).expect(200);
    expect(pairs.headers['content-type']).toMatch(/^application\/json/);
    expect(pairs.body.items.map((pair: { case: string }) => pair.case)).toContain(hostile[2]);
  });
});

describe('GET /api/comparisons/code-diff', () => {
  it('shows what changed between two commits, and sends it once to a client that keeps it', async () => {
    const app = openTestApp({ readManifest });
    await seedLibrary(app, makeBuildFolderInYaml());
    const { buildPreviews, builds, runs } = app.services;
    const repository = new TestRepository(path.join(scratchFolder, 'code'));
    const manifest =
      'format: 1\nlibrary: L\nadapter: a\nsolvers: [{ name: secant, takes: start, starts: 2 }]\n';
    repository.put('tallyroot.yaml', manifest);
    const ids: number[] = [];
    for (const step of ['x1 - x0', 'x1 - x2']) {
      repository.put('secant.c', `double step = ${step};\n`);
      const ref = repository.commit(step);
      const preview = await buildPreviews.fromGit(actor, 'pocket-roots', { address: repository.folder, ref });
      const { build } = await builds.registerPreview(actor, 'pocket-roots', { preview: preview.id });
      ids.push(runs.start(actor, { build: build.id, suite: 'tests' }).id);
    }
    const query = { reference: ids[0], candidate: ids[1] };
    const get = () => request(app.app).get('/api/comparisons/code-diff').query(query);
    const answer = await get().expect(200);
    const diff = codeDiffView.parse(answer.body);
    expect(diff).toMatchObject({ isOfRecord: true, reference: { label: 'x1 - x0' } });
    expect(diff.files.map((file) => file.path)).toEqual(['secant.c']);
    expect(diff.files[0]?.hunks[0]?.lines.map(({ kind, text }) => [kind, text])).toEqual([
      ['was', 'double step = x1 - x0;'],
      ['new', 'double step = x1 - x2;'],
    ]);
    await get()
      .set('If-None-Match', answer.headers.etag ?? '')
      .expect(304);
  });

  it('reads folders of this machine as they are now, says so, and is not kept', async () => {
    const { get, sides } = await twoRuns();
    const answer = await get('/api/comparisons/code-diff', sides).expect(200);
    expect(codeDiffView.parse(answer.body)).toMatchObject({ isOfRecord: false, files: [{ path: 'salt' }] });
    expect(answer.headers).toMatchObject({ 'cache-control': 'no-store' });
    expect(answer.headers).not.toHaveProperty('etag');
  });
});

/** The first build of a library whose manifests are read for real. */
function makeBuildFolderInYaml(): string {
  const text = 'format: 1\nlibrary: L\nadapter: a\nsolvers: [{ name: secant, takes: start, starts: 2 }]\n';
  return makeBuildFolder({ files: { 'tallyroot.yaml': text } });
}

describe('performance profiles', () => {
  it('compare two builds over the pairs that both have', async () => {
    const { get, sides } = await twoRuns();
    const all = profileView.parse((await get('/api/comparisons/profile', sides).expect(200)).body);
    expect(all).toMatchObject({ problems: 6, leftOut: 0 });
    // The changed secant costs twice as much on two cases and fails on one; bisection is the same on three.
    expect(all.profiles.map((profile) => profile.points)).toEqual([
      [
        { x: 1, share: 1 },
        { x: 2, share: 1 },
      ],
      [
        { x: 1, share: 0.5 },
        { x: 2, share: 5 / 6 },
      ],
    ]);
    const secant = profileView.parse(
      (await get('/api/comparisons/profile', { ...sides, solver: 'secant' })).body,
    );
    expect(secant.profiles.map((profile) => profile.solved)).toEqual([1, 2 / 3]);
    await get('/api/comparisons/profile', { ...sides, solver: 'newton' }).expect(404);
  });

  it('compare the solvers of one run, a case being a problem', async () => {
    const { get, after } = await twoRuns();
    const view = profileView.parse((await get(`/api/runs/${after.id}/profile`).expect(200)).body);
    expect(view.profiles.map(({ name, points, solved }) => [name, points[0]?.share, solved])).toEqual([
      ['secant', 2 / 3, 2 / 3],
      ['bisection', 1 / 3, 1],
    ]);
    const one = await get(`/api/runs/${after.id}/profile`, { solver: 'bisection' }).expect(200);
    expect(profileView.parse(one.body).profiles).toHaveLength(1);
    await get(`/api/runs/${after.id}/profile`, { solver: 'newton' }).expect(404);
  });
});

describe('GET /api/libraries/:library/trend', () => {
  it('sums cost over what every build has solved, and leaves out what is not there', async () => {
    const { app, before, after, get } = await twoRuns();
    const { runs, builds, suites } = app.services;
    // A third build without bisection and with a new solver, on a revision in which one case has changed.
    const cases = [buildCase(), buildCase({ id: 'pole' }), buildCase({ id: 'wave', hash: 'another' })];
    suites.addRevision(actor, {
      revision: buildRevision({ revision: 'b2', cases }),
      source: '',
      builtIn: false,
      note: '',
    });
    const folder = makeBuildFolder({ solvers: [buildSolver(), buildSolver({ name: 'muller' })] });
    const third = await builds.registerFolder(actor, 'pocket-roots', { folder });
    const last = await runs.wait(runs.start(actor, { build: third.build.id, suite: 'tests' }).id);
    const read = async (query: object) =>
      trendView.parse(
        (await get('/api/libraries/pocket-roots/trend', { suite: 'tests', ...query }).expect(200)).body,
      );
    const trend = await read({});
    expect(trend.builds.map((build) => build.run)).toEqual([before.id, after.id, last.id]);
    expect(trend.solvers).toEqual([
      // `pole` failed in the second build, `wave` is another case in the third: `cubic` is left.
      {
        solver: 'secant',
        evaluations: [5, 10, 5],
        over: 1,
        solved: [3, 2, 3],
        of: 3,
        order: [1.6, 1.2, 1.6],
      },
      {
        solver: 'muller',
        evaluations: [null, null, 60],
        over: 3,
        solved: [null, null, 3],
        of: 3,
        order: [null, null, 1.6],
      },
    ]);
    const newest = await read({ builds: 1 });
    expect(newest.solvers.map(({ solver, over }) => [solver, over])).toEqual([
      ['secant', 3],
      ['muller', 3],
    ]);
    const none = await get('/api/libraries/pocket-roots/trend', { suite: 'nowhere' }).expect(404);
    expect(problem.parse(none.body).code).toBe('not_found');
  });
});
