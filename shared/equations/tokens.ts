import { errorAt, quote } from './equation-error.ts';
import { equationLimits } from './limits.ts';

/** A lexical piece of an equation. `text` is as written; `offset` counts UTF-16 units from 0. */
export interface Token {
  kind: 'number' | 'name' | 'word' | 'operator' | '(' | ')' | ',' | '?' | ':' | 'end';
  text: string;
  offset: number;
}

const numberPattern = /(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/y;
const namePattern = /[\p{L}_$][\p{L}\p{Nd}_$]*/uy;
const operatorPattern = /<=|>=|==|!=|[-+*/^<>]/y;
const words = new Set(['and', 'or', 'not']);

/** Signs that people write and that mean nothing here, with what to write instead; longer ones first. */
const advice: readonly (readonly [string, string])[] = [
  ['**', 'write ^ for a power'],
  ['&&', 'write and'],
  ['||', 'write or'],
  ['.*', 'there are no matrices here: write *'],
  ['./', 'there are no matrices here: write /'],
  ['.^', 'there are no matrices here: write ^'],
  [
    '=',
    'an equation is written as f(x) alone, without “= 0”, and assigns nothing; two values are compared by ==',
  ],
  ['!', 'there is no factorial; write not before a condition and != for “is not equal”'],
  ['%', 'there is no remainder or percent sign; write a percentage as a decimal number'],
  [';', 'one equation holds one expression only'],
  ['[', 'there are no matrices or indices here; use round brackets'],
  [']', 'there are no matrices or indices here; use round brackets'],
  ['{', 'use round brackets'],
  ['}', 'use round brackets'],
  ['"', 'there are no strings here'],
  ["'", 'there are no strings and no primes here: f and its derivatives come from one expression'],
  ['`', 'there are no strings here'],
  ['#', 'there are no comments inside an equation; use the note of the case'],
  ['&', 'write and'],
  ['|', 'write or between conditions, abs(x) for the absolute value'],
  ['~', 'write not'],
  ['@', 'this sign means nothing here'],
  ['\\', 'this sign means nothing here'],
  ['.', 'a decimal point stands within a number, as in 0.5; nothing has properties'],
  ['−', 'write the plain minus sign -'],
  ['–', 'write the plain minus sign -'],
  ['—', 'write the plain minus sign -'],
  ['×', 'write *'],
  ['·', 'write *'],
  ['⋅', 'write *'],
  ['÷', 'write /'],
  ['≤', 'write <='],
  ['≥', 'write >='],
  ['≠', 'write !='],
  ['²', 'write ^2'],
  ['³', 'write ^3'],
  ['√', 'write sqrt(…)'],
  ['∞', 'there is no infinity here'],
  ['°', 'angles are in radians; write the factor pi / 180'],
];

function matchAt(pattern: RegExp, text: string, offset: number): string | undefined {
  pattern.lastIndex = offset;
  return pattern.exec(text)?.[0];
}

function checkNumber(text: string, number: string, offset: number): void {
  if (number.length > equationLimits.numberCharacters) {
    throw errorAt(text, offset, `this number is longer than ${equationLimits.numberCharacters} characters`);
  }
  const next = text.charAt(offset + number.length);
  if (number === '0' && /[xXbBoO]/.test(next) && /[\da-fA-F]/.test(text.charAt(offset + 2))) {
    throw errorAt(text, offset, 'numbers are written in decimal, as in 31 or 3.1e1');
  }
  if (/[eE]/.test(next) && !/[a-zA-Z_]/.test(text.charAt(offset + number.length + 1))) {
    throw errorAt(
      text,
      offset,
      `the exponent of ${quote(`${number}${next}`)} is incomplete; write a number such as 1e5`,
    );
  }
  if (next === '.' && !/[*/^]/.test(text.charAt(offset + number.length + 1))) {
    throw errorAt(text, offset + number.length, 'a number has one decimal point only');
  }
  if (number.endsWith('.') && /[*/^]/.test(next)) {
    throw errorAt(
      text,
      offset,
      `${quote(`${number}${next}`)} can be read in two ways; write a space or ${quote(`${number}0`)}`,
    );
  }
  const value = Number(number);
  if (!Number.isFinite(value)) {
    throw errorAt(text, offset, `${quote(number)} is too large: the largest number is about 1.79e308`);
  }
  if (value === 0 && /[1-9]/.test(number.split(/[eE]/)[0] ?? '')) {
    throw errorAt(
      text,
      offset,
      `${quote(number)} is too small: the smallest number above 0 is about 4.95e-324`,
    );
  }
}

/** Cuts a text into tokens, the last of kind 'end'. Throws an EquationError at the first sign that is not allowed. */
export function readTokens(text: string): Token[] {
  const tokens: Token[] = [];
  let offset = 0;
  while (offset < text.length) {
    const character = text.charAt(offset);
    if (/[ \t\r\n]/.test(character)) {
      offset += 1;
      continue;
    }
    const known = advice.find(([sign]) => text.startsWith(sign, offset));
    const number = matchAt(numberPattern, text, offset);
    const name = matchAt(namePattern, text, offset);
    const operator = matchAt(operatorPattern, text, offset);
    let token: Token;
    if (number !== undefined) {
      checkNumber(text, number, offset);
      token = { kind: 'number', text: number, offset };
    } else if (name !== undefined) {
      token = { kind: words.has(name) ? 'word' : 'name', text: name, offset };
    } else if (operator !== undefined && known?.[0] !== '**') {
      token = { kind: 'operator', text: operator, offset };
    } else if (
      character === '(' ||
      character === ')' ||
      character === ',' ||
      character === '?' ||
      character === ':'
    ) {
      token = { kind: character, text: character, offset };
    } else if (known !== undefined) {
      throw errorAt(text, offset, `${quote(known[0])} is not allowed: ${known[1]}`);
    } else {
      const sign = String.fromCodePoint(text.codePointAt(offset) ?? 0);
      throw errorAt(
        text,
        offset,
        `${quote(sign)} is not allowed: an equation is plain numbers, names, operators and round brackets`,
      );
    }
    tokens.push(token);
    offset += token.text.length;
  }
  tokens.push({ kind: 'end', text: '', offset: text.length });
  return tokens;
}
