import {
  changeAccountBody,
  changePasswordBody,
  meView,
  sessionList,
} from '../../../shared/schemas/people.ts';
import { type ApiEntry, empty, named, ok } from '../../openapi/entry.ts';

const chapter = 'Account';

export const accountApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/me',
    chapter,
    summary: 'Says who is signed in, and with which roles.',
    answers: [ok(named('Me', meView))],
    problems: [],
  },
  {
    method: 'patch',
    path: '/account',
    chapter,
    summary: 'Changes one’s name.',
    body: named('ChangeAccount', changeAccountBody),
    answers: [empty()],
    problems: ['invalid', 'unauthenticated'],
  },
  {
    method: 'post',
    path: '/account/password',
    chapter,
    summary: 'Changes one’s password; ends every other session.',
    body: named('ChangePassword', changePasswordBody),
    answers: [empty()],
    problems: ['invalid', 'unauthenticated', 'forbidden', 'too_many'],
  },
  {
    method: 'get',
    path: '/account/sessions',
    chapter,
    summary: 'Lists where one is signed in.',
    answers: [ok(named('SessionList', sessionList))],
    problems: ['unauthenticated'],
  },
  {
    method: 'delete',
    path: '/account/sessions/:session',
    chapter,
    summary: 'Ends one session.',
    answers: [empty()],
    problems: ['invalid', 'unauthenticated', 'not_found'],
  },
  {
    method: 'post',
    path: '/account/sign-out-everywhere',
    chapter,
    summary: 'Ends every session, this one too.',
    answers: [empty()],
    problems: ['unauthenticated'],
  },
];
