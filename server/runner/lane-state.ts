/**
 * What a lane's worker thread and the main thread share: a few integers. The worker is blocked in a read for
 * most of its life, so it cannot be sent messages; it says here until when it waits, and is told here that it
 * shall not wait any longer.
 */
const REPLY = 0;
const ARMED = 1;
const DEADLINE = 2;
const HAS_ENDED = 3;
const IS_STOPPING = 4;
const SIZE = 8;

export class LaneState {
  readonly shared: SharedArrayBuffer;
  readonly #cells: Int32Array;
  readonly #epoch: bigint;
  #sequence = 0;

  /** `epoch`: a reading of the machine's monotonic clock, the same in both threads. */
  constructor(epoch: bigint, shared = new SharedArrayBuffer(4 * SIZE)) {
    this.shared = shared;
    this.#epoch = epoch;
    this.#cells = new Int32Array(shared);
  }

  nowMs(): number {
    return Number((process.hrtime.bigint() - this.#epoch) / 1_000_000n);
  }

  // ----- the worker's side

  /** From now on the main thread ends the adapter when the time is over, unless disarmed before. */
  arm(limitMs: number): void {
    Atomics.store(this.#cells, DEADLINE, this.nowMs() + Math.ceil(Math.min(limitMs, 2 ** 30)));
    this.#sequence = (this.#sequence + 1) & 0x3fffffff || 1;
    Atomics.store(this.#cells, ARMED, this.#sequence);
  }

  /** False where the time was over first: exactly one of the two sides wins. */
  disarm(): boolean {
    return Atomics.compareExchange(this.#cells, ARMED, this.#sequence, 0) === this.#sequence;
  }

  isExpired(): boolean {
    return Atomics.load(this.#cells, ARMED) !== this.#sequence;
  }

  hasEnded(): boolean {
    return Atomics.load(this.#cells, HAS_ENDED) === 1;
  }

  isStopping(): boolean {
    return Atomics.load(this.#cells, IS_STOPPING) === 1;
  }

  /** Number of replies so far; taken before a request, so that its reply cannot be missed. */
  replyCount(): number {
    return Atomics.load(this.#cells, REPLY);
  }

  waitForReply(countBefore: number): void {
    Atomics.wait(this.#cells, REPLY, countBefore);
  }

  // ----- the main thread's side

  /** Whether the worker's time is over; from then on the worker knows it as well. */
  expire(): boolean {
    const armed = Atomics.load(this.#cells, ARMED);
    if (armed <= 0 || this.nowMs() < Atomics.load(this.#cells, DEADLINE)) return false;
    return Atomics.compareExchange(this.#cells, ARMED, armed, -armed) === armed;
  }

  setEnded(hasEnded: boolean): void {
    Atomics.store(this.#cells, HAS_ENDED, hasEnded ? 1 : 0);
  }

  setStopping(isStopping: boolean): void {
    Atomics.store(this.#cells, IS_STOPPING, isStopping ? 1 : 0);
  }

  reply(): void {
    Atomics.add(this.#cells, REPLY, 1);
    Atomics.notify(this.#cells, REPLY);
  }
}

/** The one list of work of all lanes: the index of the next solve, and which solvers are given up. */
export class WorkQueue {
  readonly shared: SharedArrayBuffer;
  readonly #cells: Int32Array;

  constructor(solverCount: number, shared = new SharedArrayBuffer(4 * (1 + solverCount))) {
    this.shared = shared;
    this.#cells = new Int32Array(shared);
  }

  take(): number {
    return Atomics.add(this.#cells, 0, 1);
  }

  giveUp(solver: number): void {
    Atomics.store(this.#cells, 1 + solver, 1);
  }

  isGivenUp(solver: number): boolean {
    return Atomics.load(this.#cells, 1 + solver) === 1;
  }
}
