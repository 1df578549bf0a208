import { type MessagePort, parentPort, receiveMessageOnPort } from 'node:worker_threads';
import type { Remark } from '../../shared/schemas/solve.ts';
import type { SolverDeclaration } from '../../shared/schemas/solver.ts';
import { AdapterLink } from './adapter-link.ts';
import type { DoneSolve, EndHow, FromWorker, LaneJob, ToWorker } from './lane-messages.ts';
import { LaneState, WorkQueue } from './lane-state.ts';
import { PathRecorder } from './path-recorder.ts';
import { CaseTools, recordSolve } from './record-solve.ts';
import { WRONG_OUTCOMES } from './solve-order.ts';
import { findNoise, type RawSolve, SolveSession } from './solve-session.ts';
import { CLOSE_LINE, OPEN_LINE, WIRE_VERSION } from './wire.ts';

/** One lane's worker thread: serves solves over blocking pipes until the work is done. */

const STARTS_TRIED = 3;
/** Results go to the main thread in batches: when so many wait, or after so long. */
const BATCH_SOLVES = 16;
const BATCH_MS = 25;

class LaneRunner {
  readonly #job: LaneJob;
  readonly #send: (message: FromWorker) => void;
  readonly #state: LaneState;
  readonly #queue: WorkQueue;
  readonly #path: PathRecorder;
  readonly #tools: CaseTools;
  #link: AdapterLink | null = null;
  #outbox: DoneSolve[] = [];
  /** By solver: wrong solves in a row on this lane. */
  readonly #streaks: number[] = [];
  #sentAtMs = 0;

  constructor(job: LaneJob, send: (message: FromWorker) => void) {
    this.#job = job;
    this.#send = send;
    this.#state = new LaneState(job.epoch, job.state);
    this.#queue = new WorkQueue(job.solvers.length, job.queue);
    this.#path = new PathRecorder(job.limits.pathLines);
    this.#tools = new CaseTools(job.cases, job.equations);
  }

  run(): void {
    for (let at = this.#queue.take(); at < this.#job.work.length; at = this.#queue.take()) {
      if (this.#state.isStopping()) break;
      const solver = this.#job.work[at]?.planned.solver ?? 0;
      if (this.#queue.isGivenUp(solver) || (this.#streaks[solver] ?? 0) >= this.#job.streakLimit) continue;
      this.#solve(at);
      if (this.#job.isFresh) this.#close();
      this.#flush(this.#outbox.length >= BATCH_SOLVES);
    }
    this.#close();
    this.#flush(true);
  }

  #solve(at: number): void {
    const entry = this.#job.work[at];
    const solver = entry && this.#job.solvers[entry.planned.solver];
    if (!entry || !solver) return;
    const { planned, id } = entry;
    const remarks: Remark[] = [];
    if (this.#job.wantsStarts) this.#send({ kind: 'starting', at });
    for (;;) {
      const link = this.#openLink();
      if (!link) return;
      const head = {
        id,
        solver,
        bracket: planned.bracket,
        starts: planned.starts,
        allow: this.#job.limits.evaluations,
      };
      const evaluator = this.#tools.of(planned.case).evaluator;
      const attempt = new SolveSession(link, this.#state, head, solver, evaluator, this.#path).run(
        this.#job.limits,
      );
      if (this.#state.isStopping()) return;
      if (attempt.kind === 'spoiled') {
        this.#spoilLast(attempt.what);
        this.#end('kill');
        continue;
      }
      if (attempt.kind === 'early') {
        this.#end('kill');
        const isSecond = remarks.length > 0;
        remarks.push({
          code: 'fresh start',
          text: `It wrote "${attempt.line}" before go; it was started afresh.`,
        });
        if (!isSecond) continue;
        const end = { kind: 'garbled' as const, reason: 'a line before go, twice', line: attempt.line };
        this.#record(
          at,
          solver,
          { end, f: 0, df: 0, d2f: 0, iterations: null, steps: 0, elapsedMs: 0 },
          remarks.slice(0, 1),
        );
        return;
      }
      if (!attempt.isUsable) {
        const text = this.#end(attempt.endHow);
        if (attempt.raw.end.kind === 'crashed') remarks.push({ code: 'exit', text });
      }
      this.#record(at, solver, attempt.raw, remarks);
      return;
    }
  }

  #record(at: number, solver: SolverDeclaration, raw: RawSolve, remarks: Remark[]): void {
    const planned = this.#job.work[at]?.planned;
    if (!planned) return;
    const path = this.#path.columns();
    const hash = this.#path.hash(raw.end.kind === 'root' ? raw.end.x : null);
    const record = recordSolve({
      tool: this.#tools.of(planned.case),
      planned,
      solver,
      raw,
      path,
      hash,
      remarks,
      limits: this.#job.limits,
    });
    this.#outbox.push({ at, record, path });
    const isWrong = WRONG_OUTCOMES.includes(record.outcome);
    this.#streaks[planned.solver] = isWrong ? (this.#streaks[planned.solver] ?? 0) + 1 : 0;
  }

  /** The solve that had ended keeps its result, with a remark. */
  #spoilLast(what: string): void {
    this.#outbox.at(-1)?.record.remarks.push({ code: 'after end', text: `After its end line ${what}.` });
  }

  /** Sends results; the last one stays while its adapter may still break the rules behind it. */
  #flush(isDue: boolean): void {
    const nowMs = performance.now();
    if (!isDue && nowMs - this.#sentAtMs < BATCH_MS) return;
    const kept = this.#link ? this.#outbox.splice(-1) : [];
    const solves = this.#outbox;
    this.#outbox = kept;
    this.#sentAtMs = nowMs;
    if (solves.length > 0) this.#send({ kind: 'solves', solves });
  }

  /** The adapter that runs, or a new one; null where the run stops. */
  #openLink(): AdapterLink | null {
    for (let tried = 0; !this.#link; tried += 1) {
      if (this.#state.isStopping()) return null;
      const text = this.#start();
      if (text === null) continue;
      if (tried + 1 < STARTS_TRIED) continue;
      this.#send({ kind: 'stop', reason: `The adapter does not start: ${text}` });
      this.#state.setStopping(true);
    }
    return this.#link;
  }

  /** Starts an adapter and waits until it is ready; what went wrong otherwise. */
  #start(): string | null {
    const reply = this.#call({ kind: 'start' });
    if (reply.kind !== 'started') return reply.text;
    const link = new AdapterLink(reply, this.#state);
    this.#state.arm(this.#job.limits.readyMs);
    link.write(OPEN_LINE);
    let event = link.next();
    while (event?.kind === 'comment') event = link.next();
    const wasInTime = this.#state.disarm();
    if (!wasInTime) return `no ready within ${this.#job.limits.readyMs / 1000} s; ${this.#end('kill')}`;
    if (event === null) return this.#end('end of file');
    if (event.kind !== 'ready')
      return this.#refuse(`The adapter said "${link.lastLine()}" instead of ready.`);
    if (event.version !== String(WIRE_VERSION)) {
      if (/^\d+$/.test(event.version))
        return this.#refuse(`The adapter speaks wire ${event.version}, not ${WIRE_VERSION}.`);
      return this.#refuse(`The adapter said "${link.lastLine()}" instead of ready ${WIRE_VERSION}.`);
    }
    this.#send({ kind: 'ready', text: event.text });
    this.#link = link;
    return null;
  }

  #refuse(reason: string): string {
    this.#send({ kind: 'stop', reason });
    this.#state.setStopping(true);
    return this.#end('kill');
  }

  #close(): void {
    const link = this.#link;
    if (!link) return;
    if (this.#state.isStopping()) {
      this.#end('kill');
      return;
    }
    const noise = link.endedSolves > 0 ? findNoise(link) : null;
    const what = noise ?? this.#sayClose(link);
    if (what !== null && link.endedSolves > 0) this.#spoilLast(what);
    this.#end(noise === null ? 'close' : 'kill');
  }

  /** Writes `close` and reads to the end; what the adapter had done wrong before it read that, or null. */
  #sayClose(link: AdapterLink): string | null {
    let what: string | null = null;
    this.#state.arm(this.#job.limits.closeMs);
    link.write(CLOSE_LINE);
    for (let event = link.next(); event && !this.#state.isExpired(); event = link.next()) {
      if (event.kind !== 'comment') what ??= `it wrote "${link.lastLine()}"`;
    }
    const wasInTime = this.#state.disarm();
    return what ?? (wasInTime && link.hasLeftUnread(CLOSE_LINE) ? 'it ended' : null);
  }

  #end(how: EndHow): string {
    this.#link = null;
    const reply = this.#call({ kind: 'end', how });
    return reply.kind === 'started' ? '' : reply.text;
  }

  /** Asks the main thread and waits for its answer. */
  #call(message: FromWorker): ToWorker {
    const before = this.#state.replyCount();
    this.#send(message);
    for (;;) {
      this.#state.waitForReply(before);
      const reply: { message: ToWorker } | undefined = receiveMessageOnPort(this.#job.replies);
      if (reply) return reply.message;
    }
  }
}

const port: MessagePort | null = parentPort;
port?.on('message', (job: LaneJob) => {
  new LaneRunner(job, (message) => port.postMessage(message)).run();
  job.replies.close();
  port.postMessage({ kind: 'finished' });
});
