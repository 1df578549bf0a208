import path from 'node:path';
import { AppError } from '../../shared/errors.ts';
import { showName } from './archive-names.ts';

export interface Address {
  /** As it is handed to Git. */
  text: string;
  /** What Git may speak for it. */
  protocol: 'https' | 'ssh' | 'file';
}

const MAX_ADDRESS = 2048;

function refuse(message: string): AppError {
  return new AppError('invalid', message, { issues: [{ path: 'address', message }] });
}

/**
 * Reads the address of a repository: https, ssh (as a URL or as `user@host:path`), and an absolute path or
 * file URL where local ones are allowed. Everything else that Git knows, helper programs above all, is refused.
 */
export function readAddress(text: string, allowLocal: boolean): Address {
  if (text === '' || text.length > MAX_ADDRESS) throw refuse('Give the address of a repository.');
  if (/[\p{Cc}\p{Zl}\p{Zp}\s]/u.test(text)) throw refuse('An address has no blanks or control characters.');
  if (text.startsWith('-')) throw refuse('An address does not start with a hyphen.');
  if (/^[A-Za-z0-9+.-]*::/.test(text)) throw refuse('Addresses that name a helper program are not used.');
  if (path.isAbsolute(text)) return local(text, allowLocal);
  if (/^[A-Za-z][A-Za-z0-9+.-]*:\/\//.test(text)) return readUrl(text, allowLocal);
  const short = /^(?:[A-Za-z0-9_][\w.-]*@)?([A-Za-z0-9][A-Za-z0-9.-]*):(?!-)[^:]+$/.exec(text);
  if (short) return { text, protocol: 'ssh' };
  throw refuse(
    `${showName(text)} is not the address of a repository: https://… or user@host:path was expected.`,
  );
}

function local(text: string, allowLocal: boolean): Address {
  if (!allowLocal)
    throw refuse('Repositories on this machine are not allowed here; give an https or ssh address.');
  return { text, protocol: 'file' };
}

function readUrl(text: string, allowLocal: boolean): Address {
  let url: URL;
  try {
    url = new URL(text);
  } catch {
    throw refuse(`${showName(text)} is not a proper address.`);
  }
  if (url.protocol === 'file:') {
    if (!/^file:\/\/\//i.test(text)) throw refuse('A file address has three slashes and no host.');
    return local(text, allowLocal);
  }
  // A password would end up in lists, logs and the audit log.
  if (url.password !== '' || (url.protocol === 'https:' && url.username !== ''))
    throw refuse('Leave the user name and password out of the address.');
  if (url.protocol !== 'https:' && url.protocol !== 'ssh:')
    throw refuse(`${url.protocol.slice(0, -1)} is not used; give an https or ssh address.`);
  if (!/^\[?[A-Za-z0-9]/.test(url.hostname)) throw refuse('The address has no proper host name.');
  if (/^(?:-|%2d)/i.test(url.username)) throw refuse('A user name does not start with a hyphen.');
  return { text, protocol: url.protocol === 'https:' ? 'https' : 'ssh' };
}

const MAX_REF_BYTES = 255;

/**
 * Whether a name could be that of a branch or tag, by the rules of Git for ref names (git-check-ref-format):
 * no part starts with a dot or ends with `.lock`, no `..`, no `@{`, none of the characters that Git gives a meaning.
 * Here it may not start with a hyphen either, lest it be taken for an option.
 */
export function isRefName(name: string): boolean {
  if (name === '' || name === '@' || Buffer.byteLength(name) > MAX_REF_BYTES) return false;
  if (name.startsWith('-') || name.endsWith('.')) return false;
  if (/[\p{Cc}\p{Zl}\p{Zp} ~^:?*[\\]|\.\.|@\{/u.test(name)) return false;
  return name.split('/').every((part) => part !== '' && !part.startsWith('.') && !part.endsWith('.lock'));
}
