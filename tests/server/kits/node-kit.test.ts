import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { readManifest } from '../../../server/builds/manifest.ts';
import { adapterFolder, caseOf, measureWith, remarkOf, solverOf } from '../../helpers/measuring.ts';

const kitFolder = fileURLToPath(new URL('../../../server/kits/node', import.meta.url));
const limits = { evaluations: 10, seconds: 20, readyMs: 10_000, closeMs: 3000, graceMs: 3000 };
const one = caseOf('one', { starts: [['2', '3']] });

describe('the kit for Node.js', () => {
  it('keeps what a library prints off the wire and on the log', async () => {
    const { outcomes, log } = await measureWith(
      'node $A/kit.mjs',
      [solverOf('secant', { starts: 2 })],
      [one],
      { limits },
    );
    expect(outcomes).toEqual(['solved']);
    expect(log).toBe('a library that prints\nand prints\n');
  });

  it('does not claim a root after stop, although the library swallows the exception', async () => {
    const { outcomes, started } = await measureWith(
      'node $A/kit.mjs',
      [solverOf('swallows'), solverOf('refuse')],
      [one],
      {
        limits,
      },
    );
    expect(outcomes).toEqual(['over budget', 'refused']);
    expect(started).toEqual([]);
  });

  it('fails with a reason where the solver breaks its own contract', async () => {
    const names = ['not-named', 'nothing', 'unknown'];
    const { records } = await measureWith(
      'node $A/kit.mjs',
      names.map((name) => solverOf(name)),
      [one],
      { limits },
    );
    expect(records.map((record) => remarkOf(record, 'said'))).toEqual([
      'df is not offered: name it under uses in the manifest',
      'the solver returned no number',
      'there is no solver unknown',
    ]);
  });

  it('hands over bracket, starts, settings and tolerance', async () => {
    const solver = solverOf('curious', { takes: 'both', settings: { 'max-steps': 7, mode: 'fast' } });
    const { records } = await measureWith('node $A/kit.mjs', [solver], [one], { limits });
    expect(JSON.parse(remarkOf(records[0], 'said') ?? '')).toEqual({
      bracket: [0, 3],
      starts: [2],
      settings: { 'max-steps': 7, mode: 'fast' },
      allow: 10,
      tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
    });
  });

  it('reads answers that are not finite and keeps the sign of zero', async () => {
    const pole = caseOf('pole', { equation: '1/x', roots: [], expectation: 'none' });
    const { records, solves } = await measureWith('node $A/kit.mjs', [solverOf('odd')], [pole], { limits });
    expect(remarkOf(records[0], 'said')).toBe('Infinity 0 -Infinity 1e-300');
    expect(solves[0]?.path?.events.map(({ x }) => x)).toEqual([0, Number.POSITIVE_INFINITY, -0, 1e300]);
  });

  it('serves its example', async () => {
    const manifest = readManifest(readFileSync(`${kitFolder}/example/tallyroot.yaml`, 'utf8'));
    const command = `node ${kitFolder}/example/${manifest.adapter.replace('node ', '')}`;
    const { outcomes, adapterText } = await measureWith(command, manifest.solvers, [one], { limits });
    expect(outcomes).toEqual(['solved']);
    expect(adapterText).toBe('example-roots 1.0');
  });

  it('reads lines that come in pieces, in any cut, and exits with 0 at the end of its input', () => {
    const input =
      'open 1\nsolve 1 refuse\nstart 2\nlater something\noffers f\ntolerance 0 0 0\nallow 5\ngo\nclose\n';
    const result = spawnSync('sh', ['-c', `cat | node '${adapterFolder}/kit.mjs'`], {
      input,
      encoding: 'utf8',
    });
    expect(result.stdout).toBe('ready 1 kit for Node.js\nfail 1 no\n');
    expect(result.status).toBe(0);
    const slow = `(printf 'op'; sleep 0.1; printf 'en 1\\nclo'; sleep 0.1; printf 'se\\n') | node '${adapterFolder}/kit.mjs'`;
    const pieces = spawnSync('sh', ['-c', slow], { encoding: 'utf8' });
    expect([pieces.stdout, pieces.status]).toEqual(['ready 1 kit for Node.js\n', 0]);
    const ended = spawnSync('sh', ['-c', `printf 'open 1\\n' | node '${adapterFolder}/kit.mjs'`], {
      encoding: 'utf8',
    });
    expect([ended.stdout, ended.status]).toEqual(['ready 1 kit for Node.js\n', 0]);
  });

  it('waits where its input does not block', () => {
    // A socket instead of a pipe, as Node.js itself hands one out: it is non-blocking.
    const script = `
      const { spawn } = require('node:child_process');
      const child = spawn('node', ['${adapterFolder}/kit.mjs'], { stdio: ['pipe', 'inherit', 'inherit'] });
      child.stdin.write('open 1\\n');
      setTimeout(() => child.stdin.end('close\\n'), 200);
      child.on('exit', (status) => process.exit(status));`;
    const result = spawnSync('node', ['-e', script], { encoding: 'utf8' });
    expect([result.stdout, result.status]).toEqual(['ready 1 kit for Node.js\n', 0]);
  });
});
