import { MessageChannel, Worker } from 'node:worker_threads';
import type { DoneSolve, EndHow, FromWorker, LaneJob, LaneLimits, ToWorker } from './lane-messages.ts';
import { LaneState } from './lane-state.ts';
import { AdapterProcess } from './process.ts';

/** The main thread's side of a lane: it starts and ends the adapter and watches the clock for the worker. */

const TICK_MS = 15;
/** A process that has ended its output is given this long to end itself, so that its exit can be told. */
const EXIT_WAIT_MS = 1000;
const TOLD_LOG_CHARACTERS = 3000;

export type LaneWork = Omit<LaneJob, 'state' | 'epoch' | 'replies'>;

export interface LaneOptions {
  command: string;
  folder: string;
  environment: Readonly<Record<string, string>>;
  onLog?: ((text: string) => void) | undefined;
}

export interface LaneHandlers {
  onReady: (text: string) => void;
  onStarting: (at: number) => void;
  onSolves: (solves: DoneSolve[]) => void;
  onStop: (reason: string) => void;
}

/** Workers that have nothing to do; a worker takes half a second to start, so they are kept for the next run. */
const idleWorkers: Worker[] = [];

function takeWorker(): Worker {
  const idle = idleWorkers.pop();
  const worker = idle ?? new Worker(new URL('./lane-boot.mjs', import.meta.url), { execArgv: [] });
  worker.ref();
  return worker;
}

function keepWorker(worker: Worker): void {
  // One by one: without its own inner listeners a worker hears nothing any more.
  for (const name of ['error', 'exit', 'message']) worker.removeAllListeners(name);
  worker.unref();
  worker.once('exit', () => {
    const at = idleWorkers.indexOf(worker);
    if (at !== -1) idleWorkers.splice(at, 1);
  });
  idleWorkers.push(worker);
}

/** Ends the workers that are kept; for tests and for an orderly end. */
export async function endIdleWorkers(): Promise<void> {
  await Promise.all(idleWorkers.splice(0).map((worker) => worker.terminate()));
}

export class Lane {
  readonly #options: LaneOptions;
  readonly #limits: LaneLimits;
  readonly #handlers: LaneHandlers;
  readonly #epoch = process.hrtime.bigint();
  readonly #state = new LaneState(this.#epoch);
  #adapter: AdapterProcess | null = null;
  #log = '';
  #isStopping = false;

  constructor(options: LaneOptions, limits: LaneLimits, handlers: LaneHandlers) {
    this.#options = options;
    this.#limits = limits;
    this.#handlers = handlers;
  }

  /** The log of the adapter that was started last. */
  log(): string {
    return this.#adapter ? this.#adapter.log() : this.#log;
  }

  /** Lets go of everything soon: the solve in progress gives no result. */
  stop(): void {
    this.#isStopping = true;
    this.#state.setStopping(true);
    void this.#adapter?.end();
  }

  async run(work: LaneWork): Promise<void> {
    const worker = takeWorker();
    const replies = new MessageChannel();
    const ticker = setInterval(() => this.#watch(), TICK_MS);
    try {
      await new Promise<void>((resolve, reject) => {
        worker.on('error', reject);
        worker.on('exit', () => reject(new Error('A lane ended unexpectedly.')));
        worker.on('message', (message: FromWorker) => {
          if (message.kind === 'finished') resolve();
          else this.#handle(message, (reply) => this.#reply(replies.port1, reply)).catch(reject);
        });
        const job: LaneJob = {
          ...work,
          state: this.#state.shared,
          epoch: this.#epoch,
          replies: replies.port2,
        };
        worker.postMessage(job, [replies.port2]);
      });
      keepWorker(worker);
    } catch (error) {
      await worker.terminate();
      throw error;
    } finally {
      clearInterval(ticker);
      replies.port1.close();
      await this.#dropAdapter();
    }
  }

  #reply(port: MessageChannel['port1'], message: ToWorker): void {
    port.postMessage(message);
    this.#state.reply();
  }

  async #handle(message: FromWorker, reply: (message: ToWorker) => void): Promise<void> {
    switch (message.kind) {
      case 'start':
        return reply(await this.#start());
      case 'end':
        return reply({ kind: 'ended', text: await this.#end(message.how) });
      case 'ready':
        return this.#handlers.onReady(message.text);
      case 'starting':
        return this.#handlers.onStarting(message.at);
      case 'solves':
        return this.#handlers.onSolves(message.solves);
      case 'stop':
        return this.#handlers.onStop(message.reason);
      case 'finished':
        return;
    }
  }

  async #start(): Promise<ToWorker> {
    this.#state.setEnded(false);
    try {
      const adapter = await AdapterProcess.start({ ...this.#options, killAfterMs: this.#limits.killAfterMs });
      this.#adapter = adapter;
      void adapter.exited.then(() => {
        if (this.#adapter === adapter) this.#state.setEnded(true);
      });
      if (this.#isStopping) void adapter.end();
      const { write, read, peek, inPath, wakeToken } = adapter;
      return { kind: 'started', write, read, peek, inPath, wakeToken };
    } catch (error) {
      return {
        kind: 'failed',
        text: error instanceof Error ? error.message : 'the process could not be started',
      };
    }
  }

  async #end(how: EndHow): Promise<string> {
    const adapter = this.#adapter;
    if (!adapter) return '';
    if (how === 'close') await adapter.waitForExit(this.#limits.closeMs);
    if (how === 'end of file') await adapter.waitForExit(EXIT_WAIT_MS);
    const text = adapter.exit ? adapter.describeExit() : 'closed its output without ending';
    await this.#dropAdapter();
    const tail = this.#log.trimEnd().slice(-TOLD_LOG_CHARACTERS);
    return tail === '' ? text : `${text}; its log ends:\n${tail}`;
  }

  async #dropAdapter(): Promise<void> {
    const adapter = this.#adapter;
    if (!adapter) return;
    await adapter.end();
    this.#log = adapter.log();
    this.#adapter = null;
    adapter.dispose();
  }

  #watch(): void {
    if (this.#state.expire()) void this.#adapter?.end();
    // The worker asks for the end as soon as it sees one; that it has not may mean that it still waits.
    if (this.#adapter?.exit) this.#adapter.wake();
  }
}
