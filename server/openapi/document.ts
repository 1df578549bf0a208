import { z } from 'zod';
import { type ErrorCode, errorStatus } from '../../shared/errors.ts';
import { problem } from '../../shared/schemas/problem.ts';
import type { ApiAnswer, ApiEntry, NamedSchema } from './entry.ts';

/** What each route needs, by its key, as its routes declare it. */
export type Actions = ReadonlyMap<string, string>;

export const keyOf = ({ method, path }: { method: string; path: string }): string => `${method} ${path}`;

type Json = Record<string, unknown>;

const refTo = (name: string): Json => ({ $ref: `#/components/schemas/${name}` });
const problemSchema: NamedSchema = { name: 'Problem', schema: problem };

/** JSON Schemas of everything that has a name, referring to each other; bodies as they are sent. */
export function componentSchemas(entries: readonly ApiEntry[]): Json {
  const collect = (schemas: readonly NamedSchema[], io: 'input' | 'output'): Json => {
    const registry = z.registry<{ id: string }>();
    for (const { name, schema } of schemas) registry.add(schema, { id: name });
    const made = z.toJSONSchema(registry, { io, uri: (id) => `#/components/schemas/${id}` }).schemas;
    return Object.fromEntries(
      Object.entries(made).map(([name, { $schema: _schema, $id: _id, ...rest }]) => [name, rest]),
    );
  };
  const bodies = entries.flatMap((entry) => entry.body ?? []);
  const answers = entries.flatMap((entry) => entry.answers.flatMap((answer) => answer.body ?? []));
  return { ...collect(bodies, 'input'), ...collect([...answers, problemSchema], 'output') };
}

function queryParameters(query: z.ZodObject | undefined): Json[] {
  if (!query) return [];
  const { properties = {}, required = [] } = z.toJSONSchema(query, { io: 'input' });
  return Object.entries(properties).map(([name, schema]) => ({
    name,
    in: 'query',
    required: required.includes(name),
    schema,
  }));
}

function pathParameters(path: string): Json[] {
  return [...path.matchAll(/:(\w+)/g)].map(([, name = '']) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: ['library', 'suite', 'kit'].includes(name) ? 'string' : 'integer' },
  }));
}

function responseOf(answer: ApiAnswer): Json {
  const { meaning, body, mediaTypes = body ? ['application/json'] : [] } = answer;
  if (mediaTypes.length === 0) return { description: meaning };
  const content = mediaTypes.map((type) => {
    const hasSchema = body && (type === 'application/json' || type === 'text/event-stream');
    return [type, { schema: hasSchema ? refTo(body.name) : { type: 'string' } }];
  });
  return { description: meaning, content: Object.fromEntries(content) };
}

function problemResponses(codes: readonly ErrorCode[]): Json {
  const content = { 'application/problem+json': { schema: refTo('Problem') } };
  const all = [...new Set(codes)].map((code) => [errorStatus[code], { description: `\`${code}\``, content }]);
  return { ...Object.fromEntries(all), default: { description: 'Any other failure.', content } };
}

function requestBody({ body, file }: ApiEntry): Json | undefined {
  if (!body) return undefined;
  const content: Json = { 'application/json': { schema: refTo(body.name) } };
  if (file)
    content['multipart/form-data'] = {
      schema: {
        type: 'object',
        properties: { [file.field]: { type: 'string', format: 'binary', description: file.about } },
        required: [file.field],
      },
    };
  return { required: true, content };
}

/** A name for the operation that stays: its method and the words of its path. */
export function operationId({ method, path }: Pick<ApiEntry, 'method' | 'path'>): string {
  const words = path.split(/[^A-Za-z]+/).filter((word) => word !== '');
  return method + words.map((word) => word.charAt(0).toUpperCase() + word.slice(1)).join('');
}

function operation(entry: ApiEntry, action: string | undefined): Json {
  const { summary, about, chapter, answers, problems } = entry;
  const successes = answers.map((answer) => [answer.status, responseOf(answer)]);
  return {
    operationId: operationId(entry),
    summary,
    ...(about === undefined ? {} : { description: about }),
    tags: [chapter],
    ...(action === undefined ? {} : { 'x-permission': action }),
    parameters: [...pathParameters(entry.path), ...queryParameters(entry.query)],
    requestBody: requestBody(entry),
    responses: { ...Object.fromEntries(successes), ...problemResponses(problems) },
  };
}

/** The description of the API as OpenAPI 3.1, whose schemas are JSON Schema of draft 2020-12. */
export function openApiDocument(
  entries: readonly ApiEntry[],
  version: string,
  actions: Actions = new Map(),
): Json {
  const paths: Record<string, Json> = {};
  for (const entry of entries) {
    const path = entry.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [entry.method]: operation(entry, actions.get(keyOf(entry))) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Tallyroot',
      version,
      summary: 'Measures root-finding solvers and says exactly what changed between two builds.',
    },
    servers: [{ url: '/api' }],
    tags: [...new Set(entries.map((entry) => entry.chapter))].map((name) => ({ name })),
    paths,
    components: { schemas: componentSchemas(entries) },
  };
}
