import { z } from 'zod';
import { type ApiEntry, named, ok } from './entry.ts';

const chapter = 'Site';

export const openapiApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/openapi.json',
    chapter,
    summary: 'This description, as OpenAPI 3.1.',
    answers: [ok(named('OpenApiDocument', z.looseObject({ openapi: z.literal('3.1.0') })))],
    problems: [],
  },
  {
    method: 'get',
    path: '/docs',
    chapter,
    summary: 'This description, to read and to print.',
    answers: [{ status: 200, meaning: 'A page.', mediaTypes: ['text/html'] }],
    problems: [],
  },
];
