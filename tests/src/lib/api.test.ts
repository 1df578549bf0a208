import { afterEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { AppError } from '../../../shared/errors.ts';
import { apiGet, apiGetAll, apiSend, toQuery } from '../../../src/lib/api.ts';

const schema = z.strictObject({ name: z.string() });

function answer(...responses: Response[]): { urls: string[] } {
  const urls: string[] = [];
  vi.stubGlobal('fetch', async (url: string) => {
    urls.push(url);
    const next = responses.shift();
    if (next === undefined) throw new TypeError('no network');
    return next;
  });
  return { urls };
}

const json = (body: unknown, status = 200): Response => new Response(JSON.stringify(body), { status });

async function errorOf(promise: Promise<unknown>): Promise<AppError> {
  const error: unknown = await promise.then(
    () => null,
    (thrown: unknown) => thrown,
  );
  if (!(error instanceof AppError)) throw new Error('an AppError was expected');
  return error;
}

afterEach(() => vi.unstubAllGlobals());

describe('API client', () => {
  it('reads under /api and gives what the schema says', async () => {
    const { urls } = answer(json({ name: 'larkroots' }));
    expect(await apiGet(schema, '/libraries/larkroots')).toEqual({ name: 'larkroots' });
    expect(urls).toEqual(['/api/libraries/larkroots']);
  });

  it('turns problem details into an AppError with their code, sentence and issues', async () => {
    answer(
      json(
        {
          type: 'urn:tallyroot:problem:conflict',
          title: 'In conflict',
          status: 409,
          detail: 'There is one already.',
          code: 'conflict',
          requestId: 'r1',
          issues: [{ path: 'slug', message: 'taken' }],
        },
        409,
      ),
    );
    const error = await errorOf(apiSend('POST', schema, '/libraries', { slug: 'x' }));
    expect([error.code, error.message]).toEqual(['conflict', 'There is one already.']);
    expect(error.issues).toEqual([{ path: 'slug', message: 'taken' }]);
  });

  it('says that the server does not answer where its error is none of ours', async () => {
    answer(new Response('<h1>Bad gateway</h1>', { status: 502 }));
    expect((await errorOf(apiGet(schema, '/x'))).code).toBe('unavailable');
  });

  it('says that the server cannot be reached where there is no network', async () => {
    answer();
    expect((await errorOf(apiGet(schema, '/x'))).code).toBe('unavailable');
  });

  it('refuses an answer that the schema does not know, and names the place', async () => {
    answer(json({ name: 7 }));
    const error = await errorOf(apiGet(schema, '/x'));
    expect(error.code).toBe('internal');
    expect(error.issues[0]?.path).toBe('name');
  });

  it('reads a list page by page until there is no next', async () => {
    const page = z.strictObject({ items: z.array(schema), next: z.string().nullable() });
    const { urls } = answer(
      json({ items: [{ name: 'a' }], next: 'c1' }),
      json({ items: [{ name: 'b' }], next: null }),
    );
    expect((await apiGetAll(page, '/libraries')).map((item) => item.name)).toEqual(['a', 'b']);
    expect(urls).toEqual(['/api/libraries?limit=500', '/api/libraries?limit=500&cursor=c1']);
  });

  it('leaves unset values out of a query and repeats lists', () => {
    expect(toQuery({ a: undefined, b: null, c: '', d: 0, e: ['x', 'y z'] })).toBe('?d=0&e=x&e=y+z');
    expect(toQuery({})).toBe('');
  });

  it('never makes code from text, which the content policy forbids', () => {
    expect(z.config().jitless).toBe(true);
  });
});
