import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { execa } from 'execa';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { comparisonFile } from '../../../shared/schemas/comparison-file.ts';
import { measurementFile } from '../../../shared/schemas/measurement.ts';
import { createLarkroots, type Larkroots } from '../../helpers/larkroots.ts';

const root = fileURLToPath(new URL('../../..', import.meta.url));
const program = join(root, 'server/cli/index.ts');
const scratch = mkdtempSync(join(tmpdir(), 'tallyroot-cli-'));
const at = (name: string): string => join(scratch, name);

async function tallyroot(...words: string[]) {
  const ended = await execa('node', ['--import', 'tsx', program, ...words], { cwd: root, reject: false });
  return { code: ended.exitCode, out: ended.stdout, err: ended.stderr };
}

let larkroots: Larkroots;

beforeAll(async () => {
  larkroots = await createLarkroots();
  const [main, oneChord] = [await larkroots.checkout('main'), await larkroots.checkout('one-chord')];
  const measure = (folder: string, file: string) =>
    tallyroot('measure', '--build', folder, '--suite', 'hard-dozen', '--lanes', '2', '--json', at(file));
  for (const ended of [await measure(main, 'main.json'), await measure(oneChord, 'one-chord.json')]) {
    expect(ended.err).toBe('');
    expect(ended.code).toBe(0);
  }
}, 120_000);
afterAll(() => {
  larkroots.remove();
  rmSync(scratch, { recursive: true, force: true });
});

describe('tallyroot measure', () => {
  it('writes a file of the documented shape, in the order of solvers and cases, with every path', () => {
    const file = measurementFile.parse(JSON.parse(readFileSync(at('main.json'), 'utf8')));
    expect(file.solves).toHaveLength(6 * 12);
    expect(file.stopped).toBeNull();
    expect([...new Set(file.solves.map((solve) => solve.solver))]).toEqual(
      file.solvers.map((solver) => solver.name),
    );
    for (const solve of file.solves) {
      if (solve.outcome === 'not applicable') continue;
      const asked = solve.path!.events.filter(([kind]) => kind !== 'step');
      const counted = asked.reduce((sum, [kind]) => sum + (kind === 'fdf' ? 2 : 1), 0);
      expect(counted, `${solve.solver} on ${solve.case}`).toBe(solve.evaluations);
    }
  });

  it('keeps to the solvers and cases that are named, and says what there is where a name is wrong', async () => {
    const folder = await larkroots.checkout('main');
    const words = ['measure', '--build', folder, '--suite', 'hard-dozen'];
    const one = await tallyroot(...words, '--solver', 'brent', '--case', 'orbit', '--json', at('one.json'));
    expect(one.code).toBe(0);
    const file = measurementFile.parse(JSON.parse(readFileSync(at('one.json'), 'utf8')));
    expect(file.solves.map((solve) => [solve.solver, solve.case])).toEqual([['brent', 'orbit']]);
    const wrong = await tallyroot(...words, '--solver', 'brant');
    expect(wrong.code).toBe(2);
    expect(wrong.err).toContain('There is no solver brant. There are: secant, newton,');
  });

  it('answers 2 where the folder has no manifest', async () => {
    const ended = await tallyroot('measure', '--build', scratch, '--suite', 'hard-dozen');
    expect(ended.code).toBe(2);
    expect(ended.err).toContain('tallyroot.yaml');
  });
});

describe('tallyroot compare', () => {
  it('answers 0 for a build against itself and says that all is the same', async () => {
    const ended = await tallyroot('compare', at('main.json'), at('main.json'));
    expect(ended.code).toBe(0);
    expect(ended.out).toContain('within allowances');
    expect(ended.out).toContain('68 of 68 pairs are the same.');
  });

  it('answers 1 beyond allowances, leads with what broke and names the lost stored value', async () => {
    const ended = await tallyroot(
      'compare',
      at('main.json'),
      at('one-chord.json'),
      '--json',
      at('comparison.json'),
    );
    expect(ended.code).toBe(1);
    const [head, , sentence, second] = ended.out.split('\n');
    expect(head).toMatch(/^beyond allowances: /);
    expect(sentence).toContain('hybrid no longer solves flat-shoulder');
    expect(second).toMatch(/^secant needs .*it asks for f again at an x it already has/);
    const file = comparisonFile.parse(JSON.parse(readFileSync(at('comparison.json'), 'utf8')));
    expect(file.verdict).toBe('beyond allowances');
  });

  it('judges by the allowances of a file, and says where in it a mistake is', async () => {
    const generous = 'base: { broke: null, totalPercent: null, caseEvaluations: null, digits: null }\n';
    writeFileSync(at('generous.yaml'), generous);
    const ended = await tallyroot(
      'compare',
      at('main.json'),
      at('one-chord.json'),
      '--allow',
      at('generous.yaml'),
    );
    expect(ended.code).toBe(0);
    writeFileSync(at('wrong.yaml'), 'base:\n  broke: many\n');
    const wrong = await tallyroot(
      'compare',
      at('main.json'),
      at('one-chord.json'),
      '--allow',
      at('wrong.yaml'),
    );
    expect(wrong.code).toBe(2);
    expect(wrong.err).toContain('line 2, column 10');
  });

  it('answers 2 for a file that is none of ours', async () => {
    writeFileSync(at('other.json'), '{"format":"something else"}');
    const ended = await tallyroot('compare', at('main.json'), at('other.json'));
    expect(ended.code).toBe(2);
    expect(ended.err).toContain('does not have the expected shape');
  });
});

describe('tallyroot trace', () => {
  it('prints the path with the repeats marked, a strip and the end', async () => {
    const ended = await tallyroot(
      'trace',
      at('one-chord.json'),
      '--solver',
      'secant',
      '--case',
      'sqrt-three',
    );
    expect(ended.code).toBe(0);
    expect(ended.out).toContain('again, as in 2');
    expect(ended.out).toContain('0               4               8               12              16');
    expect(ended.out).toMatch(/14 evaluations, 6 at an x asked before/);
  });

  it('names cases close to one that is not there', async () => {
    const ended = await tallyroot('trace', at('main.json'), '--solver', 'secant', '--case', 'sqrt');
    expect(ended.code).toBe(2);
    expect(ended.err).toContain('Close to it: sqrt-three.');
  });
});

describe('tallyroot suites', () => {
  it('lists every built-in suite with its count of cases', async () => {
    const ended = await tallyroot('suites');
    expect(ended.code).toBe(0);
    for (const line of [/brackets +154/, /hard-dozen +12/, /open-starts +64/])
      expect(ended.out).toMatch(line);
  });

  it('checks a file and answers 2 with line and column of a mistake', async () => {
    writeFileSync(
      at('suite.yaml'),
      'format: 1\nid: mine\ntitle: Mine\ncases:\n  - id: a\n    equation: x^2 -\n    source: mine\n',
    );
    const ended = await tallyroot('suites', 'check', at('suite.yaml'));
    expect(ended.code).toBe(2);
    expect(ended.err).toMatch(/line 6, column \d+/);
  });
});

describe('tallyroot schema', () => {
  it('prints the JSON Schema that the files are checked with', async () => {
    const ended = await tallyroot('schema', 'measurement');
    expect(ended.code).toBe(0);
    const schema = JSON.parse(ended.out);
    expect(schema.properties.format.const).toBe('tallyroot measurement 1');
    expect(schema.properties.solves.items.required).toEqual(
      expect.arrayContaining([
        'solver',
        'case',
        'start',
        'outcome',
        'evaluations',
        'order',
        'queryCheck',
        'path',
      ]),
    );
  });
});

describe('tallyroot', () => {
  it('prints its commands, and answers 2 for one that it does not know', async () => {
    expect((await tallyroot()).out).toContain('tallyroot measure --build DIR');
    const ended = await tallyroot('improve');
    expect(ended.code).toBe(2);
    expect(ended.err).toContain('There is no command "improve"');
  });
});
