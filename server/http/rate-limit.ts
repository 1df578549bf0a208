import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { AppError } from '../../shared/errors.ts';

export interface RateLimit {
  minutes: number;
  most: number;
  /** What is counted apart; the client's address where it is left out. */
  by?: (request: Request) => string;
  /** Counts only what fails: guessing, that is. */
  onlyFailures?: boolean;
}

/** Answers 429 with Retry-After where there is too much of something. Counted in this process. */
export function limitRate({ minutes, most, by, onlyFailures = false }: RateLimit): RequestHandler {
  return rateLimit({
    windowMs: minutes * 60_000,
    limit: most,
    standardHeaders: 'draft-7',
    legacyHeaders: false,
    skipSuccessfulRequests: onlyFailures,
    keyGenerator: (request) => by?.(request) ?? ipKeyGenerator(request.ip ?? ''),
    // Whether a proxy in front is believed is set by TRUSTED_PROXIES; a header from elsewhere is just ignored.
    validate: { xForwardedForHeader: false, forwardedHeader: false, keyGeneratorIpFallback: false },
    handler: (_request, _response, next) =>
      next(new AppError('too_many', 'Too many attempts; wait a while before the next one.')),
  });
}
