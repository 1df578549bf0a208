import { formatBytes } from '../../lib/format-bytes.ts';

/** The same limit as the server's, so that a large file is refused before it is sent. */
export const maxArchiveMebibytes = 100;
const maxArchiveBytes = maxArchiveMebibytes * 1024 * 1024;
export const archiveEndings = ['.tar.gz', '.tgz', '.tar', '.zip'] as const;

/** What is wrong with a file before it is sent, as a sentence; null where nothing is seen. */
export function archiveProblem(file: { name: string; size: number }): string | null {
  const name = file.name.toLowerCase();
  if (!archiveEndings.some((ending) => name.endsWith(ending))) {
    return `${file.name} is no archive that can be read; ${archiveEndings.join(', ')} are.`;
  }
  if (file.size === 0) return `${file.name} is empty.`;
  if (file.size > maxArchiveBytes) {
    return `${file.name} has ${formatBytes(file.size)}; at most ${maxArchiveMebibytes} MiB are taken.`;
  }
  return null;
}
