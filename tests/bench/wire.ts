import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { builtInSuites, readSuiteFile, storedCertificates } from '../../server/cli/open-suite.ts';
import { prepareSuite } from '../../shared/suites/prepare.ts';
import { readSuiteText } from '../../shared/suites/read-suite.ts';
import { caseOf, measureWith, solverOf } from '../helpers/measuring.ts';

/** Times of the wire in microseconds; ratios dimensionless. */
export interface WireBench {
  /** One round trip of a line between two C processes over two pipes. */
  barePingPong: number;
  /** One evaluation of an adapter in C, and of one in JavaScript through the kit, answered by a lane. */
  laneC: number;
  laneNode: number;
  ratioC: number;
  ratioNode: number;
  /** Wall time of a whole run on one lane over (evaluations × round trip): everything else that a run costs. */
  wholeRunC: number;
  wholeRunNode: number;
  /** Of one whole run. */
  solves: number;
  evaluations: number;
}

/** What the wire may cost: ratios to the bare round trip, and of a whole run to its evaluations. */
export const wireBounds = { ratioC: 2.0, ratioNode: 2.6, wholeRun: 1.4 } as const;

const ROUNDS = 7;
const SPINS = 4000;
const adapters = fileURLToPath(new URL('../fixtures/adapters/kit.mjs', import.meta.url));
const sources = fileURLToPath(new URL('.', import.meta.url));

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? Number.NaN;
}

/** Microseconds of one evaluation in a long solve of a solver that only asks. */
async function roundTrip(command: string, solver: string): Promise<number> {
  const limits = {
    evaluations: SPINS,
    seconds: 60,
    readyMs: 20_000,
    graceMs: 5000,
    closeMs: 5000,
    pathLines: SPINS,
  };
  const cases = [caseOf('warm', { equation: 'x^2 - 2' }), caseOf('timed', { equation: 'x^2 - 2' })];
  const { records } = await measureWith(command, [solverOf(solver)], cases, { limits });
  const last = records.at(-1);
  if (last?.evaluations !== SPINS) throw new Error('The solver that only asks did not use its budget.');
  return (last.elapsedMs * 1000) / SPINS;
}

/** Every built-in suite, as a team that takes them all would run them. */
function wholeRunCases(): Parameters<typeof measureWith>[2] {
  const certificates = storedCertificates();
  return builtInSuites().flatMap((suite) => {
    const { cases } = prepareSuite(readSuiteText(readSuiteFile(suite)), certificates);
    return cases.map((one) => ({ ...one, id: `${suite}/${one.id}` }));
  });
}

interface WholeRun {
  perEvaluation: number;
  solves: number;
  evaluations: number;
}

/** Microseconds of a whole run for each of its evaluations, start and end of the adapter included. */
async function wholeRun(command: string, cases: Parameters<typeof measureWith>[2]): Promise<WholeRun> {
  const solvers = [
    solverOf('secant', { starts: 2 }),
    solverOf('newton', { uses: ['f', 'df'] }),
    solverOf('bisection', { takes: 'bracket', starts: 0 }),
  ];
  const limits = { evaluations: 1000, seconds: 60, readyMs: 20_000, graceMs: 5000, closeMs: 5000 };
  const { records, elapsedMs } = await measureWith(command, solvers, cases, { limits });
  const evaluations = records.reduce((sum, record) => sum + record.evaluations, 0);
  return { perEvaluation: (elapsedMs * 1000) / evaluations, solves: records.length, evaluations };
}

/** Everything in one run, taken in turns, so that a slow moment of the machine meets all of them. */
export async function benchWire(): Promise<WireBench> {
  const folder = mkdtempSync(join(tmpdir(), 'bench-wire-'));
  try {
    for (const name of ['ping-pong', 'adapter']) {
      execFileSync('gcc', ['-O2', '-o', join(folder, name), join(sources, `${name}.c`), '-lm']);
    }
    const adapterC = join(folder, 'adapter');
    const adapterNode = `node ${adapters}`;
    const cases = wholeRunCases();
    const bare: number[] = [];
    const laneC: number[] = [];
    const laneNode: number[] = [];
    const runC: number[] = [];
    const runNode: number[] = [];
    // Until the lane's code is compiled; a server is measured by its second hour, not by its first second.
    for (let round = 0; round < 2; round += 1) {
      await roundTrip(adapterC, 'spin');
      await wholeRun(adapterC, cases);
    }
    let size = await wholeRun(adapterC, cases);
    for (let round = 0; round < ROUNDS; round += 1) {
      bare.push(Number(execFileSync(join(folder, 'ping-pong'), [String(SPINS)], { encoding: 'utf8' })));
      laneC.push(await roundTrip(adapterC, 'spin'));
      laneNode.push(await roundTrip(adapterNode, 'spin'));
      size = await wholeRun(adapterC, cases);
      runC.push(size.perEvaluation);
      runNode.push((await wholeRun(adapterNode, cases)).perEvaluation);
    }
    return {
      barePingPong: median(bare),
      laneC: median(laneC),
      laneNode: median(laneNode),
      ratioC: median(laneC) / median(bare),
      ratioNode: median(laneNode) / median(bare),
      wholeRunC: median(runC) / median(laneC),
      wholeRunNode: median(runNode) / median(laneNode),
      solves: size.solves,
      evaluations: size.evaluations,
    };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
