import { Decimal } from 'decimal.js';
import { type Sweep, type SweepRange, suiteLimits } from '../schemas/suite-file.ts';

/** What is wrong with a sweep, at the key of the entry that is to blame. */
export class SweepError extends Error {
  readonly entry: string;

  constructor(entry: string, message: string) {
    super(message);
    this.name = 'SweepError';
    this.entry = entry;
  }
}

const Exact = Decimal.clone({ precision: 60, toExpNeg: -7, toExpPos: 21 });
const numberPattern = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/** Parameters that an entry's key names: `n`, or `a, b` for two that change together. */
export function sweepNames(key: string): string[] {
  return key.split(',').map((name) => name.trim());
}

function numberOf(entry: string, text: string): Decimal {
  if (!numberPattern.test(text))
    throw new SweepError(entry, `a number was expected instead of ${JSON.stringify(text)}`);
  return new Exact(text);
}

function rangeValues(entry: string, range: SweepRange): string[] {
  const from = numberOf(entry, range.from);
  const to = numberOf(entry, range.to);
  const step = numberOf(entry, range.step);
  if (step.isZero() || to.minus(from).times(step).isNegative()) {
    throw new SweepError(entry, 'the step does not lead from "from" to "to"');
  }
  const count = to.minus(from).div(step).floor().plus(1);
  if (count.gt(suiteLimits.sweepMembers)) {
    throw new SweepError(entry, `at most ${suiteLimits.sweepMembers} members were expected`);
  }
  // Decimal steps are exact, so that 0.1, 0.2, 0.3 come out as written.
  return Array.from({ length: count.toNumber() }, (_, i) => from.plus(step.times(i)).toString());
}

function entryRows(key: string, entry: Sweep[string]): Record<string, string>[] {
  const names = sweepNames(key);
  const rows = Array.isArray(entry) ? entry : rangeValues(key, entry);
  return rows.map((row) => {
    const values = Array.isArray(row) ? row : [row];
    if (values.length !== names.length) {
      throw new SweepError(
        key,
        `${names.length} values a member were expected, one for each of ${names.join(', ')}`,
      );
    }
    const result: Record<string, string> = {};
    names.forEach((name, i) => {
      const text = values[i]!;
      numberOf(key, text);
      result[name] = text;
    });
    return result;
  });
}

/** Every combination of the entries' values, in the order written, the last entry changing fastest. */
export function sweepMembers(sweep: Sweep): Record<string, string>[] {
  const seen = new Set<string>();
  let members: Record<string, string>[] = [{}];
  for (const [key, entry] of Object.entries(sweep)) {
    for (const name of sweepNames(key)) {
      if (seen.has(name)) throw new SweepError(key, `the parameter ${name} is swept twice`);
      seen.add(name);
    }
    const rows = entryRows(key, entry);
    if (members.length * rows.length > suiteLimits.sweepMembers) {
      throw new SweepError(key, `at most ${suiteLimits.sweepMembers} members were expected`);
    }
    members = members.flatMap((member) => rows.map((row) => ({ ...member, ...row })));
  }
  return members;
}

/** `family` and the member's values: `family-n10`, `family-a-40-b-1`. Lower case, no plus signs. */
export function memberId(family: string, member: Record<string, string>): string {
  const parts = Object.entries(member).map(([name, value]) =>
    `${name}${value}`.toLowerCase().replaceAll('+', ''),
  );
  return [family, ...parts].join('-');
}
