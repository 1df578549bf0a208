import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { allowanceRevisionView } from '../../shared/schemas/allowance-revisions.ts';
import { auditPage } from '../../shared/schemas/audit.ts';
import { buildView } from '../../shared/schemas/builds.ts';
import { libraryPage, libraryView, solverList } from '../../shared/schemas/libraries.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { referenceEntryPage, referenceRevisionView } from '../../shared/schemas/references.ts';
import { runDetail, runPage, runView, solveDetail, solvePage } from '../../shared/schemas/runs.ts';
import { suitePage, suiteRevisionView } from '../../shared/schemas/suites.ts';
import { makeBuildFolder, openTestApp, seedLibrary, type TestApp } from '../helpers/app.ts';
import { createFakeMeasuring } from '../helpers/app-fake-measuring.ts';

async function finishedRun(app: TestApp) {
  const seeded = await seedLibrary(app);
  app.services.jobRunner.start();
  const started = await request(app.app)
    .post('/api/runs')
    .send({ build: seeded.build.id, suite: 'tests' })
    .expect(201);
  const { id } = runView.parse(started.body);
  return { ...seeded, run: await app.services.runs.wait(id) };
}

const newLibrary = { slug: 'pocket-roots', name: 'Pocket roots' };

describe('POST /api/libraries', () => {
  it('creates a library that can be read at its location', async () => {
    const { app } = openTestApp();
    const created = await request(app).post('/api/libraries').send(newLibrary).expect(201);
    expect(created.headers.location).toBe('/api/libraries/pocket-roots');
    const read = await request(app)
      .get(created.headers.location ?? '')
      .expect(200);
    expect(libraryView.parse(read.body)).toEqual(libraryView.parse(created.body));
    expect(read.body).toMatchObject({ ...newLibrary, solverCount: 0, buildCount: 0, runCount: 0 });
  });

  it('answers a name that is taken with a conflict', async () => {
    const { app } = openTestApp();
    await request(app).post('/api/libraries').send(newLibrary).expect(201);
    const answer = await request(app).post('/api/libraries').send(newLibrary).expect(409);
    expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
    expect(problem.parse(answer.body)).toMatchObject({ code: 'conflict', status: 409 });
  });

  it('names every issue of a body at once, unknown keys among them', async () => {
    const { app } = openTestApp();
    const answer = await request(app)
      .post('/api/libraries')
      .send({ slug: 'Not A Slug', name: '', homepage: 'javascript:alert(1)', colour: 'red' })
      .expect(400);
    const { issues, requestId } = problem.parse(answer.body);
    expect(issues?.map((issue) => issue.path).sort()).toEqual(['', 'homepage', 'name', 'slug']);
    expect(requestId).toBe(answer.headers['x-request-id']);
  });

  it('refuses what is no JSON, and what is too large, in the same form', async () => {
    const { app } = openTestApp();
    const post = () => request(app).post('/api/libraries').set('Content-Type', 'application/json');
    const broken = await post().send('{"slug":').expect(400);
    expect(problem.parse(broken.body).code).toBe('invalid');
    const large = await post()
      .send(JSON.stringify({ ...newLibrary, description: 'x'.repeat(300_000) }))
      .expect(413);
    expect(problem.parse(large.body).code).toBe('too_large');
  });
});

describe('GET /api/libraries', () => {
  it('gives every library exactly once over its pages', async () => {
    const { app } = openTestApp();
    const slugs = ['delta', 'alpha', 'echo', 'bravo', 'charlie'];
    for (const slug of slugs) await request(app).post('/api/libraries').send({ slug, name: slug });
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const query: Record<string, string> = { limit: '2', ...(cursor === '' ? {} : { cursor }) };
      const answer = await request(app).get('/api/libraries').query(query).expect(200);
      const page = libraryPage.parse(answer.body);
      expect(page.items.length).toBeLessThanOrEqual(2);
      seen.push(...page.items.map((library) => library.slug));
      cursor = page.next;
    }
    expect(seen).toEqual(slugs.toSorted());
  });

  it('counts solvers, builds and runs of each library apart', async () => {
    const app = openTestApp();
    await finishedRun(app);
    await request(app.app).post('/api/libraries').send({ slug: 'empty', name: 'Empty' });
    const answer = await request(app.app).get('/api/libraries').expect(200);
    const counts = libraryPage
      .parse(answer.body)
      .items.map(({ slug, solverCount, buildCount, runCount }) => [slug, solverCount, buildCount, runCount]);
    expect(counts).toEqual([
      ['empty', 0, 0, 0],
      ['pocket-roots', 2, 1, 1],
    ]);
  });

  it('refuses a cursor that it did not give out', async () => {
    const { app } = openTestApp();
    const forged = Buffer.from('[1,{"a":2}]').toString('base64url');
    for (const cursor of ['nonsense', forged, ''.padEnd(900, 'A')]) {
      const answer = await request(app).get('/api/libraries').query({ cursor }).expect(400);
      expect(problem.parse(answer.body).code).toBe('invalid');
    }
  });
});

describe('POST /api/libraries/:library/builds', () => {
  it('registers a folder and takes over what it declares', async () => {
    const app = openTestApp();
    await request(app.app).post('/api/libraries').send(newLibrary);
    const folder = makeBuildFolder({});
    const answer = await request(app.app)
      .post('/api/libraries/pocket-roots/builds')
      .send({ folder, label: 'first' })
      .expect(201);
    expect(buildView.parse(answer.body)).toMatchObject({
      label: 'first',
      commit: null,
      library: 'pocket-roots',
    });
    const solvers = await request(app.app).get('/api/libraries/pocket-roots/solvers').expect(200);
    expect(solverList.parse(solvers.body).items.map((solver) => solver.name)).toEqual([
      'bisection',
      'secant',
    ]);
  });

  it('recognises a commit that the library has a build of', async () => {
    const app = openTestApp();
    await request(app.app).post('/api/libraries').send(newLibrary);
    const commit = '0123456789abcdef0123456789abcdef01234567';
    const post = (folder: string) =>
      request(app.app).post('/api/libraries/pocket-roots/builds').send({ folder, commit });
    const first = await post(makeBuildFolder({})).expect(201);
    const second = await post(makeBuildFolder({})).expect(200);
    expect(buildView.parse(second.body).id).toBe(buildView.parse(first.body).id);
    const other = await post(makeBuildFolder({ adapter: 'node other.mjs' })).expect(409);
    expect(problem.parse(other.body).detail).toMatch(/another manifest/);
  });

  it('says what is wrong with a folder', async () => {
    const app = openTestApp();
    await request(app.app).post('/api/libraries').send(newLibrary);
    for (const folder of ['relative/path', '/no/such/folder/anywhere']) {
      const answer = await request(app.app)
        .post('/api/libraries/pocket-roots/builds')
        .send({ folder })
        .expect(422);
      expect(problem.parse(answer.body).issues?.[0]?.path).toBe('folder');
    }
  });
});

describe('GET /api/suites', () => {
  it('lists suites, and sends a revision with its cases once to a client that keeps it', async () => {
    const app = openTestApp();
    await seedLibrary(app);
    const list = await request(app.app).get('/api/suites').expect(200);
    expect(suitePage.parse(list.body).items).toMatchObject([{ slug: 'tests', revision: 1, caseCount: 3 }]);
    const first = await request(app.app).get('/api/suites/tests/revisions/1').expect(200);
    expect(suiteRevisionView.parse(first.body).cases.map((item) => item.id)).toEqual([
      'cubic',
      'pole',
      'wave',
    ]);
    const tag = first.headers.etag ?? '';
    const again = await request(app.app)
      .get('/api/suites/tests/revisions/1')
      .set('If-None-Match', tag)
      .expect(304);
    expect(again.text).toBe('');
    await request(app.app).get('/api/suites/tests/revisions/2').expect(404);
  });
});

describe('/api/runs', () => {
  it('starts a run, lists it, and shows its solves and their paths', async () => {
    const app = openTestApp();
    const { run } = await finishedRun(app);
    const list = await request(app.app).get('/api/runs').query({ library: 'pocket-roots' }).expect(200);
    expect(runPage.parse(list.body).items).toEqual([run]);
    const detail = await request(app.app).get(`/api/runs/${run.id}`).expect(200);
    expect(runDetail.parse(detail.body)).toMatchObject({ adapterText: 'fake 1.0', progress: { stored: 6 } });
    const solves = await request(app.app).get(`/api/runs/${run.id}/solves`).expect(200);
    const [first] = solvePage.parse(solves.body).items;
    const solve = await request(app.app).get(`/api/solves/${first?.id}`).expect(200);
    expect(solveDetail.parse(solve.body)).toMatchObject({ run: run.id, declaration: { name: 'secant' } });
  });

  it('refuses settings out of range, solvers that are not declared and suites that do not exist', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app);
    const post = (body: object) =>
      request(app.app)
        .post('/api/runs')
        .send({ build: build.id, suite: 'tests', ...body });
    const settings = await post({ settings: { lanes: 0, seconds: -1, speed: 9 } }).expect(400);
    expect(problem.parse(settings.body).issues).toHaveLength(3);
    const solvers = await post({ solvers: ['secant', 'newton'] }).expect(422);
    expect(problem.parse(solvers.body).detail).toMatch(/does not declare newton/);
    await post({ suite: 'nowhere' }).expect(404);
    await post({ against: { kind: 'run', run: 99 } }).expect(404);
  });

  it('cancels a run once', async () => {
    const app = openTestApp({ measuring: createFakeMeasuring({ delayMs: 50 }) });
    const { build } = await seedLibrary(app);
    const { id } = app.services.runs.start({ name: 'local' }, { build: build.id, suite: 'tests' });
    const answer = await request(app.app).post(`/api/runs/${id}/cancel`).expect(200);
    expect(runView.parse(answer.body).status).toBe('cancelled');
    await request(app.app).post(`/api/runs/${id}/cancel`).expect(409);
    const again = await request(app.app).post(`/api/runs/${id}/again`).expect(201);
    expect(runView.parse(again.body)).toMatchObject({ id: id + 1, status: 'queued' });
  });
});

describe('GET /api/runs/:run/solves', () => {
  const names = (body: unknown) =>
    solvePage.parse(body).items.map((solve) => `${solve.solver} ${solve.case}`);

  it('filters by solver, outcome, trait, case and text', async () => {
    const shape = (record: { case: string }) =>
      record.case === 'pole' ? { outcome: 'refused' as const } : {};
    const app = openTestApp({ measuring: createFakeMeasuring({ shape }) });
    const { run } = await finishedRun(app);
    const get = (query: string) => request(app.app).get(`/api/runs/${run.id}/solves?${query}`).expect(200);
    expect(names((await get('solver=bisection&outcome=solved')).body)).toEqual([
      'bisection cubic',
      'bisection wave',
    ]);
    expect(names((await get('outcome=refused&outcome=crashed')).body)).toEqual([
      'secant pole',
      'bisection pole',
    ]);
    expect(names((await get('trait=oscillating')).body)).toEqual(['secant wave', 'bisection wave']);
    expect(names((await get('case=cubic&solver=secant')).body)).toEqual(['secant cubic']);
    expect(names((await get('text=SIN(')).body)).toEqual(['secant wave', 'bisection wave']);
    expect(names((await get('text=nothing')).body)).toEqual([]);
    await request(app.app).get(`/api/runs/${run.id}/solves?solver=newton`).expect(404);
    await request(app.app).get(`/api/runs/${run.id}/solves?colour=red`).expect(400);
  });

  it.each(['solver', 'case', 'evaluations', 'iterations', 'digits', 'order', 'elapsed'])(
    'pages in the order of %s, up and down, without loss and without repeats',
    async (sort) => {
      // Some values are missing and some are equal, which is where paging goes wrong.
      const shape = (record: { case: string; solver: string }) =>
        record.case === 'wave'
          ? { digits: null, iterations: null, iterationsFrom: null }
          : { digits: record.solver === 'secant' ? 12.5 : 3, elapsedMs: 0.125 };
      const app = openTestApp({ measuring: createFakeMeasuring({ shape }) });
      const { run } = await finishedRun(app);
      const all = app.services.solves.list(run.id, { limit: 500, sort: 'solver', direction: 'up' }).items;
      const orders: number[][] = [];
      for (const direction of ['up', 'down']) {
        const seen: number[] = [];
        let cursor: string | null | undefined;
        do {
          const answer = await request(app.app)
            .get(`/api/runs/${run.id}/solves`)
            .query({ sort, direction, limit: 2, ...(cursor ? { cursor } : {}) })
            .expect(200);
          const page = solvePage.parse(answer.body);
          seen.push(...page.items.map((solve) => solve.id));
          cursor = page.next;
        } while (cursor);
        expect(seen.toSorted((a, b) => a - b)).toEqual(
          all.map((solve) => solve.id).toSorted((a, b) => a - b),
        );
        orders.push(seen);
      }
      expect(orders[1]).toEqual(orders[0]?.toReversed());
    },
  );
});

describe('/api/libraries/:library/references', () => {
  it('makes a finished run the first reference, once, and shows every entry with who, when and why', async () => {
    const app = openTestApp();
    const { run } = await finishedRun(app);
    const post = () =>
      request(app.app)
        .post('/api/libraries/pocket-roots/references')
        .send({ run: run.id, reason: 'Agreed on Monday.' });
    const set = await post().expect(201);
    const revision = referenceRevisionView.parse(set.body);
    expect(revision).toMatchObject({ number: 1, platform: 'linux-x64', changed: 6, parent: null });
    await post().expect(409);
    const seen: string[] = [];
    let cursor: string | null | undefined;
    do {
      const answer = await request(app.app)
        .get(`/api/references/${revision.id}/entries`)
        .query({ limit: 4, ...(cursor ? { cursor } : {}) })
        .expect(200);
      const page = referenceEntryPage.parse(answer.body);
      for (const entry of page.items) {
        expect(entry).toMatchObject({
          reason: 'Agreed on Monday.',
          decidedBy: 'Wren Tolliver',
          since: 1,
          run: run.id,
        });
        seen.push(`${entry.solver} ${entry.case}`);
      }
      cursor = page.next;
    } while (cursor);
    expect(seen).toEqual([
      'bisection cubic',
      'bisection pole',
      'bisection wave',
      'secant cubic',
      'secant pole',
      'secant wave',
    ]);
    const one = await request(app.app).get(`/api/references/${revision.id}`).expect(200);
    await request(app.app)
      .get(`/api/references/${revision.id}`)
      .set('If-None-Match', one.headers.etag ?? '')
      .expect(304);
  });

  it('wants a reason', async () => {
    const app = openTestApp();
    const { run } = await finishedRun(app);
    await request(app.app)
      .post('/api/libraries/pocket-roots/references')
      .send({ run: run.id, reason: '  ' })
      .expect(400);
  });
});

describe('reference chain', () => {
  it('keeps what older revisions said when a newer one changes and takes out entries', async () => {
    const app = openTestApp();
    const { run, build } = await finishedRun(app);
    const { references, runs, solves } = app.services;
    const actor = { name: 'local' };
    const first = references.setFirst(actor, 'pocket-roots', { run: run.id, reason: 'first' });
    const next = await runs.wait(runs.start(actor, { build: build.id, suite: 'tests' }).id);
    const [solve] = solves.list(next.id, { limit: 1, sort: 'solver', direction: 'up' }).items;
    const second = references.append(actor, first.id, {
      run: next.id,
      reason: 'one anew, one out',
      entries: [
        { solver: 'secant', case: 'cubic', start: 0, solveId: solve?.id ?? 0 },
        { solver: 'secant', case: 'pole', start: 0, solveId: null },
      ],
    });
    const before = references.readEntries(first.id);
    const after = references.readEntries(second.id);
    expect(before.map((entry) => entry.run)).toEqual(Array(6).fill(run.id));
    expect(after).toHaveLength(5);
    expect(after.find((entry) => entry.solver === 'secant' && entry.case === 'cubic')).toMatchObject({
      run: next.id,
      since: 2,
      reason: 'one anew, one out',
    });
    expect(after.filter((entry) => entry.since === 1)).toHaveLength(4);
    expect(second).toMatchObject({ number: 2, parent: first.id, changed: 2 });
    const stale = () => references.append(actor, first.id, { run: null, reason: 'late', entries: [] });
    expect(stale).toThrow(/changed meanwhile/);
  });
});

describe('/api/libraries/:library/allowances', () => {
  it('starts from the default, keeps every revision, and does not let authors undo each other unseen', async () => {
    const { app } = openTestApp();
    await request(app).post('/api/libraries').send(newLibrary);
    const address = '/api/libraries/pocket-roots/allowances';
    const initial = allowanceRevisionView.parse((await request(app).get(address).expect(200)).body);
    expect(initial).toMatchObject({ number: 0, allowances: { base: { broke: 0, totalPercent: 2 } } });
    const body = {
      allowances: {
        base: { ...initial.allowances.base, totalPercent: 5 },
        solvers: { secant: { broke: 1 } },
      },
      reason: 'Hybrid is being rewritten.',
      basedOn: 0,
    };
    const set = allowanceRevisionView.parse((await request(app).put(address).send(body).expect(200)).body);
    expect(set).toMatchObject({
      number: 1,
      allowances: { base: { totalPercent: 5 }, solvers: { secant: { broke: 1 } } },
    });
    await request(app).put(address).send(body).expect(409);
    const old = await request(app).get(`${address}/revisions/0`).expect(200);
    expect(allowanceRevisionView.parse(old.body)).toEqual(initial);
    await request(app).get(`${address}/revisions/2`).expect(404);
  });
});

describe('GET /api/audit-log', () => {
  it('says who did what, newest first, for one library or all', async () => {
    const app = openTestApp();
    await finishedRun(app);
    await request(app.app).post('/api/libraries').send({ slug: 'other', name: 'Other' });
    const all = auditPage.parse((await request(app.app).get('/api/audit-log').expect(200)).body);
    expect(all.items.map((entry) => entry.action)).toEqual([
      'library created',
      'run started',
      'build registered',
      'suite revision added',
      'library created',
    ]);
    const one = await request(app.app).get('/api/audit-log').query({ library: 'pocket-roots' }).expect(200);
    expect(auditPage.parse(one.body).items.map((entry) => entry.library)).toEqual(
      Array(3).fill('pocket-roots'),
    );
  });
});
