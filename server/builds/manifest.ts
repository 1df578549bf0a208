import type { z } from 'zod';
import { AppError, type Issue } from '../../shared/errors.ts';
import type { Recipe } from '../../shared/schemas/builds.ts';
import { declareSolver, manifestFile, manifestLimits } from '../../shared/schemas/manifest.ts';
import { readYaml, type SourcePositions, type YamlPath } from '../../shared/suites/read-yaml.ts';

const DEPTH = 8;

/** Names may look like numbers; they are kept as they are written. */
const EXACT_KEYS = new Set(['library', 'name', 'aliases']);

/**
 * Reads a manifest. Throws AppError `invalid` with every problem found, each with its line, its column and
 * what was expected there.
 */
export function readManifest(text: string): Recipe {
  const { value, positions, issues } = readYaml(
    text,
    { bytes: manifestLimits.bytes, depth: DEPTH },
    EXACT_KEYS,
  );
  if (issues.length > 0) throw refuse(issues);
  const parsed = manifestFile.safeParse(value);
  if (!parsed.success)
    throw refuse(parsed.error.issues.flatMap((issue) => describe(issue, value, positions)));
  const { library, prepare, adapter, environment, solvers } = parsed.data;
  return { library, prepare, adapter, environment, solvers: solvers.map(declareSolver) };
}

function refuse(issues: Issue[]): AppError {
  const count = issues.length === 1 ? 'one problem' : `${issues.length} problems`;
  const [first] = issues;
  const where = first?.line === undefined ? '' : ` Line ${first.line}: ${first.message}`;
  return new AppError('invalid', `The manifest has ${count}.${where}`, { issues });
}

function describe(issue: z.core.$ZodIssue, value: unknown, positions: SourcePositions): Issue[] {
  const path = issue.path.map((part) => (typeof part === 'number' ? part : String(part)));
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => {
      return at([...path, key], positions.key([...path, key]), `The key ${key} is not known here.`);
    });
  }
  if (issue.code === 'invalid_key') {
    const [inner] = issue.issues;
    return [at(path, positions.key(path), sentence(inner?.message ?? issue.message))];
  }
  if (!hasPath(value, path)) {
    const expected = issue.code === 'invalid_type' ? `: ${typeWords(issue.expected)} was expected` : '';
    return [at(path, positions.value(path), `${path.join('.') || 'Everything'} is missing${expected}.`)];
  }
  const message = issue.code === 'invalid_type' ? `${typeWords(issue.expected)} was expected` : issue.message;
  return [at(path, positions.value(path), sentence(message))];
}

function at(path: YamlPath, position: { line: number; column: number }, message: string): Issue {
  return { path: path.join('.'), ...position, message };
}

function sentence(text: string): string {
  const start = text.charAt(0).toUpperCase() + text.slice(1);
  return start.endsWith('.') ? start : `${start}.`;
}

function typeWords(expected: string): string {
  const words: Record<string, string> = {
    string: 'a text (in quotes where it looks like a number)',
    number: 'a number',
    int: 'a whole number',
    boolean: 'true or false',
    array: 'a list',
    object: 'a set of keys with values',
    record: 'a set of keys with values',
  };
  return words[expected] ?? expected;
}

function hasPath(value: unknown, path: YamlPath): boolean {
  let here = value;
  for (const part of path) {
    if (typeof here !== 'object' || here === null || !Object.hasOwn(here, part)) return false;
    here = Object.entries(here).find(([key]) => key === String(part))?.[1];
  }
  return here !== undefined;
}
