import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { describeExit, shellLine } from '../../../server/runner/adapter-environment.ts';
import { LogTail } from '../../../server/runner/log-tail.ts';
import { AdapterProcess } from '../../../server/runner/process.ts';
import { caseOf, isRunning, measureUnruly, measureWith, solverOf } from '../../helpers/measuring.ts';

describe('shellLine', () => {
  it.each([
    'node adapter.mjs',
    'octave-cli adapter.m 3>&1 1>&2',
    './adapter "with blanks"',
    "python3 -c 'import a; a.run()'",
    'R --no-echo -f adapter.R $EXTRA',
    'sh adapter.sh <input 2>log',
    'ocaml a\\ b.ml # note',
  ])('puts exec before one plain command: %s', (line) => {
    expect(shellLine(` ${line} `)).toEqual({ line: `exec ${line}`, isPlain: true });
  });

  it.each([
    'cd tally && node adapter.mjs',
    'make; ./adapter',
    './adapter | tee log',
    './adapter &',
    'THREADS=1 ./adapter',
    'exec ./adapter',
    '. ./setup.sh',
    'if true',
    '(cd tally; ./adapter)',
    './adapter $(cat options)',
    './adapter "`cat options`"',
    '>log ./adapter',
    './adapter "not closed',
    '',
  ])('leaves another line as it is: %s', (line) => {
    expect(shellLine(line)).toEqual({ line, isPlain: false });
  });
});

describe('describeExit', () => {
  it('shows a status above 128 as a signal only where a shell gave it', () => {
    expect(describeExit({ status: 139, signal: null }, true)).toBe('ended by signal SIGSEGV');
    expect(describeExit({ status: 139, signal: null }, false)).toBe('exit status 139');
    expect(describeExit({ status: null, signal: 'SIGKILL' }, false)).toBe('ended by signal SIGKILL');
    expect(describeExit({ status: 255, signal: null }, true)).toBe('exit status 255');
  });
});

describe('LogTail', () => {
  it('keeps the last bytes and says that others are missing', () => {
    const tail = new LogTail(10);
    tail.push(Buffer.from('0123456'));
    expect(tail.text()).toBe('0123456');
    tail.push(Buffer.from('789abc'));
    expect(tail.text()).toBe('[earlier lines are not kept]\n3456789abc');
    tail.push(Buffer.from('x'.repeat(25)));
    expect(tail.text()).toBe(`[earlier lines are not kept]\n${'x'.repeat(10)}`);
  });
});

describe('AdapterProcess', () => {
  const openEnds = (): number => readdirSync('/proc/self/fd').length;

  it('gives back every descriptor and its scratch folder', async () => {
    const options = { folder: tmpdir(), environment: {}, killAfterMs: 100 };
    await (await startAndEnd({ ...options, command: 'cat' })).dispose();
    const before = openEnds();
    for (let count = 0; count < 5; count += 1) {
      const adapter = await startAndEnd({ ...options, command: 'cat' });
      adapter.dispose();
      expect(existsSync(adapter.inPath)).toBe(false);
    }
    expect(openEnds()).toBe(before);
  });

  it('does not fail where the folder does not exist', async () => {
    const adapter = await AdapterProcess.start({
      command: 'true',
      folder: '/no/such/folder',
      environment: {},
      killAfterMs: 100,
    });
    expect(await adapter.waitForExit(2000)).toBe(true);
    await adapter.end();
    expect(adapter.log()).toContain('ENOENT');
    adapter.dispose();
  });

  async function startAndEnd(options: Parameters<typeof AdapterProcess.start>[0]): Promise<AdapterProcess> {
    const adapter = await AdapterProcess.start(options);
    await adapter.end();
    expect(isRunning(adapter.group)).toBe(false);
    return adapter;
  }
});

describe('adapters', () => {
  it('are asked to close at the end and exit by themselves', async () => {
    const command = 'sh $A/unruly.sh; echo "$?" >status; cat status >&2';
    const { log } = await measureWith(command, [solverOf('good')], [caseOf('one')]);
    expect(log).toBe('0\n');
  });

  it('leave nothing behind that had left their group and cleared nothing of their environment', async () => {
    const command = 'setsid sh -c "echo \\$\\$ >>children; exec sleep 60" & exec sh $A/unruly.sh';
    const { outcomes, children } = await measureWith(command, [solverOf('good')], [caseOf('one')]);
    expect(outcomes).toEqual(['solved']);
    expect(children).toHaveLength(1);
    expect(children.filter(isRunning)).toEqual([]);
  });

  it('end when the run is cancelled, and what was measured is kept', async () => {
    const cancel = new AbortController();
    const changes = { signal: cancel.signal, onStart: onHang(() => cancel.abort()), limits: { seconds: 60 } };
    const { stopped, outcomes, started } = await measureUnruly(['good', 'hang', 'good'], 1, changes);
    expect(stopped).toBe('The run was cancelled.');
    expect(outcomes).toEqual(['solved']);
    expect(started.filter(isRunning)).toEqual([]);
  });

  it('end when the time of the whole run is over', async () => {
    const limits = { seconds: 60, runSeconds: 0.5 };
    const { stopped, outcomes, started } = await measureUnruly(['hang'], 1, { limits });
    expect(stopped).toBe("The run's time of 0.5 s is over.");
    expect(outcomes).toEqual([]);
    expect(started.filter(isRunning)).toEqual([]);
  });
});

function onHang(act: () => void): (solver: { name: string }) => void {
  return ({ name }) => {
    if (name === 'hang') setTimeout(act, 100);
  };
}

describe('when Tallyroot is killed', () => {
  let scratch = '';
  beforeEach(() => {
    scratch = mkdtempSync(join(tmpdir(), 'killed-'));
  });
  afterEach(() => rmSync(scratch, { recursive: true, force: true }));

  const program = fileURLToPath(new URL('../../helpers/measure-forever.ts', import.meta.url));

  async function eventually(what: () => boolean): Promise<boolean> {
    for (let tries = 0; tries < 1000; tries += 1) {
      if (what()) return true;
      await new Promise((resolve) => setTimeout(resolve, 25));
    }
    return false;
  }

  /** Lines of a file of the build's folder, which lies somewhere in the scratch folder. */
  function linesOf(name: string): number[] {
    const folder = readdirSync(scratch).find((entry) => entry.startsWith('measuring-'));
    const file = join(scratch, folder ?? '', name);
    return existsSync(file) ? readFileSync(file, 'utf8').split('\n').filter(Boolean).map(Number) : [];
  }

  it.each(['hang', 'stubborn'])(
    'with SIGKILL its adapters and their children end too: %s',
    async (solver) => {
      const env = { ...process.env, TMPDIR: scratch };
      const child = spawn('node', ['--import', 'tsx', program, solver], { env, stdio: 'ignore' });
      const wanted = solver === 'stubborn' ? 'children' : 'started';
      expect(await eventually(() => linesOf(wanted).length > 0)).toBe(true);
      const all = [...linesOf('started'), ...linesOf('children')];
      // The adapter is in the middle of its solve, not on its way there.
      await new Promise((resolve) => setTimeout(resolve, 200));
      expect(all.filter(isRunning)).toEqual(all);
      child.kill('SIGKILL');
      expect(await eventually(() => all.filter(isRunning).length === 0)).toBe(true);
      expect(
        await eventually(() => !readdirSync(scratch).some((entry) => entry.startsWith('tallyroot-'))),
      ).toBe(true);
    },
  );
});
