import { isUtf8 } from 'node:buffer';

/** Characters of a broken line, or of a solver's own words, that are kept. */
export const KEPT_CHARACTERS = 200;

/** Control, format, surrogate and separator characters: they could act on a terminal or hide text. */
const UNPRINTABLE = /[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu;

function escapeCharacter(character: string): string {
  const code = character.codePointAt(0) ?? 0;
  if (code < 0x100) return `\\x${code.toString(16).padStart(2, '0')}`;
  return `\\u{${code.toString(16)}}`;
}

/** The first 200 characters of a text, what cannot be printed escaped. */
export function printable(text: string): string {
  // A character is at most two units; the slice keeps a long text from being walked in full.
  const characters = Array.from(text.slice(0, 2 * KEPT_CHARACTERS)).slice(0, KEPT_CHARACTERS);
  return characters.join('').replace(UNPRINTABLE, escapeCharacter);
}

/** The first 200 characters of a line, escaped so that its bytes can be told: \xNN for bytes that are no text. */
export function escapeLine(line: Uint8Array): string {
  if (isUtf8(line)) {
    // Four bytes a character at most: a character that this cuts in two is not among those kept.
    return printable(Buffer.from(line.subarray(0, 4 * KEPT_CHARACTERS + 4)).toString('utf8'));
  }
  let text = '';
  for (const byte of line.subarray(0, KEPT_CHARACTERS)) {
    const isPlain = byte >= 0x20 && byte < 0x7f;
    text += isPlain ? String.fromCharCode(byte) : `\\x${byte.toString(16).padStart(2, '0')}`;
  }
  return text;
}
