import { readFileSync, renameSync, writeFileSync } from 'node:fs';
import type { z } from 'zod';
import { AppError } from '../../shared/errors.ts';

/** Reads a JSON file and checks it; every problem is reported with its path in the file. */
export function readJsonFile<Schema extends z.ZodType>(path: string, schema: Schema): z.infer<Schema> {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (cause) {
    throw new AppError('not_found', `${path} cannot be read.`, { cause });
  }
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (cause) {
    const why = cause instanceof Error ? cause.message : String(cause);
    throw new AppError('invalid', `${path} is no JSON: ${why}.`, { cause });
  }
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const issues = parsed.error.issues.slice(0, 20).map((issue) => ({
    path: issue.path.map(String).join('.'),
    message: issue.message,
  }));
  throw new AppError('invalid', `${path} does not have the expected shape.`, { issues });
}

/** Writes a JSON file whole or not at all. */
export function writeJsonFile(path: string, value: unknown): void {
  writeTextFile(path, `${JSON.stringify(value, null, 1)}\n`);
}

/** Writes a text file whole or not at all. */
export function writeTextFile(path: string, text: string): void {
  const partial = `${path}.part`;
  writeFileSync(partial, text);
  renameSync(partial, path);
}
