import { existsSync } from 'node:fs';
import { resolve } from 'node:path';
import { AppError } from '../../shared/errors.ts';
import { writeLarkroots } from '../demo/larkroots.ts';
import { parseCommand } from './arguments.ts';
import { exitCodes } from './exit.ts';

export const demoUsage = 'tallyroot demo DIR';

/** `demo`: writes the invented demo library as a git repository into a new folder. */
export async function demoCommand(words: readonly string[]): Promise<number> {
  const { positionals } = parseCommand(words, {}, demoUsage);
  const [path] = positionals;
  if (path === undefined) throw new AppError('invalid', `Usage: ${demoUsage}`);
  const folder = resolve(path);
  if (existsSync(folder)) throw new AppError('conflict', `${folder} exists already; name a new folder.`);
  await writeLarkroots(folder);
  console.log(`The demo library larkroots is in ${folder}, with branches main, one-chord and early-stop.`);
  return exitCodes.fine;
}
