import { readFileSync } from 'node:fs';
import { LineCounter, parseDocument } from 'yaml';
import type { z } from 'zod';
import { AppError, type Issue } from '../../shared/errors.ts';

/** Reads a small YAML (or JSON) file and checks it; every problem is reported with line and column. */
export function readYamlOrJson<Schema extends z.ZodType>(path: string, schema: Schema): z.infer<Schema> {
  let text: string;
  try {
    text = readFileSync(path, 'utf8');
  } catch (cause) {
    throw new AppError('not_found', `${path} cannot be read.`, { cause });
  }
  const lines = new LineCounter();
  const document = parseDocument(text, { lineCounter: lines, schema: 'core', version: '1.2' });
  const place = (offset: number): { line: number; column: number } => {
    const { line, col } = lines.linePos(offset);
    return { line, column: col };
  };
  const problems: Issue[] = document.errors.map((error) => ({
    ...place(error.pos[0]),
    message: error.message.split('\n')[0] ?? '',
  }));
  if (problems.length > 0) throw new AppError('invalid', `${path} is no YAML.`, { issues: problems });
  const parsed = schema.safeParse(document.toJS({ maxAliasCount: 0 }));
  if (parsed.success) return parsed.data;
  const issues = parsed.error.issues.map((issue): Issue => {
    const keys = issue.path.map(String);
    const node: unknown = document.getIn(issue.path, true);
    const range = typeof node === 'object' && node !== null && 'range' in node ? node.range : null;
    const offset = Array.isArray(range) && typeof range[0] === 'number' ? range[0] : 0;
    return { ...place(offset), path: keys.join('.'), message: `${keys.join('.')}: ${issue.message}` };
  });
  throw new AppError('invalid', `${path} does not have the expected shape.`, { issues });
}
