import { z } from 'zod';
import { AppError } from '../../shared/errors.ts';
import type { Page } from '../../shared/schemas/paging.ts';

/** The sort key of the last row of a page. Opaque to clients. */
export type Cursor = (string | number)[];

const cursorSchema = z.array(z.union([z.string(), z.number()])).max(4);

export function encodeCursor(cursor: Cursor): string {
  return Buffer.from(JSON.stringify(cursor)).toString('base64url');
}

/** Numbers and texts in the order of `kinds`; anything else was not given out by this list. */
export function decodeCursor(text: string | undefined, kinds: ('number' | 'string')[]): Cursor | undefined {
  if (text === undefined) return undefined;
  const parsed = cursorSchema.safeParse(parseJson(Buffer.from(text, 'base64url').toString()));
  const fits =
    parsed.success &&
    parsed.data.length === kinds.length &&
    parsed.data.every((value, index) => typeof value === kinds[index]);
  if (!fits)
    throw new AppError('invalid', 'This cursor does not belong to this list; start again without one.', {
      issues: [{ path: 'cursor', message: 'not a cursor of this list' }],
    });
  return parsed.data;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

export function numberCursor(text: string | undefined, length: number): number[] | undefined {
  return decodeCursor(text, new Array<'number'>(length).fill('number'))?.map(Number);
}

/** Makes a page of rows that were read with a limit one larger than the page, to see whether more follow. */
export function toPage<Row, Item>(
  rows: Row[],
  limit: number,
  cursorOf: (row: Row) => Cursor,
  present: (row: Row) => Item,
): Page<Item> {
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  const next = rows.length > limit && last !== undefined ? encodeCursor(cursorOf(last)) : null;
  return { items: shown.map(present), next };
}
