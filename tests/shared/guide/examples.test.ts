import { copyFileSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { readManifest } from '../../../server/builds/manifest.ts';
import { parseLine } from '../../../server/runner/wire.ts';
import { parseEquation } from '../../../shared/equations/parse-equation.ts';
import { chapters } from '../../../shared/guide/chapters.ts';
import type { CodeLanguage } from '../../../shared/guide/section.ts';
import { numberToText } from '../../../shared/schemas/path.ts';
import { prepareSuite } from '../../../shared/suites/prepare.ts';
import { readSuiteText } from '../../../shared/suites/read-suite.ts';
import { driveAdapter } from './drive-adapter.ts';

const blocks = chapters.flatMap((chapter) => chapter.sections.flatMap((section) => section.blocks));

function examples(language: CodeLanguage): string[] {
  const found = blocks.flatMap((block) =>
    block.kind === 'code' && block.language === language ? [block.text] : [],
  );
  if (found.length === 0) throw new Error(`The guide has no example in ${language}.`);
  return found;
}

const folder = mkdtempSync(join(tmpdir(), 'guide-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe('examples of the guide', () => {
  it.each(examples('manifest'))('a manifest is read, with its solvers as they stand there', (text) => {
    const recipe = readManifest(text);
    expect(recipe.solvers.map((solver) => solver.name)).toEqual(['secant', 'newton', 'hybrid']);
    expect(recipe.solvers[0]).toMatchObject({
      takes: 'start',
      starts: 2,
      tolerance: { xabs: 0, xrel: 1e-12 },
    });
    expect(recipe.solvers[1]).toMatchObject({ starts: 1, uses: ['f', 'df'], onePoint: true });
  });

  it.each(examples('suite'))('a suite is read and all its claims are certified', (text) => {
    const { cases } = prepareSuite(readSuiteText(text));
    expect(cases.map((one) => one.id)).toEqual(['wallis', 'powers-n2', 'powers-n3', 'pole']);
    expect(cases.map((one) => one.roots.length)).toEqual([1, 1, 1, 0]);
  });

  it.each(examples('equation'))('the equation %s is read', (text) => {
    expect(parseEquation(text).variables).toEqual(['x']);
  });

  it('pieces of equations in the running text are read', () => {
    for (const text of ['x^2^3', '-x^2', 'not (x < 1) ? 1 : x', '(x - 1)^3', 'x^3 - 3*x^2 + 3*x - 1']) {
      expect(() => parseEquation(text), text).not.toThrow();
    }
    expect(parseEquation('x^2^3').tree).toEqual(parseEquation('x^(2^3)').tree);
    expect(parseEquation('-x^2').tree).toEqual(parseEquation('-(x^2)').tree);
    expect(() => parseEquation('2x')).toThrow();
  });

  it.each(examples('wire'))('an exchange keeps the rules of the wire, and its answers are right', (text) => {
    const f = (x: number) => x * x - 2;
    const lines = text.split('\n');
    expect(lines[0]).toBe('> open 1');
    for (const [index, line] of lines.entries()) {
      if (line.startsWith('> ')) continue;
      const bytes = Buffer.from(line);
      const event = parseLine(bytes, 0, bytes.length);
      expect(event.kind, line).not.toBe('garbled');
      expect(event.kind, line).not.toBe('comment');
      if (event.kind !== 'ask') continue;
      const values = event.what === 'fdf' ? [f(event.x), 2 * event.x] : [f(event.x)];
      expect(lines[index + 1], line).toBe(`> = ${values.map(numberToText).join(' ')}`);
    }
  });

  const root = `root 5 ${numberToText(Math.SQRT2)}`;

  it('the adapter made with the kit solves, stops when it must and closes', async () => {
    const [text = ''] = examples('javascript');
    const file = join(folder, 'my-adapter.mjs');
    writeFileSync(file, text);
    const kit = new URL('../../../server/kits/node/adapter.mjs', import.meta.url);
    copyFileSync(fileURLToPath(kit), join(folder, 'adapter.mjs'));
    const argv: [string, ...string[]] = [process.execPath, file];
    const done = await driveAdapter(argv, 'secant', (x) => x * x - 2);
    expect(done).toMatchObject({ status: 0 });
    expect(done.lines.slice(0, 3)).toEqual(['ready 1 my roots 1.0', 'f 1', 'f 2']);
    expect(done.lines.at(-1)).toBe(root);
    const stopped = await driveAdapter(argv, 'secant', (x) => x * x - 2, 3);
    expect(stopped.lines.at(-1)).toMatch(/^fail 5 /);
    expect(stopped.status).toBe(0);
  });

  it('the adapter written from scratch solves, refuses, stops when it must and closes', async () => {
    const [text = ''] = examples('python');
    const file = join(folder, 'adapter.py');
    writeFileSync(file, text);
    const argv: [string, ...string[]] = ['python3', file];
    const done = await driveAdapter(argv, 'secant', (x) => x * x - 2);
    expect(done).toMatchObject({ status: 0 });
    expect(Number(done.lines.at(-1)?.split(' ')[2])).toBe(Math.SQRT2);
    const refused = await driveAdapter(argv, 'secant', () => 1);
    expect(refused.lines.at(-1)).toBe('fail 5 no convergence');
    const stopped = await driveAdapter(argv, 'secant', (x) => x * x - 2, 3);
    expect(stopped.lines.at(-1)).toBe('fail 5 the budget is used up');
    expect(stopped.status).toBe(0);
  });
});
