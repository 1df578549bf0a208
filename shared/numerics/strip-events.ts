import type { Path } from '../schemas/path.ts';
import type { StripEvent } from '../schemas/strips.ts';
import { correctDigits } from './digits.ts';
import type { RootReference } from './root-reference.ts';

/**
 * A path as a digit strip shows it: each evaluation (an fdf is an f and then a df) and each step with the
 * correct digits of its x against one root, and which earlier evaluation it repeats.
 *
 * A repeat is the same kind at the bit-identical x (−0 and 0 are the same x); steps repeat nothing.
 * `ref`: the root that the solve went to. Returns digits from 0 to 17, null where x is not finite.
 */
export function stripEvents(path: Path, ref: RootReference): StripEvent[] {
  const events: StripEvent[] = [];
  // A Map takes −0 and 0 for the same key, and NaN for itself.
  const first = {
    f: new Map<number, number>(),
    df: new Map<number, number>(),
    d2f: new Map<number, number>(),
  };
  const digitsOf = (x: number): number | null => (Number.isFinite(x) ? correctDigits(x, ref).digits : null);
  for (const { kind, x } of path.events) {
    const digits = digitsOf(x);
    if (kind === 'step') {
      events.push({ kind, digits, repeatOf: null });
      continue;
    }
    for (const asked of kind === 'fdf' ? (['f', 'df'] as const) : [kind]) {
      const repeatOf = first[asked].get(x) ?? null;
      if (repeatOf === null) first[asked].set(x, events.length);
      events.push({ kind: asked, digits, repeatOf });
    }
  }
  return events;
}
