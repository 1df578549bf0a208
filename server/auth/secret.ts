import { randomBytes } from 'node:crypto';
import { chmodSync, linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { AppError } from '../../shared/errors.ts';

const fewestCharacters = 32;

function checked(secret: string, where: string): string {
  if (secret.length >= fewestCharacters) return secret;
  throw new AppError('invalid', `The secret in ${where} is shorter than ${fewestCharacters} characters.`);
}

/**
 * What sessions are signed with: as given, or from a file beside the database that is written once and that
 * nobody but its owner can read. Two processes that start at once get the same one: the file comes to be
 * whole, under its name, or not at all.
 */
export function readOrMakeSecret(dataFolder: string, given?: string): string {
  if (given !== undefined) return checked(given, 'AUTH_SECRET');
  mkdirSync(dataFolder, { recursive: true });
  const file = path.join(dataFolder, 'auth-secret');
  const partial = `${file}.${process.pid}.part`;
  writeFileSync(partial, `${randomBytes(32).toString('base64url')}\n`, { mode: 0o600 });
  try {
    linkSync(partial, file);
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'EEXIST')) throw error;
  } finally {
    rmSync(partial, { force: true });
  }
  chmodSync(file, 0o600);
  return checked(readFileSync(file, 'utf8').trim(), file);
}
