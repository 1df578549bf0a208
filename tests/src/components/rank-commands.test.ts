import { describe, expect, it } from 'vitest';
import { type Command, rankCommands } from '../../../src/components/command-list/rank-commands.ts';

const command = (kind: string, name: string, about = ''): Command => ({ kind, name, about, to: `/${name}` });
const all = [
  command('case', 'flat-shoulder', 'atan(30(x − 0.42))'),
  command('case', 'old-cubic', 'a flat one it is not'),
  command('build', 'c41e9a7', 'One chord step for all solvers'),
  command('suite', 'flat', 'Flat places'),
  command('library', 'larkroots', ''),
];
const names = (typed: string) => rankCommands(all, typed).map((one) => one.name);

describe('rankCommands', () => {
  it('gives everything in its order where nothing is typed', () => {
    expect(names('  ')).toEqual(all.map((one) => one.name));
  });

  it('puts the whole name before its beginning, and that before the description', () => {
    expect(names('flat')).toEqual(['flat', 'flat-shoulder', 'old-cubic']);
  });

  it('finds the beginning of a later part of a name, and of a commit', () => {
    expect(names('shoul')).toEqual(['flat-shoulder']);
    expect(names('C41E')).toEqual(['c41e9a7']);
  });

  it('wants every word, in whatever order, the kind among them', () => {
    expect(names('solvers build')).toEqual(['c41e9a7']);
    expect(names('case flat')).toEqual(['flat-shoulder', 'old-cubic']);
    expect(names('flat nothing')).toEqual([]);
  });
});
