import { createHash, randomBytes } from 'node:crypto';
import { constants, mkdirSync } from 'node:fs';
import { cp, lstat, mkdir, readdir, rename, rm, utimes } from 'node:fs/promises';
import path from 'node:path';

/** What the files in the store are needed for. */
export interface StoreNeeds {
  sources: ReadonlySet<string>;
  addresses: ReadonlySet<string>;
  /** Absolute paths of the folders that builds are run in. */
  folders: ReadonlySet<string>;
}

/** Younger things may be on their way to a row that will need them. */
const graceMs = 3_600_000;

/**
 * The files of builds below the data folder: `sources` as they came, named by commit or by contents and never
 * written to again; `builds`, a copy of a source for each build to be prepared and run in; `mirrors` of
 * repositories; `uploads` on their way in.
 */
export function createBuildStore(dataFolder: string) {
  const root = path.resolve(dataFolder);
  const places = {
    sources: path.join(root, 'sources'),
    builds: path.join(root, 'builds'),
    mirrors: path.join(root, 'mirrors'),
    uploads: path.join(root, 'uploads'),
  };
  const mirrorName = (address: string): string => createHash('sha256').update(address).digest('hex');
  const sourceFolder = (key: string): string => path.join(places.sources, key);

  async function newName(place: keyof typeof places, start: string): Promise<string> {
    await mkdir(places[place], { recursive: true, mode: 0o700 });
    return path.join(places[place], `${start}-${randomBytes(8).toString('hex')}`);
  }

  async function sweepPlace(place: keyof typeof places, isNeeded: (name: string) => boolean, before: number) {
    const names = await readdir(places[place]).catch(() => []);
    for (const name of names) {
      const whole = path.join(places[place], name);
      const found = await lstat(whole).catch(() => null);
      if (found === null || found.ctimeMs > before || isNeeded(name)) continue;
      await rm(whole, { recursive: true, force: true });
    }
  }

  return {
    sourceFolder,
    /** Where uploads are written; made here, since what writes them expects it. */
    uploadsFolder(): string {
      mkdirSync(places.uploads, { recursive: true, mode: 0o700 });
      return places.uploads;
    },
    async mirrorFolder(address: string): Promise<string> {
      await mkdir(places.mirrors, { recursive: true, mode: 0o700 });
      return path.join(places.mirrors, mirrorName(address));
    },
    /** A name that nothing bears yet, for a source that is being written. */
    newSource: (): Promise<string> => newName('sources', 'new'),
    /** Takes over what has been written under its key; what is there already is the same and stays. */
    async keep(written: string, key: string): Promise<void> {
      const folder = sourceFolder(key);
      try {
        await rename(written, folder);
      } catch (error) {
        const isThere = await lstat(folder).then(
          () => true,
          () => false,
        );
        if (!isThere) throw error;
        await rm(written, { recursive: true, force: true });
        // Needed anew: a sweep that is under way leaves it alone.
        await utimes(folder, new Date(), new Date());
      }
    },
    /** A fresh copy of a source for a build to be prepared and run in. */
    async copyForBuild(key: string): Promise<string> {
      const folder = await newName('builds', key.slice(0, 24));
      await cp(sourceFolder(key), folder, {
        recursive: true,
        // Links were checked to stay inside; made absolute they would lead back to the source.
        verbatimSymlinks: true,
        errorOnExist: true,
        force: false,
        mode: constants.COPYFILE_FICLONE,
      });
      return folder;
    },
    /** Takes a copy away; anything that is not one is left alone. */
    async dropCopy(folder: string): Promise<void> {
      if (path.dirname(folder) === places.builds) await rm(folder, { recursive: true, force: true });
    },
    /** Removes what nothing refers to. */
    async sweep(needs: () => StoreNeeds, now: number): Promise<void> {
      const before = now - graceMs;
      const known = needs();
      // Looked at again before something is removed: it may have come to be needed meanwhile.
      const isNeeded = (test: (needs: StoreNeeds) => boolean): boolean => test(known) || test(needs());
      await sweepPlace('sources', (name) => isNeeded(({ sources }) => sources.has(name)), before);
      const inBuilds = (name: string): string => path.join(places.builds, name);
      await sweepPlace('builds', (name) => isNeeded(({ folders }) => folders.has(inBuilds(name))), before);
      const isMirror = (name: string) => (all: StoreNeeds) =>
        [...all.addresses].some((address) => mirrorName(address) === name);
      await sweepPlace('mirrors', (name) => isNeeded(isMirror(name)), before);
      await sweepPlace('uploads', () => false, before);
    },
  };
}

export type BuildStore = ReturnType<typeof createBuildStore>;
