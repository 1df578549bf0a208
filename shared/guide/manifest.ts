import { type ManifestSolver, type manifestFile, manifestLimits } from '../schemas/manifest.ts';
import { type Chapter, code, list, paragraph, table } from './section.ts';

/** What a key takes, what holds where it is left out, and what it means. */
export type KeyEntry = readonly [takes: string, whereLeftOut: string, meaning: string];

type ManifestFile = ReturnType<typeof manifestFile.parse>;

export const manifestKeys: Record<keyof ManifestFile, KeyEntry> = {
  format: ['the number 1', 'needed', 'the version of this file'],
  library: ['a text of at most 100 characters', 'needed', 'a name for people'],
  prepare: [
    `a list of at most ${manifestLimits.lines} lines for the shell`,
    'none',
    'run once for each build, in order, before anything is measured; a line that fails makes the build fail',
  ],
  adapter: [
    'a line for the shell',
    'needed',
    'starts the adapter, with the build’s folder as its working directory',
  ],
  environment: [
    'names and texts',
    'none',
    'variables for `prepare` and the adapter, besides `PATH`, an empty `HOME`, `LC_ALL=C.UTF-8` and `TZ=UTC`',
  ],
  solvers: [
    `a list of 1 to ${manifestLimits.solvers}`,
    'needed',
    'the routines to measure; their keys are below',
  ],
};

export const manifestSolverKeys: Record<keyof ManifestSolver, KeyEntry> = {
  name: [
    'a letter or digit, then letters, digits, . _ + - (64 characters at most)',
    'needed',
    'names the solver here, on the wire and on every page',
  ],
  takes: [
    '`bracket`, `start`, `both` or `point`, or a list such as `[bracket, start]`',
    'needed',
    'what it is given; `point` is for systems, which no suite holds yet: such a solver is not applicable',
  ],
  starts: ['a whole number from 1 to 16', '1, where it takes a start', 'how many starts it takes'],
  uses: ['a list of `f`, `df`, `d2f`, `jac`', '`[f]`', 'the evaluations that it may ask for'],
  order: ['a number above 0', 'none claimed', 'the order of convergence that it claims on simple roots'],
  'one-point': ['true or false', 'false', 'true for methods without memory, such as Newton and Halley'],
  widens: ['true or false', 'false', 'true where it asks outside its bracket on purpose'],
  tolerance: [
    '`xabs`, `xrel`, `fabs`: numbers, 0 or more',
    '0, 1e-15 and 0, each on its own',
    'what it promises of its answer; sent to it, and its claims are judged by it',
  ],
  settings: [
    'names and values, each a number or a word without blanks',
    'none',
    'sent to it with `set`, and shown',
  ],
  aliases: ['a list of names', 'none', 'earlier names, so that a renamed solver keeps its reference results'],
  digits: [
    'true or false',
    'false',
    'true where it can work in decimal arithmetic with a given number of digits',
  ],
};

const columns = ['key', 'takes', 'where left out', 'meaning'];

function rowsOf(keys: Record<string, KeyEntry>): string[][] {
  return Object.entries(keys).map(([key, entry]) => [`\`${key}\``, ...entry]);
}

export const manifestChapter: Chapter = {
  id: 'manifest',
  title: 'The manifest, tallyroot.yaml',
  summary:
    'How a repository says what its solvers are, how a build is prepared and how the adapter is started.',
  sections: [
    {
      id: 'example',
      title: 'An example',
      blocks: [
        code(
          'manifest',
          `
format: 1
library: My roots
prepare:
  - npm ci --ignore-scripts
adapter: node tally/my-adapter.mjs
environment: { OMP_NUM_THREADS: "1" }
solvers:
  - name: secant
    takes: [start]
    starts: 2
    uses: [f]
    order: 1.618
    tolerance: { xrel: 1e-12 }
    settings: { max-steps: 200 }
    aliases: [secant_v1]
  - name: newton
    takes: [start]
    uses: [f, df]
    order: 2
    one-point: true
  - name: hybrid
    takes: [bracket]
`,
        ),
      ],
    },
    {
      id: 'keys',
      title: 'Keys of the file',
      blocks: [table('Keys of the manifest', columns, rowsOf(manifestKeys))],
    },
    {
      id: 'solver-keys',
      title: 'Keys of a solver',
      blocks: [
        table('Keys of a solver', columns, rowsOf(manifestSolverKeys)),
        paragraph(
          'A case offers a bracket and any number of start lists. A solver that takes two starts is given the ends of the bracket where a list has only one; with neither the pair is not applicable, and so it is where an evaluation that the solver uses cannot be given. A longer list is cut to what the solver takes.',
        ),
      ],
    },
    {
      id: 'rules',
      title: 'Rules',
      blocks: [
        list(
          `The file stands at the root of the repository and is one YAML document (1.2, core schema) of at most ${manifestLimits.bytes / 1024} KiB, without anchors.`,
          'An unknown key, a wrong type and a name that stands twice are refused, with the line and what was expected there.',
          'The lines of `prepare` and `adapter` run in `/bin/sh -c`. A pull request from outside is prepared only after a maintainer lets it run.',
          'Claim an order only where you mean it: the allowances hold the solver to it.',
          'State the tolerance that your documentation promises. A tighter one makes honest answers loose, a wider one hides lost accuracy.',
        ),
      ],
    },
  ],
  see: ['adapter', 'wire', 'allowances'],
};
