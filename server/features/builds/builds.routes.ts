import { Router } from 'express';
import { z } from 'zod';
import { registerBuildBody, registerPreviewBody } from '../../../shared/schemas/builds.ts';
import { pageQuery, rowId, slug } from '../../../shared/schemas/paging.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { needs, ofBuild, ofLibrary } from '../../http/permissions.ts';
import { actorOf } from '../../http/session.ts';
import type { BuildsService } from './builds.service.ts';

const inLibrary = z.object({ library: slug });
const byId = z.object({ build: rowId });

export function buildsRoutes(builds: BuildsService): Router {
  const router = Router();
  router.get('/libraries/:library/builds', needs('library.read', ofLibrary), (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    response.json(builds.list(library, parseRequest(pageQuery, request.query, 'query')));
  });
  router.post('/libraries/:library/builds', needs('build.register', ofLibrary), async (request, response) => {
    const { library } = parseRequest(inLibrary, request.params, 'address');
    const actor = actorOf(response);
    const { build, isNew } = isOfPreview(request.body)
      ? await builds.registerPreview(actor, library, parseBody(registerPreviewBody, request))
      : await builds.registerNamedFolder(actor, library, parseBody(registerBuildBody, request));
    response
      .status(isNew ? 201 : 200)
      .location(`/api/builds/${build.id}`)
      .json(build);
  });
  router.get('/builds/:build', needs('build.follow', ofBuild), (request, response) => {
    response.json(builds.get(parseRequest(byId, request.params, 'address').build));
  });
  return router;
}

function isOfPreview(body: unknown): boolean {
  return typeof body === 'object' && body !== null && 'preview' in body;
}
