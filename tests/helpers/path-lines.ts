import type { Path, PathEvent } from '../../shared/schemas/path.ts';

/** A path from short lines: ['f', x, answer], ['fdf', x, f, df], ['step', x] or ['step', x, low, high]. */
export function pathOf(...lines: [kind: PathEvent['kind'], x: number, a?: number, b?: number][]): Path {
  const events = lines.map(([kind, x, a = Number.NaN, b = Number.NaN]): PathEvent => ({ kind, x, a, b }));
  return { events, cut: 0 };
}
