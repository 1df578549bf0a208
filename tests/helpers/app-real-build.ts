import { mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Decimal } from 'decimal.js';
import type { SuiteRevision } from '../../shared/schemas/case.ts';
import { buildCase, buildRevision } from './builders.ts';

/**
 * A tiny library for real runs: bisection on a bracket, and a secant that in its changed form evaluates its
 * first start twice where a is even. Each solve lasts a moment, so that it can be interrupted.
 */
const adapter = `
import { createInterface } from 'node:readline';
const isChanged = process.env.FORM === 'changed';
const pauseMs = Number(process.env.PAUSE_MS);
const lines = createInterface({ input: process.stdin })[Symbol.asyncIterator]();
const read = async () => (await lines.next()).value;
const say = (line) => process.stdout.write(line + '\\n');
const f = async (x) => {
  say('f ' + x);
  const line = await read();
  if (line === undefined || line === 'stop') throw new Error('stop');
  return Number(line.slice(2));
};
async function bisection({ bracket: [a, b] }) {
  let fa = await f(a);
  for (let k = 0; k < 30; k += 1) {
    const m = (a + b) / 2;
    const fm = await f(m);
    if (fm === 0) return m;
    if (Math.sign(fm) === Math.sign(fa)) [a, fa] = [m, fm];
    else b = m;
    say('step ' + m);
  }
  return (a + b) / 2;
}
async function secant({ start: [x0, x1] }) {
  let [y0, y1] = [await f(x0), await f(x1)];
  if (isChanged && Math.round(-y0) % 2 === 1) y0 = await f(x0);
  for (let k = 0; k < 40 && y1 !== 0 && x1 !== x0 && y1 !== y0; k += 1) {
    const x2 = x1 - (y1 * (x1 - x0)) / (y1 - y0);
    [x0, y0] = [x1, y1];
    x1 = x2;
    say('step ' + x1);
    y1 = await f(x1);
  }
  return x1;
}
const solvers = { bisection, secant };
for (let line = await read(); line !== undefined && line !== 'close'; line = await read()) {
  const [verb, id, name] = line.split(' ');
  if (verb === 'open') say('ready 1 cube roots 1.0');
  if (verb !== 'solve') continue;
  const head = {};
  for (let next = await read(); next !== 'go'; next = await read()) {
    const [key, ...fields] = next.split(' ');
    head[key] = fields.map(Number);
  }
  await new Promise((resolve) => setTimeout(resolve, pauseMs));
  try {
    say('root ' + id + ' ' + (await solvers[name](head)));
  } catch (error) {
    say('fail ' + id + ' ' + error.message);
  }
}
process.exit(0);
`;

const manifest = (form: string, pauseMs: number) => `format: 1
library: Cube roots
adapter: node adapter.mjs
environment: { FORM: "${form}", PAUSE_MS: "${pauseMs}" }
solvers:
  - { name: bisection, takes: [bracket], uses: [f], order: 1, tolerance: { xabs: 1.0e-8 } }
  - { name: secant, takes: [start], starts: 2, uses: [f], order: 1.618 }
`;

/** Writes the library into a folder; `pauseMs` is what each solve lasts at least. */
export function writeRealBuild(
  folder: string,
  options: { form: 'first' | 'changed'; pauseMs: number },
): string {
  mkdirSync(folder, { recursive: true });
  writeFileSync(path.join(folder, 'adapter.mjs'), adapter);
  writeFileSync(path.join(folder, 'tallyroot.yaml'), manifest(options.form, options.pauseMs));
  return folder;
}

const Precise = Decimal.clone({ precision: 60 });

/** x³ = a for a from 2 to `count` + 1, and one case without a bracket, where bisection is not applicable. */
export function cubeRoots(count: number): SuiteRevision {
  const cases = Array.from({ length: count }, (_, index) => {
    const a = index + 2;
    const [root] = buildCase().roots;
    return buildCase({
      id: `cube-root/${a}`,
      parameters: { a: String(a) },
      bracket: index === 0 ? null : ['0', String(a)],
      starts: [['1', '2']],
      roots: root ? [{ ...root, value: new Precise(a).cbrt().toFixed(50), digits: 50 }] : [],
    });
  });
  return buildRevision({ id: 'cube-roots', title: 'Cube roots', cases });
}
