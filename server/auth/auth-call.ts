import type { IncomingHttpHeaders } from 'node:http';
import { isAPIError } from 'better-auth/api';
import { fromNodeHeaders } from 'better-auth/node';
import type { Request, Response } from 'express';
import { AppError } from '../../shared/errors.ts';

/** Headers for the sign-in package, which takes the address of the client from one that anybody can send. */
export function authHeaders(request: Request): Headers {
  const { authorization: _token, ...rest }: IncomingHttpHeaders = request.headers;
  const headers = fromNodeHeaders(rest);
  headers.set('x-forwarded-for', request.ip ?? '');
  return headers;
}

/** What the package's errors mean here, by its codes. */
const meanings: Record<string, { code: 'unauthenticated' | 'forbidden' | 'invalid' | 'gone'; text: string }> =
  {
    INVALID_EMAIL_OR_PASSWORD: {
      code: 'unauthenticated',
      text: 'This address and this password do not belong together.',
    },
    EMAIL_NOT_VERIFIED: {
      code: 'forbidden',
      text: 'This address has not been confirmed; the mail with the link is on its way once more.',
    },
    INVALID_TOKEN: { code: 'gone', text: 'This link is no longer good; ask for another one.' },
    TOKEN_EXPIRED: { code: 'gone', text: 'This link is no longer good; ask for another one.' },
    INVALID_PASSWORD: { code: 'forbidden', text: 'The password that you have now is another one.' },
    USER_NOT_FOUND: { code: 'gone', text: 'This link is no longer good; ask for another one.' },
  };

/** Calls the package, hands its cookies on and puts its errors into words of ours. */
export async function authCall<Result>(
  response: Response,
  call: () => Promise<{ headers: Headers; response: Result }>,
): Promise<Result> {
  try {
    const answer = await call();
    for (const cookie of answer.headers.getSetCookie()) response.append('Set-Cookie', cookie);
    return answer.response;
  } catch (error) {
    if (!isAPIError(error)) throw error;
    const code: unknown = error.body?.code;
    const known = typeof code === 'string' ? meanings[code] : undefined;
    if (known) throw new AppError(known.code, known.text, { cause: error });
    if (error.statusCode === 401) throw new AppError('unauthenticated', 'Sign in first.', { cause: error });
    throw new AppError('invalid', 'This cannot be done with what was sent.', { cause: error });
  }
}
