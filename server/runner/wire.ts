import { isUtf8 } from 'node:buffer';
import { numberToText } from '../../shared/schemas/path.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import { parseNumber } from './wire-numbers.ts';
import { escapeLine, printable } from './wire-text.ts';

/** The wire between Tallyroot and an adapter, as pure functions: bytes in, events out, and lines to write. */

export const WIRE_VERSION = 1;
/** Bytes of a line without its line feed. */
export const LINE_LIMIT_BYTES = 1024 * 1024;
/** Unknowns of a system. */
export const SYSTEM_LIMIT = 200;

export const askKinds = ['f', 'df', 'd2f', 'fdf', 'jac'] as const;
export type AskKind = (typeof askKinds)[number];

/** What one line of an adapter says. `more` holds the numbers after the first, null where there is one only. */
export type WireEvent =
  | { kind: 'comment' }
  | { kind: 'ask'; what: AskKind; x: number; more: number[] | null }
  | { kind: 'step'; x: number; more: number[] | null }
  | { kind: 'iterations'; count: number }
  | { kind: 'root'; id: number; x: number; more: number[] | null }
  | { kind: 'fail'; id: number; text: string }
  | { kind: 'ready'; version: string; text: string }
  | { kind: 'garbled'; reason: string; line: string };

const COMMENT: WireEvent = { kind: 'comment' };
const TAB = 0x09;
const CR = 0x0d;
const SPACE = 0x20;
const HASH = 0x23;
const FORM_FEED = 0x0c;
const SMALL_F = 0x66;

/** Reads the bytes [start, end) of one line, its line feed not among them. Never throws. */
export function parseLine(bytes: Buffer, start: number, end: number): WireEvent {
  const fast = parsePlainAsk(bytes, start, end);
  if (fast) return fast;
  const line = bytes.subarray(start, end);
  if (line.length > LINE_LIMIT_BYTES) return garbled('a line over 1 MiB', line);
  if (line.includes(0)) return garbled('a NUL byte', line);
  if (line.includes(FORM_FEED)) return garbled('a form feed', line);
  if (!isUtf8(line)) return garbled('bytes that are no UTF-8', line);
  let to = end;
  if (to > start && bytes[to - 1] === CR) to -= 1;
  while (to > start && isBlank(bytes[to - 1])) to -= 1;
  let from = start;
  while (from < to && isBlank(bytes[from])) from += 1;
  if (from === to || bytes[from] === HASH) return COMMENT;
  return parseText(bytes.toString('utf8', from, to), line);
}

/**
 * The line that is nearly all of the traffic: 'f' or 'df', one space, a plain decimal. Anything else gives
 * null and takes the careful way, so this may only accept what that accepts.
 */
function parsePlainAsk(bytes: Buffer, start: number, end: number): WireEvent | null {
  let at = start;
  let what: AskKind = 'f';
  if (bytes[at] === 0x64) {
    what = 'df';
    at += 1;
  }
  if (end - at > 40 || bytes[at] !== SMALL_F || bytes[at + 1] !== SPACE) return null;
  at += 2;
  const first = at;
  if (bytes[at] === 0x2d) at += 1;
  const lead = bytes[at];
  if (at >= end || lead === undefined || lead < 0x30 || lead > 0x39) return null;
  let dots = 0;
  for (; at < end; at += 1) {
    const byte = bytes[at] ?? 0;
    if (byte >= 0x30 && byte <= 0x39) continue;
    if (byte !== 0x2e || dots > 0) break;
    dots += 1;
  }
  if (at < end) {
    if (((bytes[at] ?? 0) | 0x20) !== 0x65) return null;
    at += 1;
    if (bytes[at] === 0x2d || bytes[at] === 0x2b) at += 1;
    if (at >= end) return null;
    for (; at < end; at += 1) {
      const byte = bytes[at] ?? 0;
      if (byte < 0x30 || byte > 0x39) return null;
    }
  }
  return { kind: 'ask', what, x: Number(bytes.toString('latin1', first, end)), more: null };
}

function isBlank(byte: number | undefined): boolean {
  return byte === SPACE || byte === TAB;
}

function garbled(reason: string, line: Uint8Array): WireEvent {
  return { kind: 'garbled', reason, line: escapeLine(line) };
}

/** What stands after the first `count` fields of a line. */
function textAfter(text: string, count: number): string {
  let at = 0;
  for (let field = 0; field < count; field += 1) {
    while (at < text.length && text[at] !== ' ' && text[at] !== '\t') at += 1;
    while (at < text.length && (text[at] === ' ' || text[at] === '\t')) at += 1;
  }
  return printable(text.slice(at));
}

function parseText(text: string, line: Uint8Array): WireEvent {
  const fields = text.split(/[ \t]+/, SYSTEM_LIMIT + 4);
  const [verb = '', first] = fields;
  switch (verb) {
    case 'f':
    case 'df':
    case 'd2f':
    case 'fdf':
    case 'jac':
      return withNumbers(fields, 1, line, (x, more) => ({ kind: 'ask', what: verb, x, more }));
    case 'step':
      return withNumbers(fields, 1, line, (x, more) => ({ kind: 'step', x, more }));
    case 'iterations': {
      if (fields.length !== 2)
        return garbled(`iterations takes one number, this line has ${fields.length - 1}`, line);
      if (first === undefined || !/^[+-]?\d+$/.test(first))
        return garbled('iterations takes an integer', line);
      return { kind: 'iterations', count: Number(first) };
    }
    case 'root':
    case 'fail': {
      const id = readId(first);
      if (id === null) return garbled(`${verb} takes the number of the solve first`, line);
      if (verb === 'fail') return { kind: 'fail', id, text: textAfter(text, 2) };
      return withNumbers(fields, 2, line, (x, more) => ({ kind: 'root', id, x, more }));
    }
    case 'ready':
      return { kind: 'ready', version: printable(first ?? ''), text: textAfter(text, 2) };
    default:
      return garbled(`an unknown verb "${printable(verb).slice(0, 40)}"`, line);
  }
}

function readId(field: string | undefined): number | null {
  if (field === undefined || !/^\d{1,16}$/.test(field)) return null;
  return Number(field);
}

function withNumbers(
  fields: string[],
  from: number,
  line: Uint8Array,
  build: (x: number, more: number[] | null) => WireEvent,
): WireEvent {
  const count = fields.length - from;
  if (count < 1) return garbled(`${fields[0]} needs a number`, line);
  if (count > SYSTEM_LIMIT) return garbled(`more than ${SYSTEM_LIMIT} numbers`, line);
  const numbers: number[] = [];
  for (const field of fields.slice(from)) {
    const value = parseNumber(field);
    if (value === null) return garbled(`"${printable(field).slice(0, 60)}" is no number`, line);
    numbers.push(value);
  }
  const [x = Number.NaN, ...more] = numbers;
  return build(x, more.length === 0 ? null : more);
}

/** What a problem's head tells the adapter. */
export interface ProblemHead {
  id: number;
  solver: Pick<SolverDeclaration, 'name' | 'uses' | 'tolerance' | 'settings'>;
  bracket: readonly [number, number] | null;
  starts: readonly number[];
  allow: number;
}

/** The head of a problem in the order of the wire, without its `go`. */
export function encodeHead(head: ProblemHead): string {
  const { solver, bracket, starts } = head;
  const { xabs, xrel, fabs } = solver.tolerance;
  let text = `solve ${head.id} ${solver.name}\n`;
  if (bracket) text += `bracket ${numberToText(bracket[0])} ${numberToText(bracket[1])}\n`;
  if (starts.length > 0) text += `start ${starts.map(numberToText).join(' ')}\n`;
  text += `offers ${solver.uses.join(' ')}\n`;
  text += `tolerance ${numberToText(xabs)} ${numberToText(xrel)} ${numberToText(fabs)}\n`;
  for (const [name, value] of Object.entries(solver.settings)) {
    text += `set ${name} ${typeof value === 'number' ? numberToText(value) : value}\n`;
  }
  return `${text}allow ${head.allow}\n`;
}

export const OPEN_LINE = `open ${WIRE_VERSION}\n`;
export const GO_LINE = 'go\n';
export const STOP_LINE = 'stop\n';
export const CLOSE_LINE = 'close\n';

export function encodeAnswer(y: number): string {
  return `= ${numberToText(y)}\n`;
}

export function encodePairAnswer(y: number, dy: number): string {
  return `= ${numberToText(y)} ${numberToText(dy)}\n`;
}
