import { z } from 'zod';

/** What a line of a path is. `fdf` asked for f and f′ at once. */
export const pathKinds = ['f', 'df', 'd2f', 'fdf', 'step'] as const;
export type PathKind = (typeof pathKinds)[number];

/**
 * One line of a path.
 * `a`: the answer (f, df, d2f, fdf) or the bracket's low end (step). `b`: the second answer of fdf or the
 * bracket's high end. Unused ones are NaN; for a step without bracket both are NaN.
 */
export interface PathEvent {
  kind: PathKind;
  x: number;
  a: number;
  b: number;
}

/** Every evaluation asked for and every step reported, in order. `cut`: lines that were not kept. */
export interface Path {
  events: PathEvent[];
  cut: number;
}

/** A binary64 in a JSON file: the shortest decimal that reads back to the same bits, or inf, -inf, nan. */
export const numberText = z.string().max(40);

/** [kind, x, a, b] as text; trailing entries that are not used are left out. */
export const pathFile = z.strictObject({
  events: z.array(z.tuple([z.enum(pathKinds), numberText]).rest(numberText)),
  cut: z.int().min(0),
});
export type PathFile = z.infer<typeof pathFile>;

export function numberToText(value: number): string {
  if (Number.isNaN(value)) return 'nan';
  if (value === Number.POSITIVE_INFINITY) return 'inf';
  if (value === Number.NEGATIVE_INFINITY) return '-inf';
  return Object.is(value, -0) ? '-0' : String(value);
}

export function textToNumber(text: string): number {
  if (text === 'nan') return Number.NaN;
  if (text === 'inf') return Number.POSITIVE_INFINITY;
  if (text === '-inf') return Number.NEGATIVE_INFINITY;
  return Number(text);
}

export function pathToFile(path: Path): PathFile {
  const events = path.events.map((event): PathFile['events'][number] => {
    const row: PathFile['events'][number] = [event.kind, numberToText(event.x)];
    const isBareStep = event.kind === 'step' && Number.isNaN(event.a) && Number.isNaN(event.b);
    if (!isBareStep) row.push(numberToText(event.a));
    if (event.kind === 'fdf' || (event.kind === 'step' && !isBareStep)) row.push(numberToText(event.b));
    return row;
  });
  return { events, cut: path.cut };
}

export function pathFromFile(file: PathFile): Path {
  const events = file.events.map(([kind, x, a, b]): PathEvent => {
    return { kind, x: textToNumber(x), a: textToNumber(a ?? 'nan'), b: textToNumber(b ?? 'nan') };
  });
  return { events, cut: file.cut };
}
