import { codeDiffView } from '../../../shared/schemas/code-diff.ts';
import { comparisonFile } from '../../../shared/schemas/comparison-file.ts';
import {
  comparisonProfileQuery,
  comparisonQuery,
  comparisonView,
  exportQuery,
  pairPage,
  pairsQuery,
} from '../../../shared/schemas/comparisons.ts';
import { profileView } from '../../../shared/schemas/profiles.ts';
import { type ApiEntry, named, ok, unchanged } from '../../openapi/entry.ts';

const chapter = 'Comparisons';
const sides = 'Either `reference` (a run) or `revision` (of the reference results) is given.';

export const comparisonsApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/comparisons',
    chapter,
    summary: 'Compares a run with another run or with reference results: verdict, breaches and totals.',
    about: sides,
    query: comparisonQuery,
    answers: [ok(named('Comparison', comparisonView))],
    problems: ['invalid', 'not_found', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/comparisons/pairs',
    chapter,
    summary: 'Lists the pairs of a comparison, the gravest changes first.',
    about: sides,
    query: pairsQuery,
    answers: [ok(named('PairPage', pairPage))],
    problems: ['invalid', 'not_found', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/comparisons/export',
    chapter,
    summary: 'Sends a comparison as a file: CSV, JSON, Markdown or JUnit XML.',
    about: sides,
    query: exportQuery,
    answers: [
      {
        status: 200,
        meaning: 'The file, under a name of its own. The schema is that of the JSON file.',
        body: named('ComparisonFile', comparisonFile),
        mediaTypes: ['application/json', 'text/csv', 'text/markdown', 'application/xml'],
      },
    ],
    problems: ['invalid', 'not_found', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/comparisons/code-diff',
    chapter,
    summary: 'Shows what changed in the source between the two builds.',
    about: sides,
    query: comparisonQuery,
    answers: [ok(named('CodeDiff', codeDiffView)), unchanged],
    problems: ['invalid', 'not_found', 'gone', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/comparisons/profile',
    chapter,
    summary: 'Compares the two builds by performance profiles.',
    about: `${sides} Each pair that both have is a problem.`,
    query: comparisonProfileQuery,
    answers: [ok(named('Profile', profileView))],
    problems: ['invalid', 'not_found', 'unprocessable'],
  },
];
