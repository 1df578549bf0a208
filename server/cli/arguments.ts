import { type ParseArgsConfig, parseArgs } from 'node:util';
import { AppError } from '../../shared/errors.ts';

/** Parses the words after a command; an unknown or malformed option is an error that says how it is used. */
export function parseCommand<Options extends NonNullable<ParseArgsConfig['options']>>(
  words: readonly string[],
  options: Options,
  usage: string,
) {
  try {
    return parseArgs({ args: [...words], options, allowPositionals: true, strict: true });
  } catch (cause) {
    const why = cause instanceof Error ? cause.message : String(cause);
    throw new AppError('invalid', `${why}\n\nUsage: ${usage}`, { cause });
  }
}

/** The option's text, or an error that says how the command is used. */
export function requireOption(value: string | undefined, name: string, usage: string): string {
  if (value === undefined || value === '')
    throw new AppError('invalid', `--${name} is missing.\n\nUsage: ${usage}`);
  return value;
}

/** A whole number of at least `least`. */
export function parseCount(text: string | undefined, name: string, least: number): number | undefined {
  if (text === undefined) return undefined;
  const value = Number(text);
  if (!Number.isInteger(value) || value < least || value > 1_000_000) {
    throw new AppError('invalid', `--${name} takes a whole number of at least ${least}.`);
  }
  return value;
}
