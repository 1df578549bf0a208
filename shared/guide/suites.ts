import {
  type FileCase,
  type FileRoot,
  type SuiteFile,
  suiteLimits,
  type Trait,
  traitMeanings,
  traitNames,
} from '../schemas/suite-file.ts';
import { type Chapter, code, list, paragraph, table } from './section.ts';

type KeyEntry = readonly [takes: string, whereLeftOut: string, meaning: string];

export const suiteKeys: Record<keyof SuiteFile, KeyEntry> = {
  format: ['the number 1', 'needed', 'the version of this file'],
  id: ['lower-case letters, digits, . + -', 'needed', 'names the suite'],
  title: ['a text of at most 200 characters', 'needed', 'a name for people'],
  description: ['a text', 'none', 'what the suite is for'],
  limits: ['the keys below', 'their own', 'what one solve may use before it is stopped'],
  cases: [`a list of 1 to ${suiteLimits.cases}`, 'needed', 'the equations'],
};

export const caseKeys: Record<keyof FileCase, KeyEntry> = {
  id: ['lower-case letters, digits, . + -', 'needed', 'names the case; unique in the suite'],
  equation: ['f(x)', 'needed', 'see the chapter on equations'],
  parameters: ['names and numbers', 'none', 'values of the other names in the equation'],
  sweep: ['names and lists', 'none', 'one case for each combination of values'],
  bracket: ['two numbers', 'none', 'the interval for solvers that take one; f changes sign over it'],
  starts: [
    `at most ${suiteLimits.starts} lists of numbers`,
    'none',
    'starting points; a solver runs once from each list',
  ],
  roots: [`at most ${suiteLimits.roots} roots`, 'none', 'what a solver may find'],
  expectation: ['`root` or `none`', '`root`', '`none` where there is nothing to find'],
  traits: ['a list of words', 'none', 'what makes it easy or hard'],
  source: ['a text', 'needed', 'author, year, title, table; “from memory” or “constructed” where so'],
  note: ['a text', 'none', 'what a reader should know'],
};

const rootKeys: Record<keyof FileRoot, readonly [whereLeftOut: string, meaning: string]> = {
  value: ['needed', 'the root'],
  digits: [
    'as many as can be certified',
    'significant digits to certify, where the equation does not allow the usual 45',
  ],
  multiplicity: ['1', 'at most 24'],
  allowed: ['true', 'false for a true root that is not the answer'],
  simple: [
    'none',
    'for a multiple root: a base g with a simple root here, f being a power of g times a factor that is not 0',
  ],
  statement: ['none', 'why it is the root, for jumps and flat stretches that no certificate reaches'],
};

function rowsOf(keys: Record<string, readonly string[]>): string[][] {
  return Object.entries(keys).map(([key, entry]) => [`\`${key}\``, ...entry]);
}

const meanings: Record<Trait, string> = traitMeanings;

export const suitesChapter: Chapter = {
  id: 'suites',
  title: 'Suites',
  summary: 'How equations are gathered in a suite file: brackets, starts, roots, sweeps and traits.',
  sections: [
    {
      id: 'example',
      title: 'An example',
      blocks: [
        code(
          'suite',
          `
format: 1
id: first-suite
title: A first suite
description: Three equations to start with.
limits: { evaluations: 500, seconds: 10 }
cases:
  - id: wallis
    equation: x^3 - 2*x - 5
    bracket: [2, 3]
    starts: [[2, 3]]
    roots:
      - value: 2.0945514815423265914823865405793029638573061056282
    traits: [polynomial, smooth]
    source: Wallis's example of Newton's method; from memory
  - id: powers
    equation: x^n - 2
    sweep:
      n: [2, 3]
    bracket: [1, 2]
    roots:
      - value:
          each: [2^(1/2), 2^(1/3)]
    traits: [polynomial, smooth]
    source: Constructed
  - id: pole
    equation: 1/(x - 1/3)
    bracket: [0, 1]
    expectation: none
    traits: [pole, no root]
    source: "Constructed: a change of sign without a root"
`,
        ),
        paragraph(
          'A suite is YAML, or JSON, of at most 1 MiB. Each saved change is a new revision, and no revision changes: runs and reference results name the revision that they belong to. A comparison pairs cases by their id and leaves out those whose content changed.',
        ),
      ],
    },
    {
      id: 'file-keys',
      title: 'Keys of the file',
      blocks: [
        table('Keys of a suite', ['key', 'takes', 'where left out', 'meaning'], rowsOf(suiteKeys)),
        table(
          'Keys of its limits',
          ['key', 'takes', 'where left out', 'meaning'],
          [
            ['`evaluations`', 'a whole number from 1 to 1000000', '1000', 'what one solve may ask for'],
            ['`seconds`', 'a number above 0, at most 3600', '10', 'time of one solve'],
          ],
        ),
      ],
    },
    {
      id: 'keys',
      title: 'Keys of a case',
      blocks: [
        table('Keys of a case', ['key', 'takes', 'where left out', 'meaning'], rowsOf(caseKeys)),
        paragraph(
          'Wherever a number is expected there may stand a constant expression in the parameters, such as `pi/2` or `n^2 + 1e-9`. A number that is written out keeps every digit.',
        ),
      ],
    },
    {
      id: 'roots',
      title: 'Roots',
      blocks: [
        paragraph(
          'State a root to at least 40 digits where the equation allows it, or as an expression. Saving a suite certifies it: f is enclosed in decimal intervals on both sides of the root, and a change of sign proves that a root lies between; for a simple root the interval Newton test shows that it is the only one there. What cannot be certified is refused, with the reason.',
        ),
        table('Keys of a root', ['key', 'where left out', 'meaning'], rowsOf(rootKeys)),
      ],
    },
    {
      id: 'sweeps',
      title: 'Sweeps',
      blocks: [
        list(
          '`n: [1, 2, 5]` lists values.',
          '`n: { from: 1, to: 9, step: 2 }` counts, exactly; the step is 1 where left out.',
          '`a, b: [[1, 2], [3, 4]]` changes two parameters together.',
          'Several entries are combined in every way, the last one changing fastest.',
          '`{ each: [ … ] }` in place of a number gives one entry for each member, in that order.',
          `A sweep has at most ${suiteLimits.sweepMembers} members, a suite at most ${suiteLimits.cases} cases in all.`,
        ),
        paragraph(
          'Members of one sweep are a family. Totals are shown by case and by family, since a family of twenty cases that differ only in scale should not outvote the rest.',
        ),
      ],
    },
    {
      id: 'traits',
      title: 'Traits',
      blocks: [
        table(
          'Traits',
          ['trait', 'meaning'],
          traitNames.map((trait) => [`\`${trait}\``, meanings[trait]]),
        ),
        paragraph(
          'Pages can be filtered by trait, and allowances can differ by trait. Traits that follow from the certified roots and from the bracket are checked when the suite is saved.',
        ),
      ],
    },
  ],
  see: ['equations', 'accuracy'],
};
