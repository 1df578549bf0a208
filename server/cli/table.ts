/** A column of a printed table. */
export interface Column<Row> {
  title: string;
  align?: 'left' | 'right';
  text: (row: Row) => string;
}

/**
 * Rows as aligned text, a rule under the header. Control characters in cells are shown escaped, so that
 * names from outside cannot move the cursor of a terminal.
 */
export function formatTable<Row>(columns: readonly Column<Row>[], rows: readonly Row[]): string {
  const cells = rows.map((row) => columns.map((column) => printable(column.text(row))));
  const widths = columns.map((column, i) =>
    Math.max(displayWidth(column.title), ...cells.map((line) => displayWidth(line[i] ?? ''))),
  );
  const line = (texts: readonly string[]): string =>
    texts
      .map((text, i) => pad(text, widths[i] ?? 0, columns[i]?.align ?? 'left'))
      .join('  ')
      .trimEnd();
  const rule = widths.map((width) => '─'.repeat(width)).join('──');
  return [line(columns.map((column) => column.title)), rule, ...cells.map(line)].join('\n');
}

/** The text with control and bidirectional characters shown as escapes. */
export function printable(text: string): string {
  return text.replace(/[\p{Cc}\p{Bidi_Control}]/gu, (character) => {
    return `\\u${character.charCodeAt(0).toString(16).padStart(4, '0')}`;
  });
}

function displayWidth(text: string): number {
  return [...text.normalize('NFC')].length;
}

function pad(text: string, width: number, align: 'left' | 'right'): string {
  const blanks = ' '.repeat(Math.max(0, width - displayWidth(text)));
  return align === 'right' ? blanks + text : text + blanks;
}
