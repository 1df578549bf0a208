import { Router } from 'express';
import { z } from 'zod';
import { comparisonProfileQuery, comparisonQuery, exportQuery } from '../../../shared/schemas/comparisons.ts';
import { rowId } from '../../../shared/schemas/paging.ts';
import { runProfileQuery } from '../../../shared/schemas/profiles.ts';
import { sendImmutable } from '../../http/immutable.ts';
import { parseRequest } from '../../http/parse-request.ts';
import { needs, ofComparison, ofRun } from '../../http/permissions.ts';
import type { CodeDiffsService } from './code-diffs.service.ts';
import type { ExportsService } from './exports.service.ts';
import type { ProfilesService } from './profiles.service.ts';

const byRun = z.object({ run: rowId });

/** What goes with a comparison: files of it, the code beside it, profiles. */
export function comparisonExtrasRoutes(
  exports: ExportsService,
  codeDiffs: CodeDiffsService,
  profiles: ProfilesService,
): Router {
  const router = Router();
  router.get('/comparisons/export', needs('library.read', ofComparison), (request, response) => {
    const { name, mediaType, text } = exports.make(parseRequest(exportQuery, request.query, 'query'));
    response
      .set('Content-Type', mediaType)
      .set('Content-Disposition', `attachment; filename="${name}"`)
      .send(Buffer.from(text));
  });
  router.get('/comparisons/code-diff', needs('library.read', ofComparison), async (request, response) => {
    const { tag, read } = await codeDiffs.find(parseRequest(comparisonQuery, request.query, 'query'));
    if (tag === null) {
      response.json(await read());
      return;
    }
    // Read only where the client does not have it already.
    response.set('ETag', `"${tag}"`);
    const body = request.fresh ? null : await read();
    sendImmutable(request, response, tag, () => body);
  });
  router.get('/comparisons/profile', needs('library.read', ofComparison), (request, response) => {
    response.json(profiles.ofComparison(parseRequest(comparisonProfileQuery, request.query, 'query')));
  });
  router.get('/runs/:run/profile', needs('library.read', ofRun), (request, response) => {
    const { run } = parseRequest(byRun, request.params, 'address');
    response.json(profiles.ofRun(run, parseRequest(runProfileQuery, request.query, 'query')));
  });
  return router;
}
