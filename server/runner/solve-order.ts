import type { Outcome } from '../../shared/schemas/words.ts';
import type { DoneSolve } from './lane-messages.ts';

/** Solves in a row of one solver that went wrong, after which its others are not tried. */
export const STREAK_LIMIT = 10;
export const WRONG_OUTCOMES: readonly Outcome[] = ['crashed', 'timed out', 'garbled'];

/** What is to be recorded of one place in the work: the solve done, or that it was given up, and how the tenth ended. */
export type Released = { at: number; done: DoneSolve } | { at: number; done: null; outcome: Outcome };

/**
 * Puts the solves of each solver back into the order of the work before they are judged by the rule of ten in
 * a row, so that the results do not depend on the number of lanes.
 */
export class SolveOrder {
  readonly #places: number[][];
  readonly #solverOf: readonly number[];
  readonly #waiting = new Map<number, DoneSolve>();
  readonly #next: number[];
  readonly #streak: number[];
  readonly #isGivenUp: boolean[];

  /** `solverOf`: for each place in the work, the solver's index. */
  constructor(solverOf: readonly number[], solverCount: number) {
    this.#solverOf = solverOf;
    this.#places = Array.from({ length: solverCount }, () => []);
    for (const [at, solver] of solverOf.entries()) this.#places[solver]?.push(at);
    this.#next = new Array<number>(solverCount).fill(0);
    this.#streak = new Array<number>(solverCount).fill(0);
    this.#isGivenUp = new Array<boolean>(solverCount).fill(false);
  }

  /** Takes a solve and gives what can be recorded now; `onGivenUp` hears of a solver whose others are not tried. */
  add(done: DoneSolve, onGivenUp: (solver: number) => void): Released[] {
    const solver = this.#solverOf[done.at] ?? 0;
    if (this.#isGivenUp[solver]) return [];
    this.#waiting.set(done.at, done);
    const released: Released[] = [];
    const places = this.#places[solver] ?? [];
    for (;;) {
      const at = places[this.#next[solver] ?? 0];
      const next = at === undefined ? undefined : this.#waiting.get(at);
      if (at === undefined || !next) return released;
      this.#waiting.delete(at);
      this.#next[solver] = (this.#next[solver] ?? 0) + 1;
      released.push({ at, done: next });
      const { outcome } = next.record;
      this.#streak[solver] = WRONG_OUTCOMES.includes(outcome) ? (this.#streak[solver] ?? 0) + 1 : 0;
      if ((this.#streak[solver] ?? 0) < STREAK_LIMIT) continue;
      this.#isGivenUp[solver] = true;
      onGivenUp(solver);
      const rest = places.slice(this.#next[solver]);
      for (const place of rest) this.#waiting.delete(place);
      return [...released, ...rest.map((place) => ({ at: place, done: null, outcome }))];
    }
  }

  /** What still waits for a solve before it that will not come, because the run was stopped. */
  rest(): Released[] {
    return [...this.#waiting.values()].map((done) => ({ at: done.at, done }));
  }
}
