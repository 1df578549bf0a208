import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareRuns } from '../../../shared/comparison/compare.ts';
import type { Comparison } from '../../../shared/comparison/comparison.ts';
import { exportCsv } from '../../../shared/comparison/export-csv.ts';
import { escapeMarkdown, escapeXml } from '../../../shared/comparison/export-escape.ts';
import { exportJson } from '../../../shared/comparison/export-json.ts';
import { exportJUnit } from '../../../shared/comparison/export-junit.ts';
import { exportMarkdown } from '../../../shared/comparison/export-markdown.ts';
import { describeComparison } from '../../../shared/comparison/sentences.ts';
import { careSentence } from '../../../shared/guide/care.ts';
import { comparisonFile, comparisonFileJsonSchema } from '../../../shared/schemas/comparison-file.ts';
import type { SolveRecord } from '../../../shared/schemas/solve.ts';
import { allow, caseOf, order, runOf, solve, solverOf } from '../../helpers/solve-records.ts';
import { readCsv, readTables, readXml, unescapedRest, type XmlNode } from './export-parsers.ts';

const hostile = [
  '=HYPERLINK("http://evil.example","x")',
  '+1+1',
  '-2+3',
  '@SUM(A1)',
  '\tcell',
  '\rcell',
  "'quoted",
  'a,b;"c"\r\nd',
  '<script>alert(1)</script>',
  '<!-- --> &amp; ]]>',
  '![x](javascript:alert(1))',
  '[x]: http://evil.example',
  '@everyone and #12, !3, GH-4',
  'https://evil.example www.evil.example mailto:a@b.example',
  '| pipe | `code` | **strong** | \\',
  'line\nbreak\u2028and\u2029more',
  '\u0000\u0001\u001b[31m\uffff\ud800',
  '\u202eright to left',
  '',
] as const;

const base = allow();

/** Broken, costlier, cheaper, same, new and gone pairs of two solvers, on two starts where `start` is given. */
function mixed(names: { solver?: string; case?: string; label?: string; said?: string } = {}): Comparison {
  const id = names.case ?? 'sqrt-2';
  const solver = names.solver ?? 'secant';
  const said: SolveRecord['remarks'] = [{ code: 'said', text: names.said ?? 'too many steps' }];
  const reference = runOf(
    [
      solve(solver, id, { start: 0, evaluations: 10 }),
      solve(solver, id, { start: 1, evaluations: 9 }),
      solve(solver, 'flat', { start: 0, evaluations: 30, order: order(1.6) }),
      solve('newton', 'sqrt-2', { evaluations: 12, digits: 16 }),
      solve('newton', 'gone-case'),
    ],
    { label: names.label ?? 'main' },
  );
  const candidate = runOf(
    [
      solve(solver, id, { start: 0, evaluations: 25, queryCheck: { repeated: 12 } }),
      solve(solver, id, { start: 1, evaluations: 9 }),
      solve(solver, 'flat', { start: 0, evaluations: 40, outcome: 'refused', remarks: said }),
      solve('newton', 'sqrt-2', { evaluations: 10, elapsedMs: 2500 }),
      solve('newton', 'new-case', { evaluations: 8 }),
    ],
    { label: names.label ?? 'a change' },
  );
  return compareRuns(reference, candidate, base);
}

function all(node: XmlNode, name: string): XmlNode[] {
  return node.children.flatMap((child) => [...(child.name === name ? [child] : []), ...all(child, name)]);
}

describe('exportCsv', () => {
  it('writes a header and one row a pair, each with as many cells as the header', () => {
    const comparison = mixed();
    const [header = [], ...rows] = readCsv(exportCsv(comparison));
    expect(rows).toHaveLength(comparison.pairs.length);
    for (const row of rows) expect(row).toHaveLength(header.length);
    expect(new Set(header).size).toBe(header.length);
    const column = (title: string, row: number) => rows[row]?.[header.indexOf(title)];
    expect(column('solver', 0)).toBe('secant');
    expect(column('start [number from 1]', 1)).toBe('2');
    expect(column('change', 0)).toBe('costlier');
    expect(column('difference [evaluations]', 0)).toBe('15');
    expect(column('evaluations, reference [count]', 0)).toBe('10');
    expect(column('evaluations, candidate [count]', 0)).toBe('25');
    expect(column('outcome, candidate', 2)).toBe('refused');
    expect(column('root, candidate [unit of x]', 2)).toBe('');
    expect(column('order, reference [dimensionless]', 2)).toBe('1.6');
    expect(column('time, candidate [ms]', 3)).toBe('2500');
  });

  it('keeps every number exact and leaves negative ones numbers', () => {
    const comparison = mixed();
    const [header = [], ...rows] = readCsv(exportCsv(comparison));
    const difference = header.indexOf('difference [evaluations]');
    expect(rows.map((row) => row[difference])).toContain('-2');
    const error = header.indexOf('error, reference [unit of x]');
    expect(Number(rows[0]?.[error])).toBe(1e-17);
  });

  it.each(hostile)('makes the name %j harmless, and taking one apostrophe off gives it back', (text) => {
    const comparison = mixed({ case: text });
    const [header = [], ...rows] = readCsv(exportCsv(comparison));
    const cells = rows.map((row) => row[header.indexOf('case')] ?? '');
    for (const cell of rows.flat()) {
      expect(cell).not.toMatch(/^[=+@\t\r\n]/);
      if (cell.startsWith('-')) expect(Number(cell)).not.toBeNaN();
    }
    const shown = text.replace(/(?![\t\r\n])\p{Cc}|\p{Cs}/gu, '\ufffd');
    expect(cells.map((cell) => cell.replace(/^'/, ''))).toContain(shown);
  });

  it('leaves a name that is a number as a whole as it is, and no other that begins like one', () => {
    const caseCell = (id: string) => readCsv(exportCsv(mixed({ case: id })))[1]?.[2];
    for (const id of ['-3', '+4', '-1.5e-9', '-.5']) expect(caseCell(id)).toBe(id);
    for (const id of ['-3-', '--3', '-1e', '+', '-x', '-3\n']) expect(caseCell(id)).toBe(`'${id}`);
  });

  it('reads back for names of any characters', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 12 }), (id) => {
        const cell = readCsv(exportCsv(mixed({ case: id })))[1]?.[2] ?? '';
        const shown = id.replace(/(?![\t\r\n])\p{Cc}|\p{Cs}/gu, '\ufffd');
        return cell === shown || cell === `'${shown}`;
      }),
      { seed: 11, numRuns: 200 },
    );
  });
});

describe('exportJson', () => {
  it.each(hostile)('reads back to the same comparison, also with the name %j', (text) => {
    const comparison = mixed({ case: text, label: text, said: text });
    const file = comparisonFile.parse(JSON.parse(exportJson(comparison, base)));
    const { format, allowances, ...back } = file;
    const typed: Comparison = back;
    expect(format).toBe('tallyroot comparison 1');
    expect(allowances).toEqual(base);
    expect(typed).toEqual(comparison);
  });

  it('leaves out the paths that solves of a measurement carry', () => {
    const withPath = { ...solve('secant', 'sqrt-2'), path: { events: [], cut: 0 } };
    const comparison = compareRuns(runOf([withPath]), runOf([withPath]), base);
    expect(exportJson(comparison, base)).not.toContain('"path"');
  });

  it('refuses a figure that is not finite rather than writing null for it', () => {
    const comparison = mixed();
    const broken = { ...comparison, pairs: comparison.pairs.map((pair) => ({ ...pair, digits: Infinity })) };
    expect(() => exportJson(broken, base)).toThrow();
  });

  it('has a JSON Schema that names every key of the file', () => {
    const { properties } = comparisonFileJsonSchema();
    const keys = Object.keys(JSON.parse(exportJson(mixed(), base)));
    expect(Object.keys(Object(properties)).toSorted()).toEqual(keys.toSorted());
  });
});

describe('exportMarkdown', () => {
  it('opens with the verdict and its sentence and ends with what results are', () => {
    const comparison = mixed();
    const lines = exportMarkdown(comparison).trimEnd().split('\n');
    const sentence = describeComparison(comparison)
      .verdict.map((span) => span.text)
      .join('');
    expect(lines[0]?.replaceAll('**', '').replaceAll('\\', '')).toBe(`Beyond allowances: ${sentence}`);
    expect(lines.at(-1)).toBe(`*${careSentence}*`);
  });

  it('has one row for each solver and for each changed pair, gravest first', () => {
    const comparison = mixed();
    const rows = readTables(exportMarkdown(comparison));
    const [head, , secant, newton] = rows;
    expect(head).toHaveLength(7);
    expect(secant?.slice(0, 3)).toEqual(['secant', '3 of 3 → 2 of 3', '19 → 34']);
    expect(newton?.slice(0, 4)).toEqual(['newton', '2 of 2 → 2 of 2', '12 → 10', '−16.7\u202f%']);
    const changes = rows.slice(4 + 2).map((row) => row[0]);
    expect(changes).toEqual(['broke', 'costlier', 'cheaper', 'new', 'gone']);
    for (const row of rows.slice(4)) expect(row).toHaveLength(6);
  });

  it('lists the ten gravest changes and says how many more there are', () => {
    const side = (more: number) =>
      runOf(
        Array.from({ length: 14 }, (_, i) => solve('secant', `c${i}`, { evaluations: 10 + more * (i % 13) })),
      );
    const markdown = exportMarkdown(compareRuns(side(0), side(1), base));
    const rows = readTables(markdown).slice(3 + 2);
    expect(rows).toHaveLength(10);
    expect(rows[0]?.slice(2, 4)).toEqual(['c12', '10 → 22']);
    expect(markdown).toContain('Listed are the 10 gravest changes; 2 more changed, and 2 are the same.');
  });

  it('says what is beyond the allowances', () => {
    const markdown = exportMarkdown(mixed());
    expect(markdown).toContain('- all: 1 pair broke; none may');
    expect(markdown).toContain(
      '- solver secant: evaluations in total rose by 78.947 %; at most 2 % is allowed',
    );
  });

  it.each(hostile)('shows the name %j as text and nothing else', (text) => {
    const markdown = exportMarkdown(mixed({ solver: text, case: text, label: text, said: text }));
    const plain = exportMarkdown(mixed({ solver: 'secant', case: 'c', label: 'l', said: 's' }));
    // A line break in a name would change the number of lines.
    expect(markdown.split('\n').length).toBe(plain.split('\n').length);
    const rest = unescapedRest(markdown);
    expect(rest).not.toMatch(/[<>&`[\]@#~$\\]/);
    expect(rest).not.toMatch(/:\/\/|www\.|mailto:[a-z]|GH-\d/);
    expect(markdown).not.toMatch(/[@#][\p{L}\p{N}]/u);
    expect(markdown).not.toMatch(/(?!\n)[\p{Cc}\p{Cs}\p{Bidi_Control}]/u);
    const widths = readTables(markdown).map((row) => row.length);
    expect(widths).toEqual(readTables(plain).map((row) => row.length));
  });
});

describe('escapeMarkdown', () => {
  it('gives the text back once escapes and word joiners are taken away', () => {
    const visible = fc.string({ unit: 'grapheme-ascii', maxLength: 30 });
    fc.assert(
      fc.property(visible, (text) => {
        const shown = escapeMarkdown(text)
          .replace(/\\([!-/:-@[-`{-~])/g, '$1')
          .replaceAll('\u2060', '');
        return shown === text.replace(/ +/g, ' ');
      }),
      { seed: 12, numRuns: 300 },
    );
  });

  it('leaves names of solvers and cases readable', () => {
    expect(escapeMarkdown('aps-04/n=4, brent.2+x')).toBe('aps-04/n=4, brent.2+x');
  });
});

describe('exportJUnit', () => {
  it('has a testsuite for each solver, a testcase for each pair and counts that add up', () => {
    const comparison = mixed();
    const root = readXml(exportJUnit(comparison));
    expect(root.name).toBe('testsuites');
    const suites = all(root, 'testsuite');
    expect(suites.map((suite) => suite.attributes.name)).toEqual(['secant', 'newton']);
    for (const node of [root, ...suites]) {
      expect(node.attributes.tests).toBe(String(all(node, 'testcase').length));
      expect(node.attributes.failures).toBe(String(all(node, 'failure').length));
      expect(node.attributes.errors).toBe(String(all(node, 'error').length));
      expect(node.attributes.skipped).toBe(String(all(node, 'skipped').length));
    }
    expect(all(root, 'testcase')).toHaveLength(comparison.pairs.length);
    expect(all(root, 'testcase').map((one) => one.attributes.name)).toContain('sqrt-2, start 2');
    expect(suites[1]?.attributes.time).toBe('2.501000');
  });

  it('fails the pairs that are part of a breach and no others', () => {
    const root = readXml(exportJUnit(mixed()));
    const failed = all(root, 'testcase').filter((one) => all(one, 'failure').length > 0);
    expect(failed.map((one) => one.attributes.name)).toEqual(['sqrt-2, start 1', 'flat, start 1']);
    const [costlier, broke] = failed.flatMap((one) => all(one, 'failure'));
    expect(costlier?.attributes.message).toContain('15 evaluations more on one case; at most 2 is allowed');
    expect(costlier?.text).toContain('instead of 10');
    expect(broke?.attributes).toMatchObject({ type: 'broke', message: '1 pair broke; none may' });
    expect(broke?.text).toContain('too many steps');
  });

  it('fails nothing where everything is allowed, and skips what is gone', () => {
    const free = { totalPercent: null, caseEvaluations: null, broke: null };
    const was = runOf([solve('secant', 'a'), solve('secant', 'b')]);
    const is = runOf([solve('secant', 'a', { evaluations: 50 })]);
    const root = readXml(exportJUnit(compareRuns(was, is, allow(free))));
    expect(root.attributes).toMatchObject({ tests: '2', failures: '0', errors: '0', skipped: '1' });
  });

  it('has an error for a solve that the candidate has no result for, and skips a changed case', () => {
    const cases = [caseOf('a'), caseOf('b'), caseOf('c')];
    const was = runOf([solve('secant', 'a'), solve('secant', 'b'), solve('secant', 'c')], { cases });
    const changed = [caseOf('a'), caseOf('b'), caseOf('c', { hash: 'another' })];
    const is = runOf([solve('secant', 'a'), solve('secant', 'c')], { cases: changed });
    const root = readXml(exportJUnit(compareRuns(was, is, base)));
    expect(root.attributes).toMatchObject({ tests: '3', failures: '0', errors: '1', skipped: '1' });
  });

  it('never looks good where nothing could be compared', () => {
    const nothing = runOf([], { solvers: [solverOf('secant')] });
    const root = readXml(exportJUnit(compareRuns(runOf([solve('secant', 'a')]), nothing, base)));
    expect(root.attributes.errors).toBe('1');
    const unrelated = compareRuns(runOf([solve('secant', 'a')]), runOf([solve('newton', 'b')]), base);
    expect(unrelated.verdict).toBe('could not tell');
    const [suite] = all(readXml(exportJUnit(unrelated)), 'testsuite');
    expect(suite?.attributes).toMatchObject({ name: 'comparison', errors: '1' });
  });

  it.each(hostile)('is well-formed with the name %j and gives it back', (text) => {
    const comparison = mixed({ solver: text, case: text, label: text, said: text });
    const root = readXml(exportJUnit(comparison));
    const shown = text.replace(/(?![\t\r\n])[\p{Cc}\uffff]|\p{Cs}/gu, '\ufffd');
    expect(all(root, 'testsuite').map((one) => one.attributes.name)).toContain(shown);
    expect(all(root, 'testcase').map((one) => one.attributes.name)).toContain(`${shown}, start 1`);
  });
});

describe('escapeXml', () => {
  it('keeps every legal character and replaces every illegal one', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 20 }), (text) => {
        const { attributes } = readXml(`<a b="${escapeXml(text)}"/>`);
        const legal = [...text].map((one) =>
          /^[\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]$/u.test(one) ? one : '\ufffd',
        );
        return attributes.b === legal.join('');
      }),
      { seed: 13, numRuns: 300 },
    );
  });
});
