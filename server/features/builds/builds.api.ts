import { z } from 'zod';
import {
  buildLog,
  buildLogEvent,
  buildPage,
  buildPreviewView,
  buildView,
  gitRefs,
  gitRefsQuery,
  previewBuildBody,
  registerBuildBody,
  registerPreviewBody,
} from '../../../shared/schemas/builds.ts';
import { pageQuery } from '../../../shared/schemas/paging.ts';
import { type ApiEntry, created, events, named, ok } from '../../openapi/entry.ts';

const chapter = 'Builds';
const build = named('Build', buildView);
const preview = named('BuildPreview', buildPreviewView);

export const buildsApi: readonly ApiEntry[] = [
  {
    method: 'post',
    path: '/libraries/:library/build-previews',
    chapter,
    summary: 'Looks at what a build would be made of, without running anything of it.',
    about:
      'A commit of a repository, a folder of the server’s machine where that is allowed, or an archive. A manifest at fault is answered as well, with its issues in place of the recipe. A preview can be registered for an hour.',
    body: named('PreviewBuild', previewBuildBody),
    file: { field: 'archive', about: 'A .tar, .tar.gz or .zip of at most 100 MiB, told by its content.' },
    answers: [created(preview)],
    problems: ['invalid', 'forbidden', 'not_found', 'too_large', 'unprocessable', 'unavailable'],
  },
  {
    method: 'get',
    path: '/libraries/:library/build-previews/:preview',
    chapter,
    summary: 'Reads a preview again.',
    answers: [ok(preview)],
    problems: ['invalid', 'not_found', 'gone'],
  },
  {
    method: 'get',
    path: '/git-refs',
    chapter,
    summary: 'Lists the branches and tags of a repository with the commits they lead to.',
    query: gitRefsQuery,
    answers: [ok(named('GitRefs', gitRefs))],
    problems: ['invalid', 'unprocessable', 'unavailable'],
  },
  {
    method: 'get',
    path: '/libraries/:library/builds',
    chapter,
    summary: 'Lists the builds of a library, newest first.',
    query: pageQuery,
    answers: [ok(named('BuildPage', buildPage))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'post',
    path: '/libraries/:library/builds',
    chapter,
    summary: 'Registers the build that a preview has shown, and queues its prepare lines.',
    about:
      'Without prepare lines the build is ready at once. A folder that has been prepared already can be registered without a preview, where folders of the server’s machine are allowed.',
    body: named('RegisterBuild', z.union([registerPreviewBody, registerBuildBody])),
    answers: [created(build), ok(build, 'The library has a build of this commit or these files already.')],
    problems: ['invalid', 'forbidden', 'not_found', 'conflict', 'gone', 'unprocessable'],
  },
  {
    method: 'get',
    path: '/builds/:build',
    chapter,
    summary: 'Reads a build.',
    answers: [ok(build)],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/builds/:build/log',
    chapter,
    summary: 'Reads what preparing a build has written so far.',
    answers: [ok(named('BuildLog', buildLog))],
    problems: ['invalid', 'not_found'],
  },
  {
    method: 'get',
    path: '/builds/:build/log/events',
    chapter,
    summary: 'Sends the log of a build as it is written, and its state where it changes.',
    about: 'The stream ends behind a final state. Last-Event-ID goes on where a client left off.',
    answers: [
      events(named('BuildLogEvent', buildLogEvent), 'Server-sent events.'),
      { status: 204, meaning: 'The client has it all.' },
    ],
    problems: ['invalid', 'not_found'],
  },
];
