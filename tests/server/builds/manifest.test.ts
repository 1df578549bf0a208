import { describe, expect, it } from 'vitest';
import { readManifest } from '../../../server/builds/manifest.ts';
import { AppError, type Issue } from '../../../shared/errors.ts';
import { manifestJsonSchema } from '../../../shared/schemas/manifest.ts';

const smallest = `format: 1
library: Pocket roots
adapter: node adapter.mjs
solvers:
  - name: secant
    takes: [start]
    starts: 2
`;

function issuesOf(text: string): Issue[] {
  try {
    readManifest(text);
  } catch (error) {
    if (error instanceof AppError) return error.issues;
    throw error;
  }
  return [];
}

function withSolver(lines: string): string {
  return `format: 1\nlibrary: L\nadapter: a\nsolvers:\n  - name: s\n${lines.replace(/^/gm, '    ')}\n`;
}

describe('readManifest', () => {
  it('fills in the defaults of a solver', () => {
    expect(readManifest(smallest)).toEqual({
      library: 'Pocket roots',
      prepare: [],
      adapter: 'node adapter.mjs',
      environment: {},
      solvers: [
        {
          name: 'secant',
          takes: 'start',
          starts: 2,
          uses: ['f'],
          order: null,
          onePoint: false,
          widens: false,
          tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
          settings: {},
          aliases: [],
          digits: false,
        },
      ],
    });
  });

  it('reads every key', () => {
    const text = `format: 1
library: A name for people            # at most 100 characters
prepare:
  - npm ci --ignore-scripts
adapter: octave-cli adapter.m 3>&1 1>&2
environment: { OMP_NUM_THREADS: "1" }
solvers:
  - name: newton_2.0
    takes: [bracket, start]
    uses: [f, df]
    order: 2
    one-point: true
    widens: true
    tolerance: { fabs: 1e-9 }
    settings: { max-steps: 200, mode: fast }
    aliases: [newton_v1, 1.5]
    digits: true
`;
    const manifest = readManifest(text);
    expect(manifest.environment).toEqual({ OMP_NUM_THREADS: '1' });
    expect(manifest.prepare).toEqual(['npm ci --ignore-scripts']);
    expect(manifest.solvers[0]).toEqual({
      name: 'newton_2.0',
      takes: 'both',
      starts: 1,
      uses: ['f', 'df'],
      order: 2,
      onePoint: true,
      widens: true,
      tolerance: { xabs: 0, xrel: 1e-15, fabs: 1e-9 },
      settings: { 'max-steps': 200, mode: 'fast' },
      aliases: ['newton_v1', '1.5'],
      digits: true,
    });
  });

  it.each([
    ['takes: bracket', 'bracket', 0],
    ['takes: [bracket]', 'bracket', 0],
    ['takes: start', 'start', 1],
    ['takes: both\nstarts: 2', 'both', 2],
    ['takes: [start, bracket]', 'both', 1],
    ['takes: point', 'point', 0],
    ['takes: [point]\nuses: [f, jac]', 'point', 0],
  ])('understands %s', (lines, takes, starts) => {
    expect(readManifest(withSolver(lines)).solvers[0]).toMatchObject({ takes, starts });
  });

  it('reports all problems with line and column, not the first alone', () => {
    const text = `format: 2
library: ""
adaptor: node adapter.mjs
environment: { OMP_NUM_THREADS: 1, PATH: /bin }
solvers:
  - name: -x
    takes: [start, point]
    uses: [f, g]
    order: fast
    Widens: true
  - name: b
    takes: bracket
    starts: 1
    uses: [jac]
    settings: { max steps: 1, mode: a b, on: true }
`;
    const found = issuesOf(text).map(({ path, line, column }) => `${path} ${line}:${column}`);
    expect(found.sort()).toEqual(
      [
        'format 1:9',
        'library 2:10',
        'adaptor 3:1',
        'adapter 1:1',
        'environment.OMP_NUM_THREADS 4:33',
        'environment.PATH 4:36',
        'solvers.0.name 6:11',
        'solvers.0.uses.1 8:15',
        'solvers.0.order 9:12',
        'solvers.0.Widens 10:5',
        'solvers.1.settings.max steps 15:17',
        'solvers.1.settings.mode 15:37',
        'solvers.1.settings.on 15:46',
      ].sort(),
    );
  });

  it('says what was expected', () => {
    expect(issuesOf(withSolver('takes: 1'))[0]?.message).toContain(
      'Bracket, start, both or point was expected',
    );
    expect(issuesOf(withSolver('takes: [start, point]'))[0]?.message).toContain('was expected');
    expect(issuesOf(withSolver('takes: bracket\nstarts: 2'))[0]).toMatchObject({
      line: 7,
      message: 'No starts were expected: the solver takes a bracket.',
    });
    expect(issuesOf('format: 1\nlibrary: L\nsolvers: []\n')[0]?.message).toBe(
      'adapter is missing: a text (in quotes where it looks like a number) was expected.',
    );
    expect(issuesOf(withSolver('takes: start\nuses: [f, jac]'))[0]?.message).toContain(
      'jac is for solvers that',
    );
    expect(issuesOf(withSolver('takes: start\nsettings: { mode: a b }'))[0]?.message).toBe(
      'A number or a word without blanks was expected.',
    );
  });

  it('does not take a name twice, aliases included', () => {
    const text = `${smallest}  - name: other\n    takes: start\n    aliases: [secant]\n`;
    expect(issuesOf(text)).toEqual([
      {
        path: 'solvers.1.aliases.0',
        line: 10,
        column: 15,
        message: 'Another name was expected: secant stands here twice.',
      },
    ]);
  });

  it.each([
    ['an anchor', 'format: &a 1\n'],
    ['an alias', 'format: *a\n'],
    ['a tag', 'format: !!int 1\n'],
    ['a second document', `${smallest}---\nformat: 1\n`],
    ['a key twice', `${smallest}library: again\n`],
    ['more than 64 KiB', `${smallest}# ${'x'.repeat(65_536)}\n`],
    ['no YAML', 'format: [1\n'],
    ['an empty text', ''],
    ['a list', '- 1\n'],
  ])('refuses %s', (_what, text) => {
    expect(issuesOf(text).length).toBeGreaterThan(0);
  });

  it('takes 200 solvers and no more', () => {
    const of = (count: number): string => {
      const solvers = Array.from({ length: count }, (_, at) => `  - { name: s${at}, takes: bracket }\n`);
      return `format: 1\nlibrary: L\nadapter: a\nsolvers:\n${solvers.join('')}`;
    };
    expect(readManifest(of(200)).solvers).toHaveLength(200);
    expect(issuesOf(of(201))).toMatchObject([{ path: 'solvers', line: 5 }]);
  });
});

describe('manifestJsonSchema', () => {
  it('asks for what an author must write', () => {
    expect(manifestJsonSchema()).toMatchObject({
      type: 'object',
      required: ['format', 'library', 'adapter', 'solvers'],
      additionalProperties: false,
    });
  });
});
