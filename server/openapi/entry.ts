import type { z } from 'zod';
import type { ErrorCode } from '../../shared/errors.ts';

export const apiMethods = ['get', 'post', 'put', 'patch', 'delete'] as const;
export type ApiMethod = (typeof apiMethods)[number];

/** A schema under the name that it has in the description of the API. */
export interface NamedSchema {
  name: string;
  schema: z.ZodType;
}

export const named = (name: string, schema: z.ZodType): NamedSchema => ({ name, schema });

export interface ApiAnswer {
  status: number;
  /** What it means, in a sentence. */
  meaning: string;
  body?: NamedSchema;
  /** Where the answer is no JSON, or what the events of a stream hold is `body`. */
  mediaTypes?: readonly string[];
}

/** One route, as it is told to people and programs. Paths as Express has them, below `/api`. */
export interface ApiEntry {
  method: ApiMethod;
  path: string;
  /** The chapter that it stands in. */
  chapter: string;
  summary: string;
  /** More of it, where the summary does not say enough. */
  about?: string;
  query?: z.ZodObject;
  /** Of the request, as JSON. */
  body?: NamedSchema;
  /** A form with one file of this name may be sent instead of JSON. */
  file?: { field: string; about: string };
  answers: readonly ApiAnswer[];
  /** What can go wrong besides a server that fails. */
  problems: readonly ErrorCode[];
}

export const ok = (body: NamedSchema, meaning = 'What was asked for.'): ApiAnswer => {
  return { status: 200, meaning, body };
};
export const created = (body: NamedSchema, meaning = 'It was made; Location has its address.'): ApiAnswer => {
  return { status: 201, meaning, body };
};
export const unchanged: ApiAnswer = {
  status: 304,
  meaning: 'The client has it already (If-None-Match).',
};
export const events = (body: NamedSchema, meaning: string): ApiAnswer => {
  return { status: 200, meaning, body, mediaTypes: ['text/event-stream'] };
};
export const empty = (meaning = 'It was done.'): ApiAnswer => ({ status: 204, meaning });
