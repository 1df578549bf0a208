import { mkdir, mkdtemp, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { execa } from 'execa';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openBuildFolder } from '../../../server/builds/measured-folder.ts';

const manifest = 'format: 1\nlibrary: L\nadapter: a\nsolvers:\n  - { name: s, takes: bracket }\n';
let root = '';

beforeEach(async () => {
  root = await mkdtemp(join(tmpdir(), 'folder-test-'));
});
afterEach(async () => {
  await rm(root, { recursive: true, force: true });
});

async function git(...argv: string[]): Promise<string> {
  const who = ['-c', 'user.name=Test', '-c', 'user.email=test@example.org'];
  return (await execa('git', [...who, ...argv], { cwd: root })).stdout;
}

describe('openBuildFolder', () => {
  it('reads the manifest of a plain folder and takes its name as the label', async () => {
    const folder = join(root, 'pocket-roots');
    await mkdir(folder);
    await writeFile(join(folder, 'tallyroot.yaml'), manifest);
    await symlink(folder, join(root, 'link'));
    const opened = await openBuildFolder(join(root, 'link'));
    expect(opened).toMatchObject({ commit: null, label: 'pocket-roots', manifestText: manifest });
    expect(opened.manifest.solvers).toHaveLength(1);
  });

  it('knows the commit of a clean checkout and of no other', async () => {
    await writeFile(join(root, 'tallyroot.yaml'), manifest);
    await git('init', '-q');
    await git('add', '.');
    await git('commit', '-q', '-m', 'first');
    const commit = await git('rev-parse', 'HEAD');
    expect(await openBuildFolder(root)).toMatchObject({ commit, label: commit.slice(0, 10) });
    await writeFile(join(root, 'changed'), 'x');
    expect(await openBuildFolder(root)).toMatchObject({ commit: null });
  });

  it('does not take the commit of a checkout that the folder only lies in', async () => {
    await mkdir(join(root, 'inner'));
    await writeFile(join(root, 'inner', 'tallyroot.yaml'), manifest);
    await git('init', '-q');
    await git('add', '.');
    await git('commit', '-q', '-m', 'first');
    expect(await openBuildFolder(join(root, 'inner'))).toMatchObject({ commit: null, label: 'inner' });
  });

  it('says what is missing', async () => {
    await expect(openBuildFolder(join(root, 'nowhere'))).rejects.toMatchObject({ code: 'not_found' });
    await expect(openBuildFolder(root)).rejects.toMatchObject({ code: 'not_found' });
    await writeFile(join(root, 'tallyroot.yaml'), 'format: 3\n');
    await expect(openBuildFolder(root)).rejects.toMatchObject({ code: 'invalid' });
  });
});
