import { serverEvent } from '../../../shared/schemas/events.ts';
import { profileView, runProfileQuery } from '../../../shared/schemas/profiles.ts';
import {
  runDetail,
  runPage,
  runsQuery,
  runView,
  solveDetail,
  solvePage,
  solvesQuery,
  startRunBody,
} from '../../../shared/schemas/runs.ts';
import { solveStripList, stripsQuery } from '../../../shared/schemas/strips.ts';
import { type ApiEntry, created, events, named, ok } from '../../openapi/entry.ts';

const chapter = 'Runs and solves';
const run = named('Run', runView);
const event = named('ServerEvent', serverEvent);

export const runsApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/runs',
    chapter,
    summary: 'Lists runs, newest first.',
    query: runsQuery,
    answers: [ok(named('RunPage', runPage))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'post',
    path: '/runs',
    chapter,
    summary: 'Queues a run of a build on a suite.',
    about: 'A build that is still being prepared is waited for.',
    body: named('StartRun', startRunBody),
    answers: [created(run)],
    problems: ['invalid', 'not_found', 'conflict', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/runs/:run',
    chapter,
    summary: 'Reads a run with its solvers in figures.',
    answers: [ok(named('RunDetail', runDetail))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'post',
    path: '/runs/:run/cancel',
    chapter,
    summary: 'Ends a run that waits or runs; what it has measured is kept.',
    answers: [ok(run, 'It has been called off.')],
    problems: ['invalid', 'not_found', 'conflict'],
  },
  {
    method: 'post',
    path: '/runs/:run/again',
    chapter,
    summary: 'Queues a run of the same build, suite revision, solvers and settings.',
    answers: [created(run)],
    problems: ['invalid', 'not_found', 'conflict'],
  },
  {
    method: 'get',
    path: '/runs/:run/solves',
    chapter,
    summary: 'Lists the solves of a run.',
    query: solvesQuery,
    answers: [ok(named('SolvePage', solvePage))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/runs/:run/profile',
    chapter,
    summary: 'Compares the solvers of a run by performance profiles.',
    about:
      'A case is a problem, at the mean cost over its starts; cases that do not apply to every solver shown are left out. Taking one solver away can change the order of the others.',
    query: runProfileQuery,
    answers: [ok(named('Profile', profileView))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/runs/:run/events',
    chapter,
    summary: 'Sends the progress of a run: its state of now, then what changes.',
    answers: [events(event, 'Server-sent events, without end.')],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/solves/:solve',
    chapter,
    summary: 'Reads a solve with its path.',
    answers: [ok(named('SolveDetail', solveDetail))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/strips',
    chapter,
    summary: 'Reads the digit strips of several solves.',
    query: stripsQuery,
    answers: [ok(named('SolveStripList', solveStripList))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/events',
    chapter,
    summary: 'Sends hints of whatever changes: what to read again.',
    answers: [events(event, 'Server-sent events, without end.')],
    problems: [],
  },
];
