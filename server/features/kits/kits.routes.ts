import { Router } from 'express';
import { z } from 'zod';
import { parseRequest } from '../../http/parse-request.ts';
import { needs } from '../../http/permissions.ts';
import type { KitsService } from './kits.service.ts';

const byName = z.object({ kit: z.string().max(40) });

export function kitsRoutes(kits: KitsService): Router {
  const router = Router();
  router.get('/kits', needs('about.read'), async (_request, response) => {
    response.json({ items: await kits.list() });
  });
  router.get('/kits/:kit.tar.gz', needs('about.read'), async (request, response) => {
    const kit = await kits.get(parseRequest(byName, request.params, 'address').kit);
    response.set('ETag', `"${kit.tag}"`).set('Cache-Control', 'public, max-age=0, must-revalidate');
    if (request.fresh) {
      response.status(304).end();
      return;
    }
    response
      .set('Content-Type', 'application/gzip')
      .set('Content-Disposition', `attachment; filename="tallyroot-kit-${kit.name}.tar.gz"`)
      .send(kit.archive);
  });
  return router;
}
