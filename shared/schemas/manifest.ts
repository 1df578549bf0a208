import { z } from 'zod';
import { type SolverDeclaration, solverDeclaration, solverName } from './solver.ts';
import { evaluationKinds } from './words.ts';

/** The manifest, `tallyroot.yaml`, format 1, as people write it. `server/builds/manifest.ts` reads it. */
export const manifestLimits = { bytes: 65_536, solvers: 200, lines: 50, aliases: 20, settings: 50 } as const;

/** Variables that every adapter gets from Tallyroot. */
const ownVariables: readonly string[] = ['PATH', 'HOME', 'LC_ALL', 'TZ', 'TALLYROOT_START'];

/** One line for the shell. */
const shellText = z
  .string()
  .min(1, 'a line for the shell was expected')
  .max(4000)
  .regex(/^[^\0\n\r]*$/, 'one line was expected');

const variableName = z
  .string()
  .regex(/^[A-Za-z_][A-Za-z0-9_]{0,63}$/, 'a name of a variable was expected: letters, digits and _')
  .refine(
    (name) => !ownVariables.includes(name),
    'another name was expected: Tallyroot sets this variable itself',
  );

const takesWord = z.enum(['bracket', 'start', 'both', 'point']);
const takesList = z
  .array(z.enum(['bracket', 'start', 'point']))
  .min(1)
  .max(3);
const takesExpected = 'bracket, start, both or point was expected, or a list such as [bracket, start]';

const settingExpected = 'a number or a word without blanks was expected';
const settingValue = z.union(
  [z.number(), z.string().regex(/^[^\s\p{Cc}]{1,200}$/u, settingExpected)],
  settingExpected,
);

const positive = z.number().min(0);

export const manifestSolver = z
  .strictObject({
    name: solverName,
    takes: z.union([takesWord, takesList], takesExpected),
    /** How many starts it takes; one where nothing is said and it takes any. */
    starts: z.int().min(1).max(16).optional(),
    uses: z.array(z.enum(evaluationKinds)).min(1).max(4).default(['f']),
    order: z.number().positive().optional(),
    'one-point': z.boolean().default(false),
    widens: z.boolean().default(false),
    tolerance: z
      .strictObject({ xabs: positive.default(0), xrel: positive.default(1e-15), fabs: positive.default(0) })
      .prefault({}),
    settings: z.record(solverName, settingValue).default({}),
    aliases: z.array(solverName).max(manifestLimits.aliases).default([]),
    digits: z.boolean().default(false),
  })
  .superRefine((solver, context) => {
    const takes = takesOf(solver.takes);
    const report = (key: string, message: string): void => {
      context.addIssue({ code: 'custom', path: [key], message });
    };
    if (takes === null) report('takes', takesExpected);
    if (solver.starts !== undefined && (takes === 'bracket' || takes === 'point')) {
      report('starts', `no starts were expected: the solver takes a ${takes}`);
    }
    if (new Set(solver.uses).size < solver.uses.length) report('uses', 'each evaluation once was expected');
    if (solver.uses.includes('jac') && takes !== 'point') {
      report('uses', 'f, df or d2f was expected: jac is for solvers that take a point');
    }
    if (Object.keys(solver.settings).length > manifestLimits.settings) {
      report('settings', `at most ${manifestLimits.settings} settings were expected`);
    }
  });
export type ManifestSolver = z.infer<typeof manifestSolver>;

export const manifestFile = z
  .strictObject({
    format: z.literal(1, 'format 1 was expected'),
    library: z.string().trim().min(1, 'a name for people was expected').max(100),
    prepare: z.array(shellText).max(manifestLimits.lines).default([]),
    adapter: shellText,
    environment: z
      .record(
        variableName,
        z
          .string()
          .max(4000)
          .regex(/^[^\0]*$/, 'no NUL was expected'),
      )
      .default({}),
    solvers: z.array(manifestSolver).min(1).max(manifestLimits.solvers),
  })
  .superRefine((file, context) => {
    const seen = new Set<string>();
    for (const [index, solver] of file.solvers.entries()) {
      const places: [string, (string | number)[]][] = [[solver.name, ['name']]];
      for (const [at, alias] of solver.aliases.entries()) places.push([alias, ['aliases', at]]);
      for (const [word, path] of places) {
        if (seen.has(word)) {
          const message = `another name was expected: ${word} stands here twice`;
          context.addIssue({ code: 'custom', path: ['solvers', index, ...path], message });
        }
        seen.add(word);
      }
    }
  });

/** `takes` as one word; null where the list makes no sense. */
function takesOf(
  takes: z.infer<typeof takesWord> | z.infer<typeof takesList>,
): SolverDeclaration['takes'] | null {
  if (!Array.isArray(takes)) return takes;
  const words = new Set(takes);
  if (words.size < takes.length || (words.has('point') && words.size > 1)) return null;
  if (words.size === 2) return 'both';
  return takes[0] ?? null;
}

/** A solver of a manifest as the rest of Tallyroot knows it. */
export function declareSolver(solver: ManifestSolver): SolverDeclaration {
  const takes = takesOf(solver.takes) ?? 'start';
  const hasStarts = takes === 'start' || takes === 'both';
  return solverDeclaration.parse({
    name: solver.name,
    takes,
    starts: hasStarts ? (solver.starts ?? 1) : 0,
    uses: solver.uses,
    order: solver.order ?? null,
    onePoint: solver['one-point'],
    widens: solver.widens,
    tolerance: solver.tolerance,
    settings: solver.settings,
    aliases: solver.aliases,
    digits: solver.digits,
  });
}

/** JSON Schema of what an author writes, draft 2020-12. */
export function manifestJsonSchema(): Record<string, unknown> {
  return { ...z.toJSONSchema(manifestFile, { io: 'input' }), title: 'Tallyroot manifest, format 1' };
}
