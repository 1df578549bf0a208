import { execFileSync } from 'node:child_process';
import { appendFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { makeBuildFolder, openTestApp } from '../../helpers/app.ts';

const actor = { name: 'local' };

function git(folder: string, ...words: string[]): string {
  const who = ['-c', 'user.name=Tester', '-c', 'user.email=tester@example.org', '-c', 'commit.gpgsign=false'];
  return execFileSync('git', [...who, ...words], { cwd: folder, encoding: 'utf8' }).trim();
}

function makeCheckout(): { folder: string; commit: string } {
  const folder = makeBuildFolder({ files: { 'adapter.mjs': '// nothing yet\n' } });
  git(folder, 'init', '-q');
  git(folder, 'add', '.');
  git(folder, 'commit', '-q', '-m', 'first');
  return { folder, commit: git(folder, 'rev-parse', 'HEAD') };
}

function openLibrary() {
  const app = openTestApp();
  const { libraries, builds } = app.services;
  libraries.create(actor, { slug: 'pocket-roots', name: 'Pocket roots', description: '', homepage: null });
  const register = (folder: string, body: { commit?: string; label?: string } = {}) =>
    builds.registerFolder(actor, 'pocket-roots', { folder, ...body });
  return { ...app, builds, register };
}

describe('builds service', () => {
  it('reads the commit of a clean checkout and takes it for the label', async () => {
    const { register } = openLibrary();
    const { folder, commit } = makeCheckout();
    const { build } = await register(folder);
    expect(build).toMatchObject({ commit, label: commit.slice(0, 12) });
    writeFileSync(path.join(folder, 'built.o'), 'what preparing leaves does not count');
    expect(await register(folder)).toMatchObject({ isNew: false, build: { id: build.id } });
  });

  it('gives a checkout with changes no commit, and refuses one that is stated for it', async () => {
    const { register } = openLibrary();
    const { folder, commit } = makeCheckout();
    appendFileSync(path.join(folder, 'adapter.mjs'), '// changed\n');
    expect((await register(folder)).build.commit).toBeNull();
    await expect(register(folder, { commit })).rejects.toThrow(/changes on top of its commit/);
  });

  it('refuses a stated commit that is not the one checked out', async () => {
    const { register } = openLibrary();
    const { folder } = makeCheckout();
    await expect(register(folder, { commit: 'f'.repeat(40) })).rejects.toThrow(/holds commit/);
  });

  it('does not take a folder inside a checkout for the checkout', async () => {
    const { register } = openLibrary();
    const { folder } = makeCheckout();
    execFileSync('mkdir', ['inner'], { cwd: folder });
    const manifest = execFileSync('cat', ['tallyroot.yaml'], { cwd: folder });
    writeFileSync(path.join(folder, 'inner', 'tallyroot.yaml'), manifest);
    expect((await register(path.join(folder, 'inner'))).build).toMatchObject({
      commit: null,
      label: 'inner',
    });
  });

  it('notices before a run that the folder has moved on, or has been changed', async () => {
    const { builds, register } = openLibrary();
    const { folder } = makeCheckout();
    const { build } = await register(folder);
    const row = builds.require(build.id);
    await expect(builds.check(row)).resolves.toBeUndefined();
    appendFileSync(path.join(folder, 'adapter.mjs'), '// changed\n');
    await expect(builds.check(row)).rejects.toThrow(/changes on top/);
    git(folder, 'commit', '-q', '-a', '-m', 'second');
    await expect(builds.check(row)).rejects.toThrow(/now holds commit/);
  });

  it('keeps solvers that a later build leaves out, as no longer declared', async () => {
    const { services, register } = openLibrary();
    const { build } = await register(makeBuildFolder({}));
    await register(makeBuildFolder({ solvers: build.recipe.solvers.slice(0, 1) }));
    const list = services.solvers.list('pocket-roots').items;
    expect(list.map(({ name, declared }) => [name, declared])).toEqual([
      ['bisection', false],
      ['secant', true],
    ]);
  });
});

describe('suites service', () => {
  it('adds a revision only where the hash is new, and never changes an older one', async () => {
    const { services } = openLibrary();
    const { buildRevision, buildCase } = await import('../../helpers/builders.ts');
    const add = (revision: string, cases = [buildCase()]) =>
      services.suites.addRevision(actor, {
        revision: buildRevision({ revision, cases }),
        source: revision,
        builtIn: true,
        note: '',
      });
    expect(add('one')).toMatchObject({ isNew: true, summary: { number: 1 } });
    const before = services.suites.getRevision('tests', 1);
    expect(add('two', [buildCase(), buildCase({ id: 'more' })])).toMatchObject({ summary: { number: 2 } });
    expect(add('one')).toMatchObject({ isNew: false, summary: { number: 1 } });
    expect(services.suites.get('tests')).toMatchObject({ revision: 2, caseCount: 2 });
    expect(services.suites.getRevision('tests', 1)).toEqual(before);
  });
});
