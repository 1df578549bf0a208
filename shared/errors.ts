/** The closed list of error codes, and the problem envelope (RFC 9457) in which they travel. */
export const errorStatus = {
  invalid: 400,
  unauthenticated: 401,
  forbidden: 403,
  not_found: 404,
  conflict: 409,
  gone: 410,
  too_large: 413,
  unprocessable: 422,
  too_many: 429,
  internal: 500,
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof errorStatus;

/** One thing that is wrong in an input, at a path in it or a line and column of its text (both from 1). */
export interface Issue {
  path?: string;
  line?: number;
  column?: number;
  message: string;
}

export interface AppErrorOptions {
  issues?: Issue[];
  cause?: unknown;
}

/** An expected failure; its message is a sentence that a user can act on. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly issues: Issue[];

  constructor(code: ErrorCode, message: string, options: AppErrorOptions = {}) {
    super(message, options.cause === undefined ? undefined : { cause: options.cause });
    this.name = 'AppError';
    this.code = code;
    this.issues = options.issues ?? [];
  }
}
