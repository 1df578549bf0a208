import {
  changePersonBody,
  demoPeopleList,
  demoSignInBody,
  peoplePage,
  peopleQuery,
  personView,
} from '../../../shared/schemas/people.ts';
import { type ApiEntry, empty, named, ok } from '../../openapi/entry.ts';

export const peopleApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/people',
    chapter: 'Site',
    summary: 'Lists everyone who has an account, by name.',
    query: peopleQuery,
    answers: [ok(named('PeoplePage', peoplePage))],
    problems: ['invalid', 'unauthenticated', 'forbidden'],
  },
  {
    method: 'patch',
    path: '/people/:person',
    chapter: 'Site',
    summary: 'Disables or enables somebody, makes them an admin or no longer one.',
    about: 'Who is disabled is signed out everywhere at once. The last admin stays.',
    body: named('ChangePerson', changePersonBody),
    answers: [ok(named('Person', personView))],
    problems: ['invalid', 'unauthenticated', 'forbidden', 'not_found', 'conflict'],
  },
];

export const demoApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/demo/people',
    chapter: 'Demo',
    summary: 'Lists the invented people of the demo.',
    answers: [ok(named('DemoPeople', demoPeopleList))],
    problems: ['not_found'],
  },
  {
    method: 'post',
    path: '/demo/sign-in',
    chapter: 'Demo',
    summary: 'Signs in as one of the demo’s people, without a password.',
    body: named('DemoSignIn', demoSignInBody),
    answers: [empty('Signed in.')],
    problems: ['invalid', 'not_found'],
  },
];
