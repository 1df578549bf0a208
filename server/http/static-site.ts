import path from 'node:path';
import express, { type RequestHandler } from 'express';

/** The built client: files with a hash in their name may be kept for good, the page itself never. */
export function staticSite(folder: string): RequestHandler[] {
  const files = express.static(folder, {
    index: false,
    setHeaders(response, file) {
      const isHashed = path.relative(folder, file).startsWith(`assets${path.sep}`);
      response.set('Cache-Control', isHashed ? 'public, max-age=31536000, immutable' : 'no-cache');
    },
  });
  /** Pages are made in the browser, so every other address that asks for a page gets the same one. */
  const page: RequestHandler = (request, response, next) => {
    const isReading = request.method === 'GET' || request.method === 'HEAD';
    const isFile = request.path.startsWith('/assets/');
    if (!isReading || isFile || !request.accepts('html')) next();
    else {
      response.set('Cache-Control', 'no-cache');
      response.sendFile(path.join(folder, 'index.html'), (error) => {
        // Called on success as well, when nothing may follow.
        if (error) next(error);
      });
    }
  };
  return [files, page];
}
