import {
  Composer,
  type CST,
  type Document,
  isAlias,
  isMap,
  isScalar,
  isSeq,
  Lexer,
  LineCounter,
  type Node,
  Parser,
  Scalar,
} from 'yaml';
import type { Issue } from '../errors.ts';

export type YamlPath = readonly (string | number)[];

/** Where things stand in a text; lines and columns from 1. */
export interface SourcePositions {
  /** Of the value at a path, or of its nearest known parent. */
  value(path: YamlPath): { line: number; column: number };
  /** Of the key that ends a path, or of its nearest known parent. */
  key(path: YamlPath): { line: number; column: number };
  /** Of the character at `index` of the text value at a path. */
  within(path: YamlPath, index: number): { line: number; column: number };
}

export interface YamlLimits {
  bytes: number;
  depth: number;
}

export interface YamlReading {
  value: unknown;
  positions: SourcePositions;
  issues: Issue[];
}

interface Place {
  value: number;
  key: number;
  scalar: Scalar | null;
}

const issueCap = 100;

function pathKey(path: YamlPath): string {
  return path.map(String).join('\u0000');
}

/** Lexical tokens that a text may have: each costs the parser some microseconds, however short it is. */
const tokenCap = 200_000;
/** Backslashes in one quoted text: each wrong one costs the parser an error. */
const escapeCap = 2000;

/**
 * The syntax tokens of a text, or why it is refused. Size, token count and depth are bounded here, before
 * anything recursive sees the text: lexer and parser keep their own stacks.
 */
function tokensOf(text: string, limits: YamlLimits, lines: LineCounter): CST.Token[] | Issue {
  if (text.length > limits.bytes || new TextEncoder().encode(text).length > limits.bytes) {
    return { message: `The text is larger than ${limits.bytes} bytes.` };
  }
  const parser = new Parser(lines.addNewLine);
  lines.addNewLine(0);
  const tokens: CST.Token[] = [];
  let count = 0;
  for (const lexeme of new Lexer().lex(text)) {
    for (const token of parser.next(lexeme)) tokens.push(token);
    count += 1;
    const isOverEscaped = lexeme.startsWith('"') && lexeme.split('\\').length > escapeCap;
    const isTooDeep = parser.stack.length > limits.depth * 2 + 2;
    if (!isTooDeep && !isOverEscaped && count <= tokenCap) continue;
    const at = lines.linePos(parser.offset);
    const message = isTooDeep
      ? `Nesting deeper than ${limits.depth} levels is refused.`
      : isOverEscaped
        ? 'A quoted text with so many backslashes is refused.'
        : `More than ${tokenCap} values, signs and line ends are refused.`;
    return { line: at.line, column: at.col, message };
  }
  for (const token of parser.end()) tokens.push(token);
  return tokens;
}

/** The one document of a text; further ones are reported as an error of it. */
function composeOne(
  tokens: CST.Token[],
  length: number,
): { document: Document.Parsed; second: number | null } {
  const composer = new Composer({ schema: 'core', uniqueKeys: false, prettyErrors: false, stringKeys: true });
  const [document, second] = composer.compose(tokens, true, length);
  // With `true` an empty text is composed too, so that there always is one.
  if (document === undefined) throw new Error('no document was composed');
  return { document, second: second === undefined ? null : second.range[0] };
}

/**
 * One YAML document (YAML 1.2 core schema) as plain data, with the position of every part. Aliases, anchors,
 * tags and repeated keys are refused; nothing is ever expanded, so that no small text can grow.
 * Under the keys in `exactKeys` numbers stay texts, digit by digit as written.
 */
export function readYaml(text: string, limits: YamlLimits, exactKeys: ReadonlySet<string>): YamlReading {
  const lines = new LineCounter();
  const places = new Map<string, Place>();
  const issues: Issue[] = [];
  const positions = sourcePositions(text, lines, places);
  const tokens = tokensOf(text, limits, lines);
  if (!Array.isArray(tokens)) return { value: undefined, positions, issues: [tokens] };
  const { document, second } = composeOne(tokens, text.length);
  for (const error of document.errors.slice(0, issueCap)) {
    const at = lines.linePos(error.pos[0]);
    issues.push({ line: at.line, column: at.col, message: `This is no valid YAML: ${error.message}.` });
  }
  if (second !== null) {
    const at = lines.linePos(second);
    issues.push({
      line: at.line,
      column: at.col,
      message: 'One document was expected; a second one begins here.',
    });
  }
  if (issues.length > 0) return { value: undefined, positions, issues };

  const report = (node: Node, message: string) => {
    if (issues.length >= issueCap) return;
    const at = lines.linePos(node.range?.[0] ?? 0);
    issues.push({ line: at.line, column: at.col, message });
  };

  const walk = (node: unknown, path: YamlPath, keyAt: number, isExact: boolean): unknown => {
    if (!isMap(node) && !isSeq(node) && !isScalar(node)) {
      if (isAlias(node)) report(node, 'Aliases are refused; write the value out.');
      return null;
    }
    if (node.anchor !== undefined) report(node, 'Anchors are refused.');
    if (node.tag !== undefined) report(node, 'Tags are refused.');
    const start = node.range?.[0] ?? 0;
    places.set(pathKey(path), { value: start, key: keyAt, scalar: isScalar(node) ? node : null });
    if (isSeq(node)) return node.items.map((item, index) => walk(item, [...path, index], -1, isExact));
    if (isScalar(node)) return scalarValue(node, isExact);
    const result: Record<string, unknown> = {};
    for (const pair of node.items) {
      if (!isScalar(pair.key)) {
        report(node, 'A plain key was expected.');
        continue;
      }
      const name = String(pair.key.value);
      if (name === '__proto__') report(pair.key, 'This key is refused.');
      else if (Object.hasOwn(result, name))
        report(pair.key, `The key ${JSON.stringify(name)} stands here twice.`);
      else
        result[name] = walk(
          pair.value,
          [...path, name],
          pair.key.range?.[0] ?? 0,
          isExact || exactKeys.has(name),
        );
    }
    return result;
  };
  const value = walk(document.contents, [], 0, false);
  return { value: issues.length === 0 ? value : undefined, positions, issues };
}

function scalarValue(node: Scalar, isExact: boolean): unknown {
  if (isExact && node.type === Scalar.PLAIN && typeof node.value === 'number')
    return node.source ?? String(node.value);
  if (typeof node.value === 'number' && !Number.isFinite(node.value))
    return node.source ?? String(node.value);
  return node.value;
}

function sourcePositions(text: string, lines: LineCounter, places: Map<string, Place>): SourcePositions {
  const at = (offset: number) => {
    const { line, col } = lines.linePos(offset);
    return { line: Math.max(1, line), column: Math.max(1, col) };
  };
  const nearest = (path: YamlPath): { place: Place; isExact: boolean } => {
    for (let length = path.length; length >= 0; length -= 1) {
      const place = places.get(pathKey(path.slice(0, length)));
      if (place !== undefined) return { place, isExact: length === path.length };
    }
    return { place: { value: 0, key: 0, scalar: null }, isExact: false };
  };
  return {
    value: (path) => at(nearest(path).place.value),
    key: (path) => {
      const { place, isExact } = nearest(path);
      return at(isExact && place.key >= 0 ? place.key : place.value);
    },
    within: (path, index) => {
      const { place, isExact } = nearest(path);
      return at(isExact && place.scalar !== null ? offsetWithin(text, place.scalar, index) : place.value);
    },
  };
}

/**
 * Offset in the text of character `index` of a scalar's value. Folding changes white space only, so the
 * characters that are not white space are counted; escapes in double quotes are given up on (start of scalar).
 */
function offsetWithin(text: string, scalar: Scalar, index: number): number {
  const range = scalar.range;
  const value = typeof scalar.value === 'string' ? scalar.value : (scalar.source ?? '');
  if (!range) return 0;
  const raw = text.slice(range[0], range[1]);
  let offset = range[0];
  if (scalar.type === Scalar.QUOTE_DOUBLE && raw.includes('\\')) return offset;
  if (scalar.type === Scalar.QUOTE_DOUBLE || scalar.type === Scalar.QUOTE_SINGLE) offset += 1;
  if (scalar.type === Scalar.BLOCK_FOLDED || scalar.type === Scalar.BLOCK_LITERAL) {
    offset += raw.indexOf('\n') + 1;
  }
  const isBlank = (character: string | undefined) => character !== undefined && /\s/.test(character);
  let wanted = 0;
  for (let i = 0; i < index && i < value.length; i += 1) if (!isBlank(value[i])) wanted += 1;
  let lastSolid = offset;
  while (offset < range[1]) {
    if (!isBlank(text[offset])) {
      if (wanted === 0) return offset;
      wanted -= 1;
      lastSolid = offset + 1;
    }
    offset += 1;
  }
  return lastSolid;
}
