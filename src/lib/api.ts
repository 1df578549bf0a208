import { z } from 'zod';
import { AppError } from '../../shared/errors.ts';
import { problem } from '../../shared/schemas/problem.ts';

// The content policy forbids code made from text; without this the parser would try to make some.
z.config({ jitless: true });

const root = '/api';

export type QueryValue = string | number | boolean | undefined | null | readonly string[];

/** `?a=1&b=x&b=y` from a record; what is undefined, null or an empty text is left out. */
export function toQuery(values: Record<string, QueryValue>): string {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(values)) {
    if (value === undefined || value === null || value === '') continue;
    if (typeof value === 'object') for (const entry of value) search.append(name, entry);
    else search.set(name, String(value));
  }
  const text = search.toString();
  return text === '' ? '' : `?${text}`;
}

async function readJson(response: Response): Promise<unknown> {
  try {
    return await response.json();
  } catch {
    return undefined;
  }
}

/** Turns an answer that is not a success into an AppError that carries the server's code and sentence. */
async function toError(response: Response): Promise<AppError> {
  const parsed = problem.safeParse(await readJson(response));
  if (parsed.success) {
    const { code, detail, issues } = parsed.data;
    return new AppError(code, detail, issues === undefined ? {} : { issues });
  }
  return response.status >= 500
    ? new AppError('unavailable', 'The server does not answer as it should. Try again in a moment.')
    : new AppError('invalid', `The server answered ${response.status} without saying why.`);
}

async function send(path: string, init: RequestInit): Promise<Response> {
  let response: Response;
  try {
    response = await fetch(`${root}${path}`, init);
  } catch (cause) {
    if (init.signal?.aborted === true) throw cause;
    throw new AppError(
      'unavailable',
      'The server cannot be reached. What is on the sheet is kept; try again.',
      {
        cause,
      },
    );
  }
  if (!response.ok) throw await toError(response);
  return response;
}

async function parse<Schema extends z.ZodType>(schema: Schema, response: Response): Promise<z.infer<Schema>> {
  const parsed = schema.safeParse(await readJson(response));
  if (parsed.success) return parsed.data;
  const [first] = parsed.error.issues;
  throw new AppError(
    'internal',
    'The server sent something that this client does not understand; reload the page.',
    {
      issues: first === undefined ? [] : [{ path: first.path.join('.'), message: first.message }],
      cause: parsed.error,
    },
  );
}

/** Reads a resource and parses it with its schema. */
export async function apiGet<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  signal?: AbortSignal,
): Promise<z.infer<Schema>> {
  return parse(schema, await send(path, { headers: { accept: 'application/json' }, signal: signal ?? null }));
}

/** Sends a body and parses what comes back. */
export async function apiSend<Schema extends z.ZodType>(
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  schema: Schema,
  path: string,
  body: unknown = {},
): Promise<z.infer<Schema>> {
  const headers = { accept: 'application/json', 'content-type': 'application/json' };
  return parse(schema, await send(path, { method, headers, body: JSON.stringify(body) }));
}

/** Sends a body where nothing comes back. */
export async function apiDo(
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  path: string,
  body: unknown = {},
): Promise<void> {
  const headers = { accept: 'application/json', 'content-type': 'application/json' };
  await send(path, { method, headers, body: JSON.stringify(body) });
}

/** Reads every page of a list, in order. For lists that a page shows whole. */
export async function apiGetAll<Item>(
  page: z.ZodType<{ items: Item[]; next: string | null }>,
  path: string,
  query: Record<string, QueryValue> = {},
  signal?: AbortSignal,
): Promise<Item[]> {
  const items: Item[] = [];
  let cursor: string | null = null;
  do {
    const part: { items: Item[]; next: string | null } = await apiGet(
      page,
      `${path}${toQuery({ limit: 500, ...query, cursor })}`,
      signal,
    );
    items.push(...part.items);
    cursor = part.next;
  } while (cursor !== null);
  return items;
}
