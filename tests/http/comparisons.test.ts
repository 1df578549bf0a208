import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { comparisonView, pairPage } from '../../shared/schemas/comparisons.ts';
import { problem } from '../../shared/schemas/problem.ts';
import type { SolveRecord } from '../../shared/schemas/solve.ts';
import { solveStripList } from '../../shared/schemas/strips.ts';
import { makeBuildFolder, openTestApp, seedLibrary } from '../helpers/app.ts';
import { createFakeMeasuring } from '../helpers/app-fake-measuring.ts';
import { buildRevision, buildSolver } from '../helpers/builders.ts';

const actor = { name: 'local' };

/** The changed build asks twice on one case, fails on another, and is the same elsewhere. */
function shape(record: SolveRecord, salt: string): Partial<SolveRecord> {
  if (salt !== 'changed' || record.solver !== 'secant') return {};
  if (record.case === 'cubic')
    return { evaluations: record.evaluations + 9, f: record.f + 9, pathHash: 'cd'.repeat(32) };
  if (record.case === 'pole')
    return {
      outcome: 'refused',
      root: null,
      error: null,
      digits: null,
      ulps: null,
      pathHash: 'ef'.repeat(32),
    };
  return {};
}

async function twoRuns() {
  const app = openTestApp({ measuring: createFakeMeasuring({ shape }) });
  const { build } = await seedLibrary(app);
  const { runs, builds, references, jobRunner } = app.services;
  jobRunner.start();
  const before = await runs.wait(runs.start(actor, { build: build.id, suite: 'tests' }).id);
  const reference = references.setFirst(actor, 'pocket-roots', { run: before.id, reason: 'agreed' });
  const folder = makeBuildFolder({ files: { salt: 'changed' } });
  const changed = await builds.registerFolder(actor, 'pocket-roots', { folder, label: 'changed' });
  const after = await runs.wait(runs.start(actor, { build: changed.build.id, suite: 'tests' }).id);
  return { app, before, after, reference };
}

describe('GET /api/comparisons', () => {
  it('says the same against a run as against the reference results made from it', async () => {
    const { app, before, after, reference } = await twoRuns();
    const get = async (query: object) => {
      const answer = await request(app.app)
        .get('/api/comparisons')
        .query({ candidate: after.id, ...query })
        .expect(200);
      return comparisonView.parse(answer.body);
    };
    const byRun = await get({ reference: before.id });
    expect(byRun).toMatchObject({ verdict: 'beyond allowances', exact: true, pairs: 6, allowances: 0 });
    expect(byRun.changes).toEqual({ broke: 1, costlier: 1, same: 4 });
    expect(byRun.candidate).toMatchObject({ run: after.id, build: { label: 'changed' }, solves: 6 });
    const byReference = await get({ revision: reference.id });
    expect({ ...byReference, reference: null }).toEqual({ ...byRun, reference: null });
    expect(byReference.reference).toMatchObject({
      revision: reference.id,
      run: before.id,
      label: 'reference 1',
    });
  });

  it('judges by the allowances of a given number, or by those that hold now', async () => {
    const { app, after, reference } = await twoRuns();
    const { allowances } = app.services;
    const lenient = {
      broke: null,
      caseEvaluations: null,
      totalPercent: null,
      digits: null,
      orderUnder: null,
    };
    allowances.set(actor, 'pocket-roots', {
      allowances: {
        base: { ...allowances.get('pocket-roots').allowances.base, ...lenient },
        solvers: {},
        traits: {},
      },
      reason: 'anything goes for now',
      basedOn: 0,
    });
    const query = { candidate: after.id, revision: reference.id };
    const now = await request(app.app).get('/api/comparisons').query(query).expect(200);
    expect(comparisonView.parse(now.body)).toMatchObject({ verdict: 'within allowances', allowances: 1 });
    const then = await request(app.app)
      .get('/api/comparisons')
      .query({ ...query, allowances: 0 });
    expect(comparisonView.parse(then.body)).toMatchObject({ verdict: 'beyond allowances', allowances: 0 });
  });

  it('wants one reference, of the same library and suite', async () => {
    const { app, before, after, reference } = await twoRuns();
    const get = (query: object) => request(app.app).get('/api/comparisons').query(query);
    await get({ candidate: after.id }).expect(400);
    await get({ candidate: after.id, reference: before.id, revision: reference.id }).expect(400);
    await get({ candidate: after.id, reference: 99 }).expect(404);
    app.services.suites.addRevision(actor, {
      revision: buildRevision({ id: 'other-suite' }),
      source: '',
      builtIn: false,
      note: '',
    });
    const other = app.services.runs.start(actor, { build: 1, suite: 'other-suite' });
    const answer = await get({ candidate: other.id, reference: before.id }).expect(422);
    expect(problem.parse(answer.body).detail).toMatch(/different suites/);
  });

  it('could not tell where the candidate has no results yet', async () => {
    const { app, before } = await twoRuns();
    await app.services.jobRunner.stop();
    const waiting = app.services.runs.start(actor, { build: 1, suite: 'tests' });
    const answer = await request(app.app)
      .get('/api/comparisons')
      .query({ candidate: waiting.id, reference: before.id })
      .expect(200);
    const view = comparisonView.parse(answer.body);
    expect(view).toMatchObject({ verdict: 'could not tell', candidate: { status: 'queued', solves: 0 } });
    expect(view.notCompared).toHaveLength(6);
  });
});

describe('GET /api/comparisons/pairs', () => {
  it('puts changed pairs first, with both solves and their steadiness', async () => {
    const { app, after, reference } = await twoRuns();
    const answer = await request(app.app)
      .get('/api/comparisons/pairs')
      .query({ candidate: after.id, revision: reference.id })
      .expect(200);
    const { items } = pairPage.parse(answer.body);
    expect(items.map((pair) => `${pair.change} ${pair.solver} ${pair.case}`)).toEqual([
      'broke secant pole',
      'costlier secant cubic',
      'same secant wave',
      'same bisection cubic',
      'same bisection pole',
      'same bisection wave',
    ]);
    expect(items[1]).toMatchObject({ difference: 9, candidate: { steady: true } });
    const solve = await request(app.app).get(`/api/solves/${items[1]?.candidate?.id}`).expect(200);
    expect(solve.body).toMatchObject({ run: after.id, solver: 'secant', case: 'cubic' });
  });

  it('filters on the server and pages through what is left', async () => {
    const { app, after, reference } = await twoRuns();
    const get = async (query: object) => {
      const answer = await request(app.app)
        .get('/api/comparisons/pairs')
        .query({ candidate: after.id, revision: reference.id, ...query })
        .expect(200);
      return pairPage.parse(answer.body);
    };
    expect((await get({ change: ['broke', 'costlier'] })).items).toHaveLength(2);
    expect((await get({ solver: 'bisection', case: 'wave' })).items).toHaveLength(1);
    expect((await get({ trait: 'pole', text: 'SECANT' })).items.map((pair) => pair.change)).toEqual([
      'broke',
    ]);
    const first = await get({ limit: 4, sort: 'suite' });
    const second = await get({ limit: 4, sort: 'suite', cursor: first.next ?? '' });
    expect([...first.items, ...second.items].map((pair) => pair.key)).toEqual(
      (await get({ sort: 'suite' })).items.map((pair) => pair.key),
    );
    expect(second.next).toBeNull();
  });

  it('pairs a solver that was renamed with its earlier name, and confirms what it did differently', async () => {
    const app = openTestApp();
    const { build } = await seedLibrary(app, makeBuildFolder({ solvers: [buildSolver({ name: 'old' })] }));
    const { runs, builds, jobRunner } = app.services;
    jobRunner.start();
    const before = await runs.wait(runs.start(actor, { build: build.id, suite: 'tests' }).id);
    const folder = makeBuildFolder({ solvers: [buildSolver({ name: 'renamed', aliases: ['old'] })] });
    const renamed = await builds.registerFolder(actor, 'pocket-roots', { folder });
    const against = { kind: 'run' as const, run: before.id };
    const after = await runs.wait(runs.start(actor, { build: renamed.build.id, suite: 'tests', against }).id);
    // The stand-in's paths depend on the solver's name, so all three differ.
    expect(after.progress).toMatchObject({ toConfirm: 3, confirmed: 3 });
    const answer = await request(app.app)
      .get('/api/comparisons/pairs')
      .query({ candidate: after.id, reference: before.id })
      .expect(200);
    const { items } = pairPage.parse(answer.body);
    expect(items.map((pair) => [pair.solver, pair.formerly])).toEqual(Array(3).fill(['renamed', 'old']));
  });
});

describe('GET /api/strips', () => {
  it('gives strips of solves of several runs in the order asked for, and leaves out what is not there', async () => {
    const { app, before, after } = await twoRuns();
    const [first] = app.services.solves.list(before.id, { limit: 1, sort: 'case', direction: 'up' }).items;
    const [second] = app.services.solves.list(after.id, { limit: 1, sort: 'case', direction: 'up' }).items;
    const answer = await request(app.app)
      .get('/api/strips')
      .query({ solves: `${second?.id},999999,${first?.id}` })
      .expect(200);
    const { items } = solveStripList.parse(answer.body);
    expect(items.map((item) => item.solve)).toEqual([second?.id, first?.id]);
    const path = app.services.solves.readPath(first?.id ?? 0);
    expect(items[1]?.events).toHaveLength(path?.events.length ?? -1);
  });

  it('refuses a list that is none, or too long', async () => {
    const { app } = await twoRuns();
    for (const solves of ['1,x', '', Array.from({ length: 201 }, (_, i) => i + 1).join(',')]) {
      await request(app.app).get('/api/strips').query({ solves }).expect(400);
    }
  });
});
