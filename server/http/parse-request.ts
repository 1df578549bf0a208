import type { z } from 'zod';
import { AppError, type Issue } from '../../shared/errors.ts';

/** Every issue with the path to it, `settings.lanes` for example. */
export function issuesOf(error: z.ZodError): Issue[] {
  return error.issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message }));
}

/** Parses what came from outside; throws `invalid` with every issue. `where` names the part in the sentence. */
export function parseRequest<Schema extends z.ZodType>(
  schema: Schema,
  value: unknown,
  where: 'address' | 'query' | 'body',
): z.output<Schema> {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  const issues = issuesOf(result.error);
  const count = issues.length === 1 ? 'One thing' : `${issues.length} things`;
  throw new AppError('invalid', `${count} in the ${where} of this request cannot be used.`, { issues });
}

/** A missing body is an empty one, so that the schema says what is missing. */
export function parseBody<Schema extends z.ZodType>(
  schema: Schema,
  request: { body?: unknown },
): z.output<Schema> {
  return parseRequest(schema, request.body ?? {}, 'body');
}
