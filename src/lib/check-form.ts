import type { z } from 'zod';
import { AppError } from '../../shared/errors.ts';

export type FieldProblems = Record<string, string>;

export type Checked<Data> = { data: Data; problems: null } | { data: null; problems: FieldProblems };

/**
 * Reads a form with the schema that the server reads it with. `words` says for each field what is wrong with
 * it in a sentence; where it has none, the schema's own words stand.
 */
export function checkForm<Schema extends z.ZodType>(
  schema: Schema,
  values: unknown,
  words: FieldProblems = {},
): Checked<z.output<Schema>> {
  const parsed = schema.safeParse(values);
  if (parsed.success) return { data: parsed.data, problems: null };
  const problems: FieldProblems = {};
  for (const issue of parsed.error.issues) {
    const path = issue.path.join('.');
    problems[path] ??= words[path] ?? words[String(issue.path[0] ?? '')] ?? issue.message;
  }
  return { data: null, problems };
}

/** What the server found wrong, by field. */
export function problemsOf(error: unknown): FieldProblems {
  if (!(error instanceof AppError)) return {};
  const problems: FieldProblems = {};
  for (const { path, message } of error.issues) if (path !== undefined) problems[path] ??= message;
  return problems;
}

/** The sentence of an error, or null where there is none. */
export function sentenceOf(error: unknown): string | null {
  if (error === null || error === undefined) return null;
  return error instanceof AppError ? error.message : 'Something went wrong here; nothing was lost.';
}
