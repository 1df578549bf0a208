import { isIP } from 'node:net';
import type { Request, RequestHandler } from 'express';
import { AppError } from '../../shared/errors.ts';

const reading = new Set(['GET', 'HEAD', 'OPTIONS']);

function hostName(host: string): string | undefined {
  try {
    return new URL(`http://${host}`).hostname.replace(/^\[|\]$/g, '');
  } catch {
    return undefined;
  }
}

/**
 * Refuses requests for a host name that is not this server's: another site can point its own name at this
 * address and would then be of the same origin. Addresses in figures cannot be pointed anywhere.
 */
export function hostCheck(allowedHosts: readonly string[]): RequestHandler {
  const allowed = new Set(['localhost', ...allowedHosts]);
  return (request, _response, next) => {
    const name = hostName(request.get('host') ?? '');
    if (name === undefined || !(isIP(name) > 0 || allowed.has(name)))
      throw new AppError('forbidden', 'This server does not answer for this host name (see ALLOWED_HOSTS).');
    next();
  };
}

function isOwnOrigin(request: Request): boolean {
  const site = request.get('sec-fetch-site');
  if (site !== undefined && site !== 'same-origin' && site !== 'none') return false;
  const origin = request.get('origin');
  // Without an Origin it is no browser's form or script: browsers send it with everything but reading.
  if (origin === undefined) return true;
  try {
    return new URL(origin).host === request.get('host');
  } catch {
    return false;
  }
}

/** Changes are taken from the server's own pages only, whatever cookie comes along. */
export const originCheck: RequestHandler = (request, _response, next) => {
  if (!reading.has(request.method) && !isOwnOrigin(request))
    throw new AppError('forbidden', 'Changes are only taken from pages of this server.');
  next();
};
