import { AppError } from '../../shared/errors.ts';

/**
 * The rules for names that come from outside, whether in an archive or in a commit, so that no file can land
 * outside its folder, replace another, or mean something else on another file system.
 */

const MAX_NAME_BYTES = 255;
const MAX_PATH_BYTES = 1024;
/** Keeps the work a path bounded: a path of 1024 bytes could otherwise name 512 folders. */
const MAX_DEPTH = 64;
const SHOWN_LENGTH = 120;

export type EntryKind = 'file' | 'folder';
export type Origin = 'archive' | 'commit';

/** A name made safe to print: control, formatting and line characters as `\u{…}`, cut where it is long. */
export function showName(name: string): string {
  const whole = Array.from(name);
  const shown = whole.slice(0, SHOWN_LENGTH).map((character) => {
    if (!/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}\uFFFD]/u.test(character)) return character;
    return `\\u{${(character.codePointAt(0) ?? 0).toString(16)}}`;
  });
  return whole.length > SHOWN_LENGTH ? `${shown.join('')}…` : shown.join('');
}

/** The refusal of a whole archive or commit for the sake of one entry. */
export function refuseEntry(origin: Origin, name: string, reason: string, cause?: unknown): AppError {
  const shown = showName(name);
  return new AppError('unprocessable', `The ${origin} was refused: ${shown} ${reason}.`, {
    issues: [{ path: shown, message: reason }],
    cause,
  });
}

/** The refusal of a whole archive or commit that is at fault as such. */
export function refuseWhole(origin: Origin, reason: string, cause?: unknown): AppError {
  return new AppError('unprocessable', `The ${origin} was refused: ${reason}.`, {
    issues: [{ path: origin, message: reason }],
    cause,
  });
}

/** UTF-8 read strictly; null where the bytes are none. */
export function decodeName(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

/** Two names that some file system takes for one fold to the same text. */
export function foldName(segment: string): string {
  return segment.normalize('NFD').toUpperCase().toLowerCase().normalize('NFC');
}

/** Git would take such a folder for a repository and obey its configuration, which can name programs. */
function isGitFolder(segment: string): boolean {
  const bare = foldName(segment).replace(/\p{Default_Ignorable_Code_Point}/gu, '');
  return bare === '.git' || bare === 'git~1';
}

/** What is wrong with one name between slashes, or null. */
function faultOf(segment: string): string | null {
  if (segment === '') return 'has an empty part in its path';
  if (segment === '..') return 'leads out of its folder with ..';
  if (segment === '.') return 'has a part in its path that is only a dot';
  if (/^[A-Za-z]:/.test(segment)) return 'starts with a drive letter';
  if (Buffer.byteLength(segment) > MAX_NAME_BYTES) return `has a name longer than ${MAX_NAME_BYTES} bytes`;
  if (isGitFolder(segment)) return 'belongs to a Git repository; leave the .git folder out';
  return null;
}

/** What is wrong with a path as it is written, or null. */
function pathFaultOf(name: string): string | null {
  if (name === '') return 'has no name';
  if (name.includes('\0')) return 'has a NUL character in its name';
  if (/\p{Cc}/u.test(name)) return 'has a control character in its name';
  if (name.includes('\uFFFD')) return 'has a name that is not UTF-8';
  if (/[\u200E\u200F\u061C\u202A-\u202E\u2066-\u2069\u2028\u2029]/u.test(name))
    return 'has a character in its name that changes the direction or the line of writing';
  if (name.includes('\\')) return 'has a backslash in its name';
  if (name.startsWith('/')) return 'has an absolute path';
  if (Buffer.byteLength(name) > MAX_PATH_BYTES) return `has a path longer than ${MAX_PATH_BYTES} bytes`;
  return null;
}

interface TreeNode {
  path: string;
  kind: EntryKind;
  /** An entry of its own, not only a folder on the way to one. */
  isDeclared: boolean;
}

/** Collects the entries of one archive or commit and refuses those that cannot stand beside the others. */
export class EntryTree {
  readonly #nodes = new Map<string, TreeNode>();
  readonly #origin: Origin;
  readonly #maxEntries: number;

  constructor(origin: Origin, maxEntries: number) {
    this.#origin = origin;
    this.#maxEntries = maxEntries;
  }

  /** The path to use, without `./` before or `/` behind; '' where the entry is the root itself. */
  add(name: string, kind: EntryKind): string {
    const path = this.#clean(name, kind);
    if (path === '') return path;
    const segments = path.split('/');
    if (segments.length > MAX_DEPTH) throw this.#refuse(name, `lies more than ${MAX_DEPTH} folders deep`);
    let spelled = '';
    let key = '';
    for (const [index, segment] of segments.entries()) {
      const fault = faultOf(segment);
      if (fault !== null) throw this.#refuse(name, fault);
      spelled = index === 0 ? segment : `${spelled}/${segment}`;
      key = `${key}/${foldName(segment)}`;
      const isLast = index === segments.length - 1;
      this.#place(key, { path: spelled, kind: isLast ? kind : 'folder', isDeclared: isLast }, name);
    }
    return path;
  }

  /**
   * To be called when all entries are in. Git takes any folder with HEAD, objects and refs for a repository and
   * obeys the `config` beside them, which can name programs; no source needs to look like that.
   */
  finish(): void {
    for (const [key, node] of this.#nodes) {
      if (!key.endsWith('/head')) continue;
      const beside = (name: string): boolean => this.#nodes.has(`${key.slice(0, -'head'.length)}${name}`);
      if (beside('commondir') || (beside('objects') && beside('refs')))
        throw this.#refuse(node.path, 'lies in a folder that Git would take for a repository');
    }
  }

  #clean(name: string, kind: EntryKind): string {
    const fault = pathFaultOf(name);
    if (fault !== null) throw this.#refuse(name, fault);
    const path = name.startsWith('./') ? name.slice(2) : name;
    if (kind === 'folder') return path === '.' ? '' : path.replace(/\/$/, '');
    if (path.endsWith('/') || path === '') throw this.#refuse(name, 'is a file with the name of a folder');
    return path;
  }

  #place(key: string, node: TreeNode, name: string): void {
    const known = this.#nodes.get(key);
    if (!known) {
      if (this.#nodes.size >= this.#maxEntries)
        throw refuseWhole(this.#origin, `it has more than ${this.#maxEntries} files and folders`);
      this.#nodes.set(key, node);
      return;
    }
    if (known.path !== node.path)
      throw this.#refuse(
        name,
        `differs from ${showName(known.path)} only in capital letters or in how its letters are encoded`,
      );
    if (known.kind !== node.kind) throw this.#refuse(name, 'is a file where another entry has a folder');
    if (known.isDeclared && node.isDeclared) throw this.#refuse(name, 'is there twice');
    known.isDeclared ||= node.isDeclared;
  }

  #refuse(name: string, reason: string): AppError {
    return refuseEntry(this.#origin, name, reason);
  }
}
