import { existsSync } from 'node:fs';
import { readdir, stat } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const projectFolder = fileURLToPath(new URL('..', import.meta.url));
export const clientFolder = path.join(projectFolder, 'dist');
const sources = ['src', 'shared', 'index.html', 'vite.config.ts', 'package-lock.json'];

async function newestTime(file: string): Promise<number> {
  if (!existsSync(file)) return 0;
  const { mtimeMs } = await stat(file);
  const entries = await readdir(file, { withFileTypes: true, recursive: true }).catch(() => []);
  const times = await Promise.all(
    entries
      .filter((entry) => entry.isFile())
      .map(async (entry) => (await stat(path.join(entry.parentPath, entry.name))).mtimeMs),
  );
  return Math.max(mtimeMs, ...times);
}

/** Whether the client has to be built: never built, or something that it is made of is newer. */
export async function isClientStale(folder = projectFolder): Promise<boolean> {
  const page = path.join(folder, 'dist', 'index.html');
  if (!existsSync(page)) return true;
  const { mtimeMs } = await stat(page);
  const times = await Promise.all(sources.map((source) => newestTime(path.join(folder, source))));
  return times.some((time) => time > mtimeMs);
}

export async function buildClient(): Promise<void> {
  const { build } = await import('vite');
  await build({ root: projectFolder, logLevel: 'warn' });
}
