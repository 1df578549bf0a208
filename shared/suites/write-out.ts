import { Decimal } from 'decimal.js';
import type { FileCase, SuiteFile, SweptNumber } from '../schemas/suite-file.ts';
import { ConstantError, evaluateConstant, isDecimalText } from './constant.ts';
import { exactDecimalText } from './exact-decimal.ts';
import type { YamlPath } from './read-yaml.ts';
import { memberId, SweepError, sweepMembers } from './sweep.ts';

/** A root as the author states it, not yet certified. */
export interface StatedRoot {
  value: string;
  digits: number | null;
  multiplicity: number;
  allowed: boolean;
  simple: string | null;
  statement: string | null;
}

/** One case with its sweep written out: every number a decimal text. */
export interface PlainCase {
  id: string;
  equation: string;
  parameters: Record<string, string>;
  bracket: [string, string] | null;
  starts: string[][];
  roots: StatedRoot[];
  expectation: 'root' | 'none';
  traits: string[];
  source: string;
  note: string;
  /** Where the case stands in the file. */
  path: YamlPath;
}

/** Something wrong with a case, at a path in the file and an offset of the text there. */
export interface CaseProblem {
  path: YamlPath;
  offset: number;
  message: string;
  /** Whether the key at the path is meant rather than the value. */
  isKey?: boolean;
}

export interface WrittenCases {
  cases: PlainCase[];
  problems: CaseProblem[];
}

/** Significant digits to which roots given as expressions are written out. */
const rootDigits = 50;

/** Where an entry of a sweep is taken from: its text, and the path of that text. */
function memberText(
  value: SweptNumber,
  member: number,
  path: YamlPath,
): { text: string; path: YamlPath } | null {
  if (typeof value === 'string') return { text: value, path };
  const text = value.each[member];
  return text === undefined ? null : { text, path: [...path, 'each', member] };
}

class CaseWriter {
  readonly problems: CaseProblem[] = [];
  private readonly source: FileCase;
  private readonly path: YamlPath;

  constructor(source: FileCase, path: YamlPath) {
    this.source = source;
    this.path = path;
  }

  write(): PlainCase[] {
    const { sweep } = this.source;
    if (sweep === undefined) {
      const plain = this.member(this.source.id, {}, 0, 1, false);
      return plain === null ? [] : [plain];
    }
    try {
      const members = sweepMembers(sweep);
      return members.flatMap((member, index) => {
        const plain = this.member(memberId(this.source.id, member), member, index, members.length, true);
        return plain === null ? [] : [plain];
      });
    } catch (error) {
      if (!(error instanceof SweepError)) throw error;
      this.problem(['sweep', error.entry], error.message);
      return [];
    }
  }

  private problem(path: YamlPath, message: string, offset = 0): void {
    const full = [...this.path, ...path];
    // The same mistake shows in every member of a sweep; it is told once.
    const isKnown = this.problems.some(
      (known) =>
        known.path.join('/') === full.join('/') && known.message === message && known.offset === offset,
    );
    if (!isKnown) this.problems.push({ path: full, offset, message });
  }

  private member(
    id: string,
    swept: Record<string, string>,
    index: number,
    count: number,
    isSweep: boolean,
  ): PlainCase | null {
    const { source } = this;
    const before = this.problems.length;
    const parameters = this.parameters(swept);
    const number = (value: SweptNumber, path: YamlPath, kind: 'seen' | 'root'): string => {
      if (typeof value !== 'string' && !isSweep) this.problem(path, '"each" belongs to a case with a sweep');
      else if (typeof value !== 'string' && value.each.length !== count) {
        this.problem(
          path,
          `${count} entries were expected, one for each member; here are ${value.each.length}`,
        );
      }
      const entry = memberText(value, index, path);
      return entry === null ? '0' : this.number(entry.text, parameters, entry.path, kind);
    };
    const bracket = source.bracket?.map((end, i) => number(end, ['bracket', i], 'seen'));
    const starts = source.starts.map((list, i) =>
      list.map((value, j) => number(value, ['starts', i, j], 'seen')),
    );
    const roots = source.roots.map(
      (root, i): StatedRoot => ({
        value: number(root.value, ['roots', i, 'value'], 'root'),
        digits: root.digits ?? null,
        multiplicity: root.multiplicity,
        allowed: root.allowed,
        simple: root.simple?.trim() ?? null,
        statement: root.statement ?? null,
      }),
    );
    if (this.problems.length > before) return null;
    return {
      id,
      equation: source.equation.trim(),
      parameters,
      bracket: bracket?.[0] !== undefined && bracket[1] !== undefined ? [bracket[0], bracket[1]] : null,
      starts,
      roots,
      expectation: source.expectation,
      traits: [...source.traits],
      source: source.source,
      note: source.note,
      path: this.path,
    };
  }

  private parameters(swept: Record<string, string>): Record<string, string> {
    const result: Record<string, string> = {};
    for (const [name, text] of Object.entries(this.source.parameters)) {
      if (Object.hasOwn(swept, name))
        this.problem(['parameters', name], `the parameter ${name} is swept as well`);
      else if (!isDecimalText(text)) this.problem(['parameters', name], 'a number was expected');
      else result[name] = text;
    }
    return { ...result, ...swept };
  }

  /**
   * A literal number stays as it is written. An expression that a solver is given becomes the exact decimal
   * of the binary64 it sees; one that states a root becomes that root to 50 digits.
   */
  private number(
    text: string,
    parameters: Record<string, string>,
    path: YamlPath,
    kind: 'seen' | 'root',
  ): string {
    try {
      const value = evaluateConstant(text, parameters);
      const rounded = value.toNumber();
      if (kind === 'seen' && !Number.isFinite(rounded)) {
        this.problem(path, 'this number is too large for binary64');
        return '0';
      }
      if (isDecimalText(text)) return text;
      if (kind === 'seen') return exactDecimalText(rounded);
      return new Decimal(value.toSignificantDigits(rootDigits)).toString();
    } catch (error) {
      if (!(error instanceof ConstantError)) throw error;
      this.problem(path, error.message, error.offset);
      return '0';
    }
  }
}

/** Writes one case of a file out: one plain case, or one for each member of its sweep. */
export function writeOutCase(source: FileCase, path: YamlPath): WrittenCases {
  const writer = new CaseWriter(source, path);
  const cases = writer.write();
  return { cases, problems: writer.problems };
}

/** All cases of a file, sweeps written out, in order. */
export function writeOut(file: SuiteFile): WrittenCases {
  const parts = file.cases.map((source, index) => writeOutCase(source, ['cases', index]));
  return { cases: parts.flatMap((part) => part.cases), problems: parts.flatMap((part) => part.problems) };
}
