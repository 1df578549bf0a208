import type { RequestHandler } from 'express';
import helmet from 'helmet';

/**
 * Everything comes from this server itself; no inline script, no eval. Styles may be inline, since charts
 * set lengths on elements.
 */
export function securityHeaders(options: { isDevelopment: boolean }): RequestHandler {
  // The development server injects scripts into the page and talks over a web socket.
  const scripts = options.isDevelopment ? ["'self'", "'unsafe-inline'"] : ["'self'"];
  const connections = options.isDevelopment ? ["'self'", 'ws:'] : ["'self'"];
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'none'"],
        scriptSrc: scripts,
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:'],
        fontSrc: ["'self'"],
        connectSrc: connections,
        manifestSrc: ["'self'"],
        workerSrc: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        baseUri: ["'none'"],
      },
    },
    // Whether https is forced is for whoever puts a proxy in front to decide.
    strictTransportSecurity: false,
    referrerPolicy: { policy: 'same-origin' },
  });
}
