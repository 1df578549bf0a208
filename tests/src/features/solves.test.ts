import { describe, expect, it } from 'vitest';
import { defaultAllowances } from '../../../shared/schemas/allowances.ts';
import { numberToText } from '../../../shared/schemas/path.ts';
import type { SolveDetail } from '../../../shared/schemas/runs.ts';
import { plainText } from '../../../src/components/ui/rich-text.tsx';
import { firstDifferenceNote } from '../../../src/features/solves/difference-words.ts';
import { formatBits, splitDiffering } from '../../../src/features/solves/differing-digits.ts';
import { closeRange, functionSteps } from '../../../src/features/solves/function-steps.ts';
import { homeLines } from '../../../src/features/solves/home-lines.ts';
import { firstDifferingRow, pathRows } from '../../../src/features/solves/path-rows.ts';
import { findingRows } from '../../../src/features/solves/query-findings.ts';
import { pairOfSolves, pairSentence } from '../../../src/features/solves/solve-pair.ts';
import { aloneSentence } from '../../../src/features/solves/solve-sentence.ts';
import { solveSide } from '../../../src/features/solves/solve-side.ts';
import { attainableDigits, pictureOfSolve, pictureOfStrip } from '../../../src/lib/strip-of-solve.ts';
import { rightRefusal, someCase, someSolve, someSolver } from './builders.ts';

/** x² − 3 by a secant that really runs; `isForgetful` asks for both ends at every step. */
function secantPath(isForgetful: boolean): [number, number][] {
  const asked: [number, number][] = [];
  const f = (x: number): number => {
    asked.push([x, x * x - 3]);
    return x * x - 3;
  };
  let [a, b] = [1, 2];
  let [fa, fb] = [f(a), f(b)];
  for (let step = 0; step < 30 && fb !== 0 && Math.abs(a - b) > 1e-15; step += 1) {
    if (isForgetful && step > 0) [fa, fb] = [f(a), f(b)];
    if (fa === fb) break;
    const c = b - (fb * (b - a)) / (fb - fa);
    [a, fa, b] = [b, fb, c];
    fb = f(b);
  }
  return asked;
}

function solveOf(asked: readonly [number, number][]): SolveDetail {
  const root = asked.at(-1)?.[0] ?? Number.NaN;
  const repeated = asked.length - new Set(asked.map(([x]) => x)).size;
  return {
    ...someSolve({
      evaluations: asked.length,
      f: asked.length,
      root,
      queryCheck: { repeated, outside: 0, late: 0, unused: 0, nonFinite: 0 },
    }),
    run: 1,
    declaration: someSolver(),
    path: { events: asked.map(([x, y]) => ['f', numberToText(x), numberToText(y)]), cut: 0 },
  };
}

const suiteCase = someCase();
const kept = solveOf(secantPath(false));
const lost = solveOf(secantPath(true));

describe('path table', () => {
  const [reference, candidate] = [solveSide(kept, suiteCase), solveSide(lost, suiteCase)];
  const rows = pathRows(reference, candidate);

  it('holds every evaluation of both sides once, aligned by x', () => {
    expect(rows.filter((row) => row.reference !== null)).toHaveLength(kept.evaluations);
    expect(rows.filter((row) => row.candidate !== null)).toHaveLength(lost.evaluations);
    const pairs = rows.filter((row) => row.reference !== null && row.candidate !== null);
    expect(pairs.length).toBe(kept.evaluations);
    for (const row of pairs)
      expect(row.reference?.event.x).toBeCloseTo(row.candidate?.event.x ?? Number.NaN, 12);
  });

  it('gives what one side asks again a row of its own, and says where it was known from', () => {
    const again = rows.filter((row) => row.candidate !== null && row.candidate.again !== null);
    expect(again).toHaveLength(lost.queryCheck.repeated);
    expect(again.every((row) => row.reference === null)).toBe(true);
    for (const row of again) {
      const first = candidate.lines.find((line) => line.number === row.candidate?.again);
      expect(first?.event.x).toBe(row.candidate?.event.x);
    }
  });

  it('finds the first difference and says what it is', () => {
    const first = firstDifferingRow(rows);
    expect(rows.slice(0, first).every((row) => row.isSame)).toBe(true);
    const note = firstDifferenceNote(rows, first);
    expect(note.title).toBe(`First difference: evaluation ${rows[first]?.candidate?.number}.`);
    expect(note.text).toContain('again, which it has had since evaluation');
  });

  it('has no difference between a solve and itself', () => {
    expect(firstDifferingRow(pathRows(reference, reference))).toBe(-1);
  });

  it('numbers an fdf as two evaluations', () => {
    const both = solveSide(
      {
        ...kept,
        path: {
          events: [
            ['fdf', '2', '1', '4'],
            ['f', '1.75', '0.0625'],
          ],
          cut: 0,
        },
      },
      suiteCase,
    );
    expect(both.lines.map((line) => [line.number, line.lastNumber])).toEqual([
      [1, 2],
      [3, 3],
    ]);
  });
});

describe('splitDiffering', () => {
  it('sets off the places from the first that differs', () => {
    expect(splitDiffering('0.20935568749721245', '0.20935568749721215')).toEqual([
      { same: '0.209355687497212', differs: '45' },
      { same: '0.209355687497212', differs: '15' },
    ]);
  });

  it('sets off nothing where both are the same, and all where exponent or sign differ', () => {
    expect(splitDiffering('1.5', '1.5')[0]).toEqual({ same: '1.5', differs: '' });
    expect(splitDiffering('1.5e-7', '1.5e-8')[0]).toEqual({ same: '', differs: '1.5e-7' });
    expect(splitDiffering('−1.5', '1.5')[1]).toEqual({ same: '', differs: '1.5' });
  });

  it('writes the bits of a double', () => {
    // IEEE 754: 1 is 3ff0…0, −2 is c00…0.
    expect([1, -2, 0.1].map(formatBits)).toEqual([
      '3ff0000000000000',
      'c000000000000000',
      '3fb999999999999a',
    ]);
  });
});

const judging = { allowances: { base: defaultAllowances, solvers: {}, traits: {} }, isExact: true };

describe('a pair of solves', () => {
  it('is judged by what the library allows its solver', () => {
    const poorer: SolveDetail = {
      ...lost,
      evaluations: kept.evaluations,
      digits: (kept.digits ?? 0) - 0.3,
      exact: false,
      error: 1e-9,
    };
    const changeOf = (digits: number) =>
      pairOfSolves(kept, poorer, suiteCase, {
        ...judging,
        allowances: { ...judging.allowances, solvers: { secant: { digits } } },
      }).change;
    expect(changeOf(0.1)).toBe('less accurate');
    expect(changeOf(0.5)).not.toBe('less accurate');
  });

  it('has not drifted where the arithmetic was another', () => {
    const other: SolveDetail = { ...kept, pathHash: 'another path' };
    const changeOf = (isExact: boolean) =>
      pairOfSolves(kept, other, suiteCase, { ...judging, isExact }).change;
    expect(changeOf(true)).toBe('drifted');
    expect(changeOf(false)).toBe('same');
  });
});

describe('walking through a function', () => {
  it('takes every evaluation of f with the derivative asked beside it', () => {
    const steps = functionSteps(solveSide(lost, suiteCase).lines);
    expect(steps.length).toBe(lost.evaluations);
    expect(steps.some((step) => step.again !== null)).toBe(true);
    expect(steps.every((step) => step.slope === null)).toBe(true);
  });

  it('looks close at a step, the two before it and the root, but never closer than can be read', () => {
    const steps = functionSteps(solveSide(kept, suiteCase).lines);
    const root = Math.sqrt(3);
    const first = closeRange(steps, 0, root);
    const last = closeRange(steps, steps.length - 1, root);
    if (first === null || last === null) throw new Error('there is a range');
    expect(first.low).toBeLessThan(Math.min(steps[0]?.x ?? 0, root));
    expect(last.high - last.low).toBeLessThan((first.high - first.low) / 100);
    expect(last.high - last.low).toBeGreaterThan(1e-6);
    expect(closeRange([], 0, null)).toBeNull();
  });
});

describe('the commands for home', () => {
  const solve = {
    solver: 'secant',
    case: 'orbit',
    start: null,
    suite: 'hard-dozen',
    isBuiltIn: true,
    isFresh: false,
  };

  it('measure one solve into a file and print its path from it', () => {
    expect(homeLines(solve)).toEqual([
      'npm run tallyroot -- measure --build DIR --suite hard-dozen --solver secant --case orbit --json one.json',
      'npm run tallyroot -- trace one.json --solver secant --case orbit',
    ]);
  });

  it('name the start, a new process and the file of a suite of one’s own, and quote what a shell would read', () => {
    const [measure, trace] = homeLines({
      ...solve,
      case: "kepler e=0.9 'far'",
      start: 3,
      suite: 'mine',
      isBuiltIn: false,
      isFresh: true,
    });
    expect(measure).toContain(
      "--suite mine.yaml --solver secant --case 'kepler e=0.9 '\\''far'\\''' --fresh --json",
    );
    expect(trace).toMatch(/ --start 3$/);
  });
});

describe('words of a solve', () => {
  it('name the lost stored value in the sentence of the pair', () => {
    const pair = pairOfSolves(kept, lost, suiteCase, judging);
    expect(pair.change).toBe('costlier');
    expect(plainText(pairSentence(pair, lost))).toBe(
      `secant on sqrt-three. The same root for ${lost.evaluations} evaluations instead of ${kept.evaluations}: it asks for f again at an x it already has, ${lost.queryCheck.repeated} times.`,
    );
  });

  it('say how a solve ended that stands alone', () => {
    expect(plainText(aloneSentence(someSolve()))).toBe(
      'secant on sqrt-three takes 8 evaluations to 15.9 digits.',
    );
    expect(plainText(aloneSentence(someSolve(rightRefusal)))).toBe(
      'secant on sqrt-three rightly finds no root in 8 evaluations.',
    );
  });

  it('give the query check with the first place, and the reference beside it', () => {
    const [repeated] = findingRows(solveSide(kept, suiteCase), solveSide(lost, suiteCase), suiteCase);
    expect(repeated?.term).toBe('asked again');
    expect(plainText(repeated?.pieces ?? [])).toMatch(
      new RegExp(
        `^${lost.queryCheck.repeated} evaluations at a bit-identical x .*first at evaluation \\d+ \\(x = .*The reference: none\\.$`,
      ),
    );
  });
});

describe('picture of a solve', () => {
  it('is a strip against the certified root', () => {
    const picture = pictureOfSolve(kept, suiteCase, kept.path);
    expect(picture.kind).toBe('strip');
    // |1 − √3| / √3 = 0.4226…, −log10 of it is 0.374.
    expect(picture.kind === 'strip' && picture.strip.events[0]?.digits).toBeCloseTo(0.374, 3);
  });

  it('is words where nothing applies, no root exists or no path was kept', () => {
    const words = (solve: Partial<SolveDetail>, given = suiteCase, path = kept.path) =>
      pictureOfSolve({ ...kept, ...solve }, given, path);
    expect(words({ outcome: 'not applicable' })).toEqual({ kind: 'words', words: 'not applicable' });
    const none = someCase({ expectation: 'none', roots: [] });
    expect(words(rightRefusal, none)).toEqual({
      kind: 'words',
      words: 'no root here; rightly refused',
    });
    expect(words({ outcome: 'false claim' }, none)).toEqual({
      kind: 'words',
      words: 'no root here; false claim',
    });
    expect(words({}, suiteCase, null)).toEqual({ kind: 'words', words: 'no path kept' });
  });

  it('is the same from a strip that the server made as from the path', () => {
    const whole = pictureOfSolve(kept, suiteCase, kept.path);
    if (whole.kind !== 'strip') throw new Error('the solve has a strip');
    expect(pictureOfStrip(kept, suiteCase, whole.strip.events)).toEqual(whole);
    expect(pictureOfStrip(kept, suiteCase, null)).toEqual({ kind: 'words', words: 'no path kept' });
  });

  it('has no post of attainable digits where a solve went to no root and the roots differ in it', () => {
    const [root] = suiteCase.roots;
    if (root === undefined) throw new Error('the case has a root');
    const lost = { ...kept, nearest: null };
    const postOf = (roots: (typeof root)[]) => {
      const picture = pictureOfStrip(lost, { ...suiteCase, roots }, []);
      return picture.kind === 'strip' ? picture.strip.attainable : undefined;
    };
    expect(postOf([root])).toBe(attainableDigits(root));
    expect(postOf([root, { ...root, attainable: root.attainable * 1000 + 1e-9 }])).toBeNull();
  });

  it('takes the attainable digits from F relative to the root, cut to 16', () => {
    const [root] = suiteCase.roots;
    if (root === undefined) throw new Error('the case has a root');
    expect(attainableDigits({ ...root, attainable: 1e-5 * Number(root.value) })).toBeCloseTo(5, 10);
    expect(attainableDigits({ ...root, attainable: 0 })).toBe(16);
    expect(attainableDigits({ ...root, value: '0', attainable: 1e-8 })).toBeCloseTo(8, 10);
  });
});
