import type { Request, Response } from 'express';

/**
 * Sends what can never change under its address. `tag` tells apart what an address could mean in two
 * databases on the same host; a client that has it already gets 304.
 */
export function sendImmutable(request: Request, response: Response, tag: string, body: () => unknown): void {
  response.set('ETag', `"${tag}"`);
  response.set('Cache-Control', 'private, max-age=0, must-revalidate');
  if (request.fresh) response.status(304).end();
  else response.json(body());
}
