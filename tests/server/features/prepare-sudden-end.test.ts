import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it, vi } from 'vitest';
import { openServices } from '../../../server/open-services.ts';
import { scratchFolder } from '../../helpers/app.ts';
import { tarOf } from '../../helpers/archives.ts';

const actor = { name: 'local' };

function isAlive(pid: number): boolean {
  try {
    return readFileSync(`/proc/${pid}/stat`, 'utf8').split(' ')[2] !== 'Z';
  } catch {
    return false;
  }
}

describe('a build whose server is killed while it is prepared', () => {
  it('is prepared anew from its files as they came, and nothing of the first attempt goes on', async () => {
    const folder = path.join(scratchFolder, 'prepare');
    mkdirSync(folder);
    const witness = path.join(folder, 'witness');
    const line = `test ! -e half; echo $? $$ >> ${witness}; touch half; test -e ${folder}/second || sleep 60; touch whole`;
    const manifest = `format: 1\nlibrary: L\nprepare: [${JSON.stringify(line)}]\nadapter: node a.mjs\nsolvers: [{ name: s, takes: bracket }]\n`;
    const databaseFile = path.join(folder, 'tallyroot.db');
    const first = openServices({ databaseFile, lanes: 1, hasBuiltInSuites: false, onJobError: () => {} });
    const { libraries, buildPreviews, builds } = first.services;
    libraries.create(actor, { slug: 'l', name: 'L', description: '', homepage: null });
    const file = path.join(folder, 'upload');
    writeFileSync(file, tarOf({ name: 'tallyroot.yaml', body: manifest }));
    const preview = await buildPreviews.fromArchive(actor, 'l', { file, name: 'l.tar' });
    const { build } = await builds.registerPreview(actor, 'l', { preview: preview.id });
    const program = fileURLToPath(new URL('../../helpers/app-real-worker.ts', import.meta.url));
    const child = spawn(process.execPath, ['--import', 'tsx', program, databaseFile], { stdio: 'ignore' });
    await vi.waitFor(() => expect(readFileSync(witness, 'utf8')).toMatch(/\n/), { timeout: 60_000 });
    child.kill('SIGKILL');
    await new Promise((resolve) => child.on('exit', resolve));
    expect(builds.get(build.id).state).toBe('preparing');
    const abandoned = builds.get(build.id).folder;
    writeFileSync(path.join(folder, 'second'), '');
    first.services.jobRunner.start();
    await vi.waitFor(() => expect(builds.get(build.id).state).toBe('ready'), { timeout: 60_000 });
    await first.services.jobRunner.stop();
    const attempts = readFileSync(witness, 'utf8').trim().split('\n');
    // Each found no half-made file, so the second did not go on in the folder of the first.
    expect(attempts.map((attempt) => attempt.split(' ')[0])).toEqual(['0', '0']);
    const pids = attempts.map((attempt) => Number(attempt.split(' ')[1]));
    await vi.waitFor(() => expect(pids.filter(isAlive)).toEqual([]), { timeout: 10_000 });
    const { folder: made } = builds.get(build.id);
    expect(readdirSync(made).sort()).toEqual(['half', 'tallyroot.yaml', 'whole']);
    expect(existsSync(abandoned)).toBe(false);
    const notes = first.services.buildLogs.get(build.id).pieces.filter((piece) => piece.kind === 'note');
    expect(notes[0]?.text).toBe('It begins again.');
    first.client.close();
  }, 120_000);
});
