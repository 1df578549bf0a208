import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';

/** A file that imports what its part of the tree may not. */
export interface Breach {
  file: string;
  imported: string;
  rule: string;
}

const sharedPackages = /^(zod|decimal\.js|mathjs(\/number)?|yaml|@stdlib\/[a-z0-9-]+)$/;
const importPattern =
  /(?:^|\n)\s*(?:import|export)\s(?:[^'"`;]*?\sfrom\s)?['"]([^'"]+)['"]|import\(\s*['"]([^'"]+)['"]\s*\)/g;

/** The folder of the first level that a path of the project lies in. */
function partOf(path: string): string {
  return path.split('/')[0] ?? '';
}

/** What a source file imports, as written. */
export function importsOf(source: string): string[] {
  return [...source.matchAll(importPattern)].map((match) => match[1] ?? match[2] ?? '');
}

/** Breaches of the import directions in one file; `file` is relative to the project's root. */
export function breachesOf(file: string, source: string): Breach[] {
  const breaches: Breach[] = [];
  const add = (imported: string, rule: string): void => void breaches.push({ file, imported, rule });
  for (const imported of importsOf(source)) {
    const isRelative = imported.startsWith('.');
    const target = isRelative ? relative('.', resolve(dirname(file), imported)) : null;
    const part = partOf(file);
    if (target !== null) {
      const targetPart = partOf(target);
      if (part === 'shared' && targetPart !== 'shared') add(imported, 'shared knows nothing of the others');
      if (part === 'server' && !['server', 'shared'].includes(targetPart))
        add(imported, 'server imports server and shared');
      if (part === 'src' && !['src', 'shared'].includes(targetPart))
        add(imported, 'src imports src and shared');
      const feature = /^src\/features\/([^/]+)\//.exec(file)?.[1];
      const other = /^src\/features\/([^/]+)\//.exec(target)?.[1];
      if (feature !== undefined && other !== undefined && feature !== other)
        add(imported, 'a feature never imports another');
      if (file.startsWith('server/http/') && target.startsWith('server/features/'))
        add(imported, 'http knows no resource');
      if (!file.endsWith('.repo.ts') && /\.routes\.ts$/.test(file) && /\.repo(\.ts)?$/.test(target)) {
        add(imported, 'routes speak to services, not to tables');
      }
    } else if (part === 'shared' && !sharedPackages.test(imported)) {
      add(imported, 'shared runs in browser and Node alike');
    } else if (part === 'src' && imported.startsWith('node:')) {
      add(imported, 'src runs in a browser');
    }
  }
  if (partOf(file) === 'server' && file !== 'server/config.ts' && /\bprocess\.env\b/.test(source)) {
    add('process.env', 'only server/config.ts reads the environment');
  }
  return breaches;
}

/** Every source file below a folder of the project, relative to its root. */
export function sourceFiles(root: string, folder: string): { file: string; source: string }[] {
  return readdirSync(join(root, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.(ts|tsx)$/.test(entry.name))
    .map((entry) => relative(root, join(entry.parentPath, entry.name)))
    .map((file) => ({ file, source: readFileSync(join(root, file), 'utf8') }));
}
