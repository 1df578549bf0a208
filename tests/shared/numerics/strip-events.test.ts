import { describe, expect, it } from 'vitest';
import { rootReference } from '../../../shared/numerics/root-reference.ts';
import { stripEvents } from '../../../shared/numerics/strip-events.ts';
import type { PathEvent } from '../../../shared/schemas/path.ts';

// √3 to 40 digits, by decimal arithmetic.
const ref = rootReference('1.732050807568877293527446341505872366943');
const line = (kind: PathEvent['kind'], x: number): PathEvent => ({ kind, x, a: 1, b: 1 });
const events = (...lines: PathEvent[]) => stripEvents({ events: lines, cut: 0 }, ref);

describe('stripEvents', () => {
  it('gives each evaluation the correct digits of its x', () => {
    // |1.7 − √3| / √3 = 0.018504…, −log10 of it is 1.7327.
    expect(events(line('f', 1.7))[0]?.digits).toBeCloseTo(1.7327, 3);
  });

  it('shows 16 where x is the root rounded, and nothing where x is not finite', () => {
    expect(events(line('f', Math.sqrt(3)), line('f', Number.NaN)).map((event) => event.digits)).toEqual([
      16,
      null,
    ]);
  });

  it('makes an fdf an f and a df, each with its own repeats', () => {
    expect(
      events(line('fdf', 2), line('f', 2), line('df', 2)).map(({ kind, repeatOf }) => [kind, repeatOf]),
    ).toEqual([
      ['f', null],
      ['df', null],
      ['f', 0],
      ['df', 1],
    ]);
  });

  it('takes −0 and 0 for the same x, and f and f′ for different kinds', () => {
    expect(events(line('f', 0), line('df', 0), line('f', -0)).map((event) => event.repeatOf)).toEqual([
      null,
      null,
      0,
    ]);
  });

  it('never calls a step a repeat', () => {
    expect(events(line('step', 2), line('step', 2)).map((event) => event.repeatOf)).toEqual([null, null]);
  });
});
