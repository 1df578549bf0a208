import { z } from 'zod';

/**
 * The suite file, format 1: YAML (or JSON) that people write. Numbers are kept as they are written, digit by
 * digit. `shared/suites/read-suite.ts` reads it, `write-out.ts` turns sweeps into plain cases.
 */
export const suiteLimits = {
  bytes: 1_048_576,
  cases: 2000,
  sweepMembers: 500,
  starts: 64,
  startLength: 16,
  roots: 64,
} as const;

/** What can make an equation easy or hard, one line each. The list is closed; its order is that of display. */
export const traitMeanings = {
  smooth: 'as many derivatives as one likes near the root, none of them extreme',
  polynomial: 'a polynomial in x',
  rational: 'a quotient of polynomials in x',
  transcendental: 'built from exponentials, logarithms or circular functions',
  multiple: 'an allowed root of multiplicity 2 or more',
  flat: 'f and all its derivatives vanish at the root',
  shallow: 'f is very small over a wide stretch around the root',
  steep: 'f changes by orders of magnitude within a small part of the bracket',
  pole: 'f is unbounded in or at the edge of the region searched',
  discontinuous: 'f jumps',
  kink: 'f is continuous, its derivative jumps or is infinite',
  domain: 'f is undefined for some x that a solver may well try',
  'no root': 'there is nothing to find',
  'same signs': 'f has the same sign at both ends of the bracket',
  endpoint: 'the root is an end of the bracket',
  'many roots': 'more than one allowed root',
  clustered: 'roots so close together that f is tiny between them',
  oscillating: 'f changes sign many times',
  cycle: "Newton's steps from one of the starts repeat a cycle",
  'vanishing derivative': 'the derivative is 0, or nearly so, at a start or on the way',
  'far start': 'a start from which open solvers run away or need many steps',
  slow: 'methods of high order gain little for many steps',
  'wide bracket': 'the bracket is many orders of magnitude wider than the root',
  'extreme scale': 'values of f, or the root, near the ends of the exponent range',
  'ill conditioned': 'rounding in f moves the root by many units in the last place',
  engineering: 'from engineering, physics or chemistry',
  finance: 'from finance',
} as const;
export type Trait = keyof typeof traitMeanings;

function isTrait(name: string): name is Trait {
  return Object.hasOwn(traitMeanings, name);
}
export const traitNames: Trait[] = Object.keys(traitMeanings).filter(isTrait);

/** A number as written, or a constant expression in the parameters such as `pi/2` or `1 + 1e-9`. */
export const exactNumber = z
  .union([z.string().min(1).max(400), z.number()], {
    error: 'a number or a constant expression such as pi/2 was expected',
  })
  .transform((value) => String(value).trim());

/** In a sweep: the same for every member, or one entry for each member in the order written out. */
export const sweptNumber = z.union(
  [exactNumber, z.strictObject({ each: z.array(exactNumber).min(1).max(suiteLimits.sweepMembers) })],
  { error: 'a number, a constant expression or { each: [one per member] } was expected' },
);
export type SweptNumber = z.infer<typeof sweptNumber>;

const sweepRange = z.strictObject({ from: exactNumber, to: exactNumber, step: exactNumber.default('1') });
export type SweepRange = z.infer<typeof sweepRange>;

/**
 * `n: [1, 2, 5]`, `n: { from: 1, to: 9, step: 2 }`, or `a, b: [[1, 2], [3, 4]]` for parameters that change
 * together. Several entries are combined in every way, the last one changing fastest.
 */
export const sweep = z
  .record(
    z.string(),
    z.union(
      [
        z.array(exactNumber).min(1).max(suiteLimits.sweepMembers),
        z.array(z.array(exactNumber).min(1).max(16)).min(1).max(suiteLimits.sweepMembers),
        sweepRange,
      ],
      { error: 'a list of values, a list of lists or { from, to, step } was expected' },
    ),
  )
  .refine((value) => Object.keys(value).length > 0, 'at least one parameter to sweep was expected');
export type Sweep = z.infer<typeof sweep>;

export const fileRoot = z.strictObject({
  /** To at least 40 digits where the equation allows it. */
  value: sweptNumber,
  /** Significant digits to certify; only where the equation does not allow the usual 45. */
  digits: z.int().min(1).max(45).optional(),
  multiplicity: z.int().min(1).max(24).default(1),
  allowed: z.boolean().default(true),
  /** A base g with a simple root here, where f is g to the power of the multiplicity times a factor that is not 0. */
  simple: z.string().min(1).max(2000).optional(),
  /** Why this is the root, for roots that no certificate reaches (jumps, flat stretches). */
  statement: z.string().min(10).max(600).optional(),
});
export type FileRoot = z.infer<typeof fileRoot>;

export const caseId = z
  .string()
  .max(120)
  .regex(/^[a-z0-9][a-z0-9.+-]*$/, 'lower-case letters, digits and . + - were expected');

export const fileCase = z.strictObject({
  id: caseId,
  equation: z.union([z.string().min(1).max(2000), z.number()]).transform(String),
  parameters: z.record(z.string(), exactNumber).default({}),
  sweep: sweep.optional(),
  bracket: z.tuple([sweptNumber, sweptNumber]).optional(),
  starts: z
    .array(z.array(sweptNumber).min(1).max(suiteLimits.startLength))
    .max(suiteLimits.starts)
    .default([]),
  roots: z.array(fileRoot).max(suiteLimits.roots).default([]),
  expectation: z.enum(['root', 'none']).default('root'),
  traits: z.array(z.enum(traitNames)).max(24).default([]),
  /** Author, year, title, table or equation; "from memory" or "constructed" where so. */
  source: z.string().min(3).max(600),
  note: z.string().max(2000).default(''),
});
export type FileCase = z.infer<typeof fileCase>;

export const suiteFile = z.strictObject({
  format: z.literal(1),
  id: caseId,
  title: z.string().min(1).max(200),
  description: z.string().max(4000).default(''),
  /** What one solve may use before it is stopped. */
  limits: z
    .strictObject({
      evaluations: z.int().min(1).max(1_000_000).default(1000),
      seconds: z.number().positive().max(3600).default(10),
    })
    .prefault({}),
  cases: z.array(fileCase).min(1).max(suiteLimits.cases),
});
export type SuiteFile = z.infer<typeof suiteFile>;

/** JSON Schema of what an author writes (defaults left out), draft 2020-12. */
export function suiteFileJsonSchema(): Record<string, unknown> {
  return { ...z.toJSONSchema(suiteFile, { io: 'input' }), title: 'Suite file, format 1' };
}
