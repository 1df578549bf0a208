import { describe, expect, it } from 'vitest';
import { functionTable } from '../../../shared/equations/functions.ts';
import { equationLimits } from '../../../shared/equations/limits.ts';
import { careSentence } from '../../../shared/guide/care.ts';
import { chapterOf, chapters } from '../../../shared/guide/chapters.ts';
import { findingMeanings } from '../../../shared/guide/query-check.ts';
import { type Block, type ChapterId, spansOf } from '../../../shared/guide/section.ts';
import { allowances, defaultAllowances } from '../../../shared/schemas/allowances.ts';
import { manifestFile, manifestSolver } from '../../../shared/schemas/manifest.ts';
import { orderStatuses } from '../../../shared/schemas/solve.ts';
import { fileCase, suiteFile, suiteLimits, traitNames } from '../../../shared/schemas/suite-file.ts';
import { changes, outcomes, queryFindings, remarkCodes, verdicts } from '../../../shared/schemas/words.ts';

function textsOf(block: Block): string[] {
  switch (block.kind) {
    case 'paragraph':
      return [block.text];
    case 'list':
      return [...block.items];
    case 'table':
      return [block.caption, ...block.columns, ...block.rows.flat()];
    case 'code':
      return [];
  }
}

/** First cells of all tables of a chapter, back quotes taken away. */
function entries(id: ChapterId): string[] {
  const blocks = chapterOf(id).sections.flatMap((section) => section.blocks);
  return blocks.flatMap((block) =>
    block.kind === 'table' ? block.rows.map((row) => (row[0] ?? '').replaceAll('`', '')) : [],
  );
}

const allTexts = chapters.flatMap((chapter) =>
  chapter.sections.flatMap((section) => section.blocks.flatMap(textsOf)),
);

describe('chapters', () => {
  it('have ids of their own, a title, a summary and sections with something in them', () => {
    expect(new Set(chapters.map((chapter) => chapter.id)).size).toBe(chapters.length);
    for (const chapter of chapters) {
      expect(chapterOf(chapter.id)).toBe(chapter);
      expect(chapter.title).not.toBe('');
      expect(chapter.summary).toMatch(/[.]$/);
      expect(chapter.sections.length).toBeGreaterThan(0);
      const ids = chapter.sections.map((section) => section.id);
      expect(new Set(ids).size, chapter.id).toBe(ids.length);
      for (const id of ids) expect(id).toMatch(/^[a-z][a-z-]*$/);
      for (const { blocks } of chapter.sections) expect(blocks.length).toBeGreaterThan(0);
    }
  });

  it('point to other chapters only', () => {
    for (const { id, see } of chapters) {
      expect(see, id).not.toContain(id);
      expect(new Set(see).size, id).toBe(see.length);
      for (const other of see) expect(chapterOf(other).id).toBe(other);
    }
  });

  it('have tables whose rows are as long as their header and whose first cells differ', () => {
    for (const chapter of chapters) {
      for (const block of chapter.sections.flatMap((section) => section.blocks)) {
        if (block.kind !== 'table') continue;
        expect(block.caption).not.toBe('');
        expect(block.rows.length, block.caption).toBeGreaterThan(0);
        for (const row of block.rows) expect(row, block.caption).toHaveLength(block.columns.length);
      }
    }
  });

  it('have no empty text, no blank at an end and a partner for every back quote', () => {
    for (const text of allTexts) {
      expect(text).not.toBe('');
      expect(text.trim()).toBe(text);
      expect(() => spansOf(text)).not.toThrow();
    }
  });

  it('say once what results are, in the words of every report', () => {
    expect(allTexts.filter((text) => text === careSentence)).toHaveLength(1);
  });
});

describe('word lists of the guide', () => {
  it.each([
    ['outcomes', outcomes],
    ['outcomes', remarkCodes],
    ['changes', changes],
    ['order', orderStatuses],
    ['allowances', verdicts],
    ['suites', traitNames],
    ['query-check', queryFindings.map((finding) => findingMeanings[finding].title)],
  ] as const)('the chapter on %s explains every word of its list, once', (id, words) => {
    const found = entries(id);
    for (const word of words)
      expect(
        found.filter((entry) => entry === word),
        word,
      ).toHaveLength(1);
  });

  it('the chapter on equations explains every function, with its arguments', () => {
    const found = entries('equations');
    for (const { name, arguments: names } of functionTable) {
      const call = found.filter((entry) => entry.startsWith(`${name}(`));
      expect(call, name).toHaveLength(1);
      expect(call[0]).toContain(names.join(', '));
    }
    expect(found).toContain('pi');
    expect(found).toContain('e');
  });

  it('the chapters on the manifest and on suites explain every key', () => {
    const keys = [...Object.keys(manifestFile.shape), ...Object.keys(manifestSolver.shape)];
    for (const key of keys) expect(entries('manifest')).toContain(key);
    const suiteKeys = [...Object.keys(suiteFile.shape), ...Object.keys(fileCase.shape)];
    for (const key of suiteKeys) expect(entries('suites')).toContain(key);
  });

  it('the chapter on allowances gives every allowance with the value that it has at first', () => {
    const block = chapterOf('allowances').sections[0]?.blocks[0];
    const values = block?.kind === 'table' ? block.rows.map((row) => row[2]) : [];
    expect(values).toEqual(allowances.keyof().options.map((name) => String(defaultAllowances[name])));
  });
});

describe('figures of the guide', () => {
  it('the values of keys that are left out are those of the schemas', () => {
    const row = (id: ChapterId, key: string) =>
      chapterOf(id)
        .sections.flatMap((section) => section.blocks)
        .flatMap((block) => (block.kind === 'table' ? block.rows : []))
        .find((cells) => cells[0] === `\`${key}\``);
    const solver = manifestSolver.parse({ name: 'a', takes: 'start' });
    expect(row('manifest', 'uses')?.[2]).toBe(`\`[${solver.uses.join(', ')}]\``);
    expect(row('manifest', 'one-point')?.[2]).toBe(String(solver['one-point']));
    expect(row('manifest', 'widens')?.[2]).toBe(String(solver.widens));
    expect(row('manifest', 'digits')?.[2]).toBe(String(solver.digits));
    const { xabs, xrel, fabs } = solver.tolerance;
    expect(row('manifest', 'tolerance')?.[2]).toContain(`${xabs}, ${xrel} and ${fabs}`);
    const limits = suiteFile.shape.limits.parse({});
    expect(row('suites', 'evaluations')?.[2]).toBe(String(limits.evaluations));
    expect(row('suites', 'seconds')?.[2]).toBe(String(limits.seconds));
  });

  it('the limits are those of the readers', () => {
    const text = allTexts.join('\n');
    expect(text).toContain(`${equationLimits.depth} levels of nesting`);
    expect(text).toContain(`A sweep has at most ${suiteLimits.sweepMembers} members`);
  });
});

describe('spansOf', () => {
  it('parts code from the rest and refuses a back quote without a partner', () => {
    expect(spansOf('`f X` asks for f')).toEqual([
      { text: 'f X', isCode: true },
      { text: ' asks for f', isCode: false },
    ]);
    expect(() => spansOf('a ` b')).toThrow(RangeError);
  });
});
