import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { pino } from 'pino';
import { createApp } from '../../server/app.ts';
import { testIdentity } from '../helpers/app-identity.ts';
import { signInDefault } from '../helpers/sign-in.ts';
import { type BenchStore, openBenchStore, shortest, solveCount, timed } from './stored-solves.ts';

/** Kept between two calls, since it takes a while to fill. */
const folder = fileURLToPath(new URL('../../.bench/requests', import.meta.url));
const runCount = 100;
const buildCount = 10;
const repeats = 60;

export interface RequestsBench {
  solves: number;
  megabytes: number;
  lines: { what: string; p50: number; p95: number }[];
  /** A comparison of 20,000 pairs that nothing has kept, over HTTP, to the bare read of the same rows. */
  comparisonRatio: number;
  comparisonMs: number;
  bareReadMs: number;
}

/** 2,000,000 solves in 100 finished runs of ten builds, through the repo. Without paths, which no list reads. */
async function fill(store: BenchStore): Promise<number[]> {
  const { client, services, repo } = store;
  const finished = client.sqlite
    .prepare<[], number>("SELECT id FROM runs WHERE status = 'finished' ORDER BY id")
    .pluck();
  const known = new Set(finished.all());
  const finish = client.sqlite.prepare<[number]>(
    "UPDATE runs SET status = 'finished', phase = 'done' WHERE id = ?",
  );
  while (services.builds.list('bench', { limit: 500 }).items.length < buildCount)
    await store.newBuild('another');
  const builds = services.builds.list('bench', { limit: 500 }).items.map((build) => build.id);
  for (let made = known.size; made < runCount; made += 1) {
    const run = store.newRun(builds[made % builds.length]);
    repo.insertMany(
      run,
      store.solves(run, made).map((solve) => ({ ...solve, path: null })),
    );
    finish.run(run);
    if (made % 10 === 9) process.stderr.write(`${((made + 1) * solveCount).toLocaleString('en')} solves\n`);
  }
  return finished.all();
}

function percentile(times: readonly number[], share: number): number {
  const sorted = times.toSorted((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)] ?? Number.NaN;
}

/** The time of requests to the real application over HTTP, one after the other, body read to its end. */
export async function benchRequests(): Promise<RequestsBench> {
  const store = await openBenchStore(folder);
  const runs = await fill(store);
  const { client, services } = store;
  const server = createServer(
    signInDefault(
      createApp({
        services,
        identity: testIdentity(client, services),
        logger: pino({ level: 'silent' }),
        allowedHosts: [],
      }),
      services,
    ).app,
  );
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  const get = async (address: string): Promise<number> => {
    const from = performance.now();
    const answer = await fetch(`http://127.0.0.1:${port}/api${address}`);
    const { length } = await answer.text();
    if (answer.status !== 200 || length < 100) throw new Error(`${address} answered ${answer.status}`);
    return performance.now() - from;
  };
  const run = (index: number): number => runs[index % runs.length] ?? 0;
  const lists: [string, (index: number) => string][] = [
    ['library', () => '/libraries/bench'],
    ['builds of a library', () => '/libraries/bench/builds'],
    ['runs of a library', () => '/runs?library=bench&limit=50'],
    ['run with its solvers in figures', (index) => `/runs/${run(index * 7)}`],
    ['solves of a run, first page', (index) => `/runs/${run(index * 7)}/solves?limit=100`],
    [
      'solves of a run, by digits, of one solver',
      (index) => `/runs/${run(index * 7)}/solves?limit=100&sort=digits&direction=down&solver=solver-7`,
    ],
    [
      'solves of a run, by evaluations, all',
      (index) => `/runs/${run(index * 7)}/solves?limit=100&sort=evaluations&direction=down`,
    ],
    [
      'pairs of a comparison that is kept',
      (index) =>
        `/comparisons/pairs?candidate=${run(1)}&reference=${run(0)}&limit=100&solver=solver-${index % 20}`,
    ],
    ['comparison that is kept', () => `/comparisons?candidate=${run(1)}&reference=${run(0)}`],
    ['profile of a run', (index) => `/runs/${run(index)}/profile`],
    ['trend that is kept', () => '/libraries/bench/trend?suite=bench'],
  ];
  const lines: RequestsBench['lines'] = [];
  for (const [what, address] of lists) {
    for (let warm = 0; warm < 3; warm += 1) await get(address(warm));
    const times: number[] = [];
    for (let count = 0; count < repeats; count += 1) times.push(await get(address(count)));
    lines.push({ what, p50: percentile(times, 0.5), p95: percentile(times, 0.95) });
  }
  const trends: number[] = [];
  for (let builds = 2; builds <= buildCount; builds += 1)
    trends.push(await get(`/libraries/bench/trend?suite=bench&builds=${builds}`));
  lines.push({
    what: 'trend over ten builds that is not kept',
    p50: trends.at(-1) ?? 0,
    p95: trends.at(-1) ?? 0,
  });

  const bare = client.sqlite.prepare<[number]>('SELECT * FROM solves WHERE run_id = ?').raw();
  const cold: number[] = [];
  const reads: number[] = [];
  for (let index = 2; index < 22; index += 2) {
    const [reference, candidate] = [run(index), run(index + 1)];
    // Read once before, so that both find the pages in memory.
    bare.all(reference);
    bare.all(candidate);
    reads.push(timed(() => void [bare.all(reference), bare.all(candidate)]));
    cold.push(await get(`/comparisons?candidate=${candidate}&reference=${reference}`));
  }
  lines.push({
    what: 'comparison that is not kept',
    p50: percentile(cold, 0.5),
    p95: percentile(cold, 0.95),
  });
  const pageBytes = Number(client.sqlite.pragma('page_size', { simple: true }));
  const pages = Number(client.sqlite.pragma('page_count', { simple: true }));
  await new Promise<void>((resolve) => {
    server.close(() => resolve());
    server.closeAllConnections();
  });
  store.close();
  return {
    solves: runs.length * solveCount,
    megabytes: (pages * pageBytes) / 1e6,
    lines,
    comparisonRatio: shortest(cold) / shortest(reads),
    comparisonMs: shortest(cold),
    bareReadMs: shortest(reads),
  };
}

export async function printRequests(): Promise<void> {
  const { solves, megabytes, lines, ...rest } = await benchRequests();
  const write = (text: string) => process.stdout.write(`${text}\n`);
  write(`requests on ${solves.toLocaleString('en')} solves (${Math.round(megabytes)} MB), in ms:`);
  for (const { what, p50, p95 } of lines)
    write(`  ${what.padEnd(44)} median ${p50.toFixed(1).padStart(7)}  p95 ${p95.toFixed(1).padStart(7)}`);
  write(
    `comparison of ${solveCount.toLocaleString('en')} pairs over HTTP: ${rest.comparisonMs.toFixed(0)} ms, ` +
      `bare read of the rows ${rest.bareReadMs.toFixed(0)} ms: ratio ${rest.comparisonRatio.toFixed(2)}`,
  );
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) await printRequests();
