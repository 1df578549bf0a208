import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Config } from './config.ts';
import { settleDemoPeople } from './demo/people.ts';
import type { Services } from './features/services.ts';

type Seed = (services: Services, folder: string) => Promise<void>;

function isSeed(value: unknown): value is Seed {
  return typeof value === 'function';
}

async function loadSeed(): Promise<Seed | undefined> {
  const url = new URL('./demo/seed.ts', import.meta.url);
  if (!existsSync(url)) return undefined;
  const module: unknown = await import(url.href);
  if (typeof module !== 'object' || module === null || !('seedDemo' in module)) return undefined;
  return isSeed(module.seedDemo) ? module.seedDemo : undefined;
}

/**
 * Fills an empty database with the demo, once. A note beside the database says how far that got, so that a
 * start that was interrupted goes on, and a database that people have begun to use is left alone.
 */
export async function seedDemoOnce(config: Config, services: Services): Promise<boolean> {
  if (!config.hasDemo) return false;
  const note = path.join(config.dataFolder, 'demo-state.txt');
  const state = existsSync(note) ? readFileSync(note, 'utf8').trim() : 'none';
  const isEmpty = services.libraries.list({ limit: 1 }).items.length === 0;
  // A demo from before people signed in gets its people.
  const isWhole =
    state === 'done' &&
    services.libraries.list({ limit: 500 }).items.some(({ slug }) => slug === 'larkroots');
  if (isWhole && !services.people.hasRealPeople()) settleDemoPeople(services, 'larkroots');
  if (state === 'done' || (state === 'none' && !isEmpty)) return false;
  const seed = await loadSeed();
  if (!seed) return false;
  writeFileSync(note, 'begun\n');
  await seed(services, path.join(config.dataFolder, 'demo'));
  writeFileSync(note, 'done\n');
  return true;
}
