import {
  referenceEntriesQuery,
  referenceEntryPage,
  referenceQuery,
  referenceRevisionPage,
  referenceRevisionView,
  setReferenceBody,
} from '../../../shared/schemas/references.ts';
import { type ApiEntry, created, named, ok, unchanged } from '../../openapi/entry.ts';

const chapter = 'Reference results';
const revision = named('ReferenceRevision', referenceRevisionView);

export const referencesApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/libraries/:library/references',
    chapter,
    summary: 'Lists the revisions of the reference results, newest first.',
    query: referenceQuery,
    answers: [ok(named('ReferenceRevisionPage', referenceRevisionPage))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'post',
    path: '/libraries/:library/references',
    chapter,
    summary: 'Makes a finished run the first reference of its library, suite and platform.',
    body: named('SetReference', setReferenceBody),
    answers: [created(revision)],
    problems: ['invalid', 'not_found', 'conflict', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/references/:revision',
    chapter,
    summary: 'Reads a revision of the reference results.',
    answers: [ok(revision), unchanged],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/references/:revision/entries',
    chapter,
    summary: 'Lists what is agreed as of a revision, by solver, case and start.',
    query: referenceEntriesQuery,
    answers: [ok(named('ReferenceEntryPage', referenceEntryPage))],
    problems: ['invalid', 'not_found'],
  },
];
