import {
  allowanceRevisionPage,
  allowanceRevisionView,
  setAllowancesBody,
} from '../../../shared/schemas/allowance-revisions.ts';
import { pageQuery } from '../../../shared/schemas/paging.ts';
import { type ApiEntry, named, ok } from '../../openapi/entry.ts';

const chapter = 'Allowances';
const revision = named('AllowanceRevision', allowanceRevisionView);

export const allowancesApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/libraries/:library/allowances',
    chapter,
    summary: 'Reads the allowances that hold now.',
    answers: [ok(revision)],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'put',
    path: '/libraries/:library/allowances',
    chapter,
    summary: 'Sets the allowances of a library, with a reason.',
    body: named('SetAllowances', setAllowancesBody),
    answers: [ok(revision, 'They hold from now on.')],
    problems: ['invalid', 'not_found', 'conflict'],
  },
  {
    method: 'get',
    path: '/libraries/:library/allowances/revisions',
    chapter,
    summary: 'Lists all allowances that a library ever had, newest first.',
    query: pageQuery,
    answers: [ok(named('AllowanceRevisionPage', allowanceRevisionPage))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/libraries/:library/allowances/revisions/:number',
    chapter,
    summary: 'Reads the allowances of a number.',
    answers: [ok(revision)],
    problems: ['invalid', 'not_found'],
  },
];
