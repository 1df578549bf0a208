/**
 * The guide as data: a chapter has sections, a section has blocks. Texts are plain, with `code` between back
 * quotes; `spansOf` parts the two. There is no other mark.
 */
export type ChapterId =
  | 'adapter'
  | 'wire'
  | 'manifest'
  | 'equations'
  | 'suites'
  | 'outcomes'
  | 'changes'
  | 'query-check'
  | 'order'
  | 'allowances'
  | 'accuracy'
  | 'digit-strip'
  | 'fingerprint'
  | 'caution';

export interface Paragraph {
  kind: 'paragraph';
  text: string;
}

export interface List {
  kind: 'list';
  /** Steps that follow one another are numbered. */
  numbered: boolean;
  items: readonly string[];
}

export interface Table {
  kind: 'table';
  /** What the table holds, for those who do not see it. */
  caption: string;
  columns: readonly string[];
  rows: readonly (readonly string[])[];
}

/** What a code block is, which is also what it is checked as. */
export type CodeLanguage = 'manifest' | 'suite' | 'equation' | 'wire' | 'javascript' | 'python';

export interface Code {
  kind: 'code';
  language: CodeLanguage;
  text: string;
}

export type Block = Paragraph | List | Table | Code;

export interface Section {
  /** Unique in its chapter; the part of the address after #. */
  id: string;
  title: string;
  blocks: readonly Block[];
}

export interface Chapter {
  id: ChapterId;
  title: string;
  /** What the chapter answers, in one sentence. */
  summary: string;
  sections: readonly Section[];
  /** Where to read on. */
  see: readonly ChapterId[];
}

export function paragraph(text: string): Paragraph {
  return { kind: 'paragraph', text };
}

export function list(...items: string[]): List {
  return { kind: 'list', numbered: false, items };
}

export function steps(...items: string[]): List {
  return { kind: 'list', numbered: true, items };
}

export function table(
  caption: string,
  columns: readonly string[],
  rows: readonly (readonly string[])[],
): Table {
  return { kind: 'table', caption, columns, rows };
}

/** Lines of code; the line breaks at both ends of the text are dropped. */
export function code(language: CodeLanguage, text: string): Code {
  return { kind: 'code', language, text: text.replace(/^\n+|\n+$/g, '') };
}

export interface TextSpan {
  text: string;
  isCode: boolean;
}

/** A text parted into plain stretches and code. Throws RangeError where a back quote has no partner. */
export function spansOf(text: string): TextSpan[] {
  const parts = text.split('`');
  if (parts.length % 2 === 0) throw new RangeError(`A back quote has no partner in: ${text}`);
  return parts
    .map((part, index) => ({ text: part, isCode: index % 2 === 1 }))
    .filter((span) => span.text !== '');
}
