import { pageQuery } from '../../../shared/schemas/paging.ts';
import {
  suitePage,
  suiteRevisionPage,
  suiteRevisionView,
  suiteView,
} from '../../../shared/schemas/suites.ts';
import { type ApiEntry, named, ok, unchanged } from '../../openapi/entry.ts';

const chapter = 'Suites';

export const suitesApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/suites',
    chapter,
    summary: 'Lists suites, from A to Z.',
    query: pageQuery,
    answers: [ok(named('SuitePage', suitePage))],
    problems: ['invalid'],
  },
  {
    method: 'get',
    path: '/suites/:suite',
    chapter,
    summary: 'Reads a suite.',
    answers: [ok(named('Suite', suiteView))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/suites/:suite/revisions',
    chapter,
    summary: 'Lists the revisions of a suite, newest first.',
    query: pageQuery,
    answers: [ok(named('SuiteRevisionPage', suiteRevisionPage))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/suites/:suite/revisions/:number',
    chapter,
    summary: 'Reads a revision with its cases and their certified roots.',
    answers: [ok(named('SuiteRevision', suiteRevisionView)), unchanged],
    problems: ['invalid', 'not_found'],
  },
];
