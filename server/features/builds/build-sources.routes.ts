import { Router } from 'express';
import { z } from 'zod';
import { AppError } from '../../../shared/errors.ts';
import { type BuildLogEvent, gitRefsQuery, previewBuildBody } from '../../../shared/schemas/builds.ts';
import { rowId, slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofBuild, ofLibrary } from '../../http/permissions.ts';
import { sendPolledEvents } from '../../http/polled-events.ts';
import { accessOf, actorOf } from '../../http/session.ts';
import { dropUpload, receiveUpload, uploadOf } from '../../http/upload.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { BuildLogsService } from './build-logs.service.ts';
import type { BuildPreviewsService } from './build-previews.service.ts';

const inLibrary = z.object({ library: slug });
const byPreview = z.object({ library: slug, preview: rowId });
const byId = z.object({ build: rowId });
const maxArchiveBytes = 100 * 1024 * 1024;

/** Where builds come from, and what preparing them wrote. */
export function buildSourcesRoutes(
  previews: BuildPreviewsService,
  logs: BuildLogsService,
  bus: EventBus,
): Router {
  const router = Router();
  const archive = receiveUpload('archive', previews.uploadsFolder, maxArchiveBytes);
  router.post(
    '/libraries/:library/build-previews',
    needs('build.register', ofLibrary),
    archive,
    async (request, response) => {
      try {
        const { library } = parseRequest(inLibrary, request.params, 'address');
        const actor = actorOf(response);
        const upload = uploadOf(request);
        if (!upload && request.is('multipart/form-data'))
          throw new AppError('invalid', 'Send the archive in this form.', {
            issues: [{ path: 'archive', message: 'a file was expected' }],
          });
        const body = upload ? null : parseBody(previewBuildBody, request);
        const preview = upload
          ? await previews.fromArchive(actor, library, upload)
          : body?.git
            ? await previews.fromGit(actor, library, body.git)
            : await previews.fromFolder(actor, library, body?.folder ?? '');
        response.status(201).location(`/api/libraries/${library}/build-previews/${preview.id}`).json(preview);
      } finally {
        await dropUpload(request);
      }
    },
  );
  router.get(
    '/libraries/:library/build-previews/:preview',
    needs('build.register', ofLibrary),
    (request, response) => {
      const { library, preview } = parseRequest(byPreview, request.params, 'address');
      response.json(previews.get(library, preview));
    },
  );
  router.get('/git-refs', needs('git.look'), async (request, response) => {
    response.json(await previews.listRefs(parseRequest(gitRefsQuery, request.query, 'query').address));
  });
  router.get('/builds/:build/log', needs('build.follow', ofBuild), (request, response) => {
    response.json(logs.get(parseRequest(byId, request.params, 'address').build));
  });
  router.get('/builds/:build/log/events', needs('build.follow', ofBuild), (request, response) => {
    const { build } = parseRequest(byId, request.params, 'address');
    let told = '';
    const access = accessOf(response);
    sendPolledEvents(request, response, {
      bus,
      read(after) {
        // Throws where the one who follows has meanwhile lost the right to: that ends the stream.
        if (!access.isStillGood()) throw new AppError('unauthenticated', 'Sign in again.');
        access.require('build.follow', [{ build }]);
        const { pieces, state, reason, isOver } = logs.follow(build, after);
        const events: { id?: number; data: BuildLogEvent }[] = pieces.map((piece) => ({
          id: piece.id,
          data: piece,
        }));
        // A state that ends the log comes behind it, any other before what is written in it.
        const change = { data: { kind: 'state' as const, state, reason } };
        if (told !== state) events.splice(isOver ? events.length : 0, 0, change);
        told = state;
        return { events, isOver };
      },
    });
  });
  return router;
}
