import {
  changeLibraryBody,
  createLibraryBody,
  libraryPage,
  libraryView,
  solverList,
} from '../../../shared/schemas/libraries.ts';
import { pageQuery } from '../../../shared/schemas/paging.ts';
import { trendQuery, trendView } from '../../../shared/schemas/trends.ts';
import { type ApiEntry, created, named, ok } from '../../openapi/entry.ts';

const chapter = 'Libraries';
const library = named('Library', libraryView);

export const librariesApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/libraries',
    chapter,
    summary: 'Lists libraries, from A to Z.',
    query: pageQuery,
    answers: [ok(named('LibraryPage', libraryPage))],
    problems: ['invalid'],
  },
  {
    method: 'post',
    path: '/libraries',
    chapter,
    summary: 'Creates a library.',
    body: named('CreateLibrary', createLibraryBody),
    answers: [created(library)],
    problems: ['invalid', 'conflict'],
  },
  {
    method: 'get',
    path: '/libraries/:library',
    chapter,
    summary: 'Reads a library.',
    answers: [ok(library)],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'patch',
    path: '/libraries/:library',
    chapter,
    summary: 'Changes what a library is called and who may see it.',
    body: named('ChangeLibrary', changeLibraryBody),
    answers: [ok(library)],
    problems: ['invalid', 'unauthenticated', 'forbidden', 'not_found'],
  },
  {
    method: 'get',
    path: '/libraries/:library/solvers',
    chapter,
    summary: 'Lists the solvers that the library declares or has declared.',
    answers: [ok(named('SolverList', solverList))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/libraries/:library/trend',
    chapter,
    summary: 'Tells how each solver came along over the newest builds on a suite.',
    about:
      'Cost is summed over the solves that every build shown has solved, on cases that are the same in all.',
    query: trendQuery,
    answers: [ok(named('Trend', trendView))],
    problems: ['invalid', 'not_found'],
  },
];
