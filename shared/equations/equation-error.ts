import { AppError, type Issue } from '../errors.ts';

/** What is wrong in the text of an equation: what, where (line and column from 1) and what to write instead. */
export class EquationError extends AppError {
  constructor(message: string, issue: Issue) {
    super('invalid', message, { issues: [issue] });
    this.name = 'EquationError';
  }
}

/** Line and column, both from 1, of an offset into a text; CR LF counts as one line break. */
export function placeOf(text: string, offset: number): { line: number; column: number } {
  const lines = text.slice(0, offset).split(/\r\n|\n|\r/);
  return { line: lines.length, column: (lines.at(-1)?.length ?? 0) + 1 };
}

/** An error at an offset of the equation's text. */
export function errorAt(text: string, offset: number, message: string): EquationError {
  const place = placeOf(text, offset);
  return new EquationError(`Line ${place.line}, column ${place.column}: ${message}`, { ...place, message });
}

const quoteLength = 24;

/** A short quotation of a user's text for a message: printable, at most 24 characters, the rest left out. */
export function quote(text: string): string {
  const characters = [...text.slice(0, quoteLength * 2)];
  const shown = characters
    .slice(0, quoteLength)
    .map((character) =>
      /[\p{L}\p{N}\p{P}\p{S} ]/u.test(character)
        ? character
        : `U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}`,
    )
    .join('');
  return `“${shown}${characters.length > quoteLength ? '…' : ''}”`;
}
