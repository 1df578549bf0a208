import { z } from 'zod';
import { setUpBody, setUpView } from '../../../shared/schemas/people.ts';
import { aboutView, outboxMailView, outboxPage, outboxQuery } from '../../../shared/schemas/site.ts';
import { type ApiEntry, named, ok } from '../../openapi/entry.ts';

const chapter = 'Site';

export const siteApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/about',
    chapter,
    summary: 'Says which Tallyroot this is and, to those who are signed in, where it measures.',
    answers: [ok(named('About', aboutView))],
    problems: [],
  },
  {
    method: 'get',
    path: '/setup',
    chapter,
    summary: 'Says whether the site still waits for its first admin.',
    answers: [ok(named('SetUpState', setUpView))],
    problems: [],
  },
  {
    method: 'post',
    path: '/setup',
    chapter,
    summary: 'Makes the first admin, once, with the code that the server printed when it started.',
    body: named('SetUp', setUpBody),
    answers: [
      {
        status: 201,
        meaning: 'Signed in as the admin.',
        body: named('SetUpResult', z.strictObject({ isSignedIn: z.literal(true) })),
      },
    ],
    problems: ['invalid', 'forbidden', 'conflict', 'gone', 'too_many'],
  },
  {
    method: 'get',
    path: '/site/outbox',
    chapter,
    summary: 'Lists the mails that were sent or wait, newest first, without their text.',
    query: outboxQuery,
    answers: [ok(named('OutboxPage', outboxPage))],
    problems: ['invalid', 'unauthenticated', 'forbidden'],
  },
  {
    method: 'post',
    path: '/site/outbox/:mail/retry',
    chapter,
    summary: 'Tries at once to send a mail that waits or was given up.',
    answers: [ok(named('OutboxMail', outboxMailView))],
    problems: ['invalid', 'unauthenticated', 'forbidden', 'not_found', 'conflict'],
  },
];
