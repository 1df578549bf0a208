import { describe, expect, it } from 'vitest';
import { plainText } from '../../../src/components/ui/rich-text.tsx';
import { overviewPieces } from '../../../src/routes/overview/overview-sentence.ts';
import { lacksReference } from '../../../src/routes/overview/use-overview.ts';
import { roleCounts } from '../../../src/routes/settings/section-sentences.tsx';
import { shownSolvers } from '../../../src/routes/sign-in/shown-solvers.ts';
import { someRun } from '../features/builders.ts';

const nothing = { libraries: 1, beyond: [], failed: 0, running: 0, withoutReference: 0 };
const say = (given: Partial<Parameters<typeof overviewPieces>[0]>) =>
  plainText(overviewPieces({ ...nothing, ...given }));

describe('sentence of the overview', () => {
  it('leads with the build that broke most, though another is newer', () => {
    const beyond = [
      { what: 'Newest', broke: 0 },
      { what: 'One chord step', broke: 2 },
    ];
    expect(say({ beyond, running: 1, failed: 1 })).toBe(
      'One chord step broke 2 pairs and is beyond allowances; so is one other build. One build or run failed. 1 run is in progress.',
    );
  });

  it('takes the newest where none broke anything', () => {
    const beyond = ['A', 'B', 'C'].map((what) => ({ what, broke: 0 }));
    expect(say({ beyond })).toBe('A is beyond allowances; so are 2 other builds.');
  });

  it('goes on to what failed, to what has no reference, and then says that nothing waits', () => {
    expect(say({ failed: 2 })).toBe('2 builds or runs failed; no build is beyond allowances.');
    expect(say({ withoutReference: 1 })).toContain('waits for its first reference results');
    expect(say({ running: 2 })).toBe('Nothing waits for you. 2 runs are in progress.');
    expect(say({})).toContain('Nothing waits for you');
    expect(say({ libraries: 0 })).toContain('no library here for you yet');
  });
});

describe('lacksReference', () => {
  const suite = (slug: string) => ({ slug, title: slug, revision: 1, hash: 'h' });

  it('gives the newest finished run of each suite that nothing is agreed on for', () => {
    const runs = [
      someRun({ id: 5, suite: suite('a'), status: 'running' }),
      someRun({ id: 4, suite: suite('a') }),
      someRun({ id: 3, suite: suite('a') }),
      someRun({ id: 2, suite: suite('b') }),
    ];
    expect(lacksReference(runs, new Set(['b'])).map((run) => run.id)).toEqual([4]);
  });
});

describe('roleCounts', () => {
  it('names the roles that somebody has, the most trusted first', () => {
    const members = (['contributor', 'maintainer', 'contributor'] as const).map((role) => ({ role }));
    expect(roleCounts(members)).toBe('1 maintainer, 2 contributors');
  });
});

describe('solvers at the door', () => {
  it('really run: four find their root to the last digits, and the one without its safeguard gives up', () => {
    const ends = shownSolvers().map(({ name, strip }) => [
      name,
      strip.outcome,
      Math.round(strip.digits ?? 0),
    ]);
    expect(ends).toEqual([
      ['bisection', 'solved', 16],
      ['illinois', 'solved', 16],
      ['secant', 'solved', 16],
      ['newton', 'solved', 16],
      ['hybrid', 'refused', 0],
    ]);
  });
});
