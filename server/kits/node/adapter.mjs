// Adapter kit for Node.js 18 and later: copy this file into your repository. It has no dependencies.
// It speaks version 1 of the solver wire: solvers ask for f(x) on standard output and read answers from
// standard input, line by line. See README.md for how to use it.

import { Console } from 'node:console';
import { readSync, writeSync } from 'node:fs';

const LF = 10;
const pauseCell = new Int32Array(new SharedArrayBuffer(4));

let buffer = Buffer.allocUnsafe(65536);
let start = 0;
let end = 0;
// Lines that wait for no answer go out with the next one that does: a call less for each of them.
let waiting = '';
const WAITING_MOST = 8192;
const answer = { y: 0, dy: 0 };

/** Thrown out of an evaluation when the budget is used up, so that the solver unwinds. Do not keep it. */
export class Stopped extends Error {
  constructor() {
    super('the budget is used up');
    this.name = 'Stopped';
  }
}

/**
 * Serves solves until Tallyroot closes the wire; does not return before.
 * `name`: the library and its version. `solvers`: a function for each solver of the manifest.
 */
export function serve({ name = '', solvers }) {
  keepOutputForTheWire();
  for (let line = readLine(); line !== null && line !== 'close'; line = readLine()) {
    const [verb, id, solver] = line.split(/[ \t]+/);
    if (verb === 'open') write(`ready 1 ${oneLine(name)}`);
    else if (verb === 'solve') runSolve(id, solvers, solver);
  }
  process.exit(0);
}

/** A library that prints must not break the wire: what it prints goes to standard error. */
function keepOutputForTheWire() {
  process.on('exit', sendWaiting);
  globalThis.console = new Console(process.stderr, process.stderr);
  process.stdout.write = process.stderr.write.bind(process.stderr);
}

function runSolve(id, solvers, name) {
  const head = readHead();
  if (head === null) process.exit(0);
  const state = { isStopped: false };
  let result;
  try {
    const solver = Object.hasOwn(solvers, name) ? solvers[name] : undefined;
    if (solver === undefined) throw new Error(`there is no solver ${name}`);
    const { f, df, d2f, fdf } = makeEvaluations(head.offers, state);
    const { bracket, starts, settings, allow } = head;
    const tools = { fdf, step, iterations };
    result = solver(f, df, d2f, { bracket, starts, settings, allow }, head.tolerance, tools);
  } catch (error) {
    result = { fail: error instanceof Error ? error.message : String(error) };
  }
  if (state.isStopped) write(`fail ${id} the budget is used up`);
  else if (typeof result === 'number') write(`root ${id} ${formatNumber(result)}`);
  else if (result && typeof result.fail === 'string') write(`fail ${id} ${oneLine(result.fail)}`);
  else write(`fail ${id} the solver returned no number`);
}

function readHead() {
  const head = {
    bracket: null,
    starts: [],
    offers: [],
    tolerance: { xabs: 0, xrel: 0, fabs: 0 },
    settings: {},
    allow: 0,
  };
  for (let line = readLine(); line !== 'go'; line = readLine()) {
    if (line === null || line === 'close') return null;
    const [verb, ...fields] = line.split(/[ \t]+/);
    if (verb === 'bracket') head.bracket = fields.map(parseNumber);
    else if (verb === 'start') head.starts = fields.map(parseNumber);
    else if (verb === 'offers') head.offers = fields;
    else if (verb === 'tolerance') {
      const [xabs, xrel, fabs] = fields.map(parseNumber);
      head.tolerance = { xabs, xrel, fabs };
    } else if (verb === 'set') {
      const value = Number(fields[1]);
      head.settings[fields[0]] = Number.isNaN(value) ? fields[1] : value;
    } else if (verb === 'allow') head.allow = Number(fields[0]);
    // Head lines that this kit does not know are skipped, as the wire asks.
  }
  return head;
}

function makeEvaluations(offers, state) {
  const ask = (verb, needs, x) => {
    if (state.isStopped) throw new Stopped();
    const missing = needs.find((need) => !offers.includes(need));
    if (missing !== undefined)
      throw new Error(`${missing} is not offered: name it under uses in the manifest`);
    write(`${verb} ${formatNumber(x)}`);
    if (readAnswer()) return answer.y;
    state.isStopped = true;
    throw new Stopped();
  };
  const needsF = ['f'];
  const needsDf = ['df'];
  const needsD2f = ['d2f'];
  const needsBoth = ['f', 'df'];
  return {
    f: (x) => ask('f', needsF, x),
    df: (x) => ask('df', needsDf, x),
    d2f: (x) => ask('d2f', needsD2f, x),
    fdf: (x) => [ask('fdf', needsBoth, x), answer.dy],
  };
}

function step(x, low, high) {
  const bracket =
    low === undefined || high === undefined ? '' : ` ${formatNumber(low)} ${formatNumber(high)}`;
  keep(`step ${formatNumber(x)}${bracket}`);
}

function iterations(count) {
  keep(`iterations ${Math.trunc(count)}`);
}

/** False where `stop` came instead of an answer. */
function readAnswer() {
  const line = readLine();
  if (line === null || line === 'close') process.exit(0);
  if (line === 'stop') return false;
  const blank = line.indexOf(' ', 2);
  answer.y = parseNumber(blank === -1 ? line.slice(2) : line.slice(2, blank));
  answer.dy = blank === -1 ? Number.NaN : parseNumber(line.slice(blank + 1));
  return true;
}

function formatNumber(x) {
  if (typeof x !== 'number') throw new TypeError(`a number was expected, not ${typeof x}`);
  if (Number.isFinite(x)) return Object.is(x, -0) ? '-0' : String(x);
  if (Number.isNaN(x)) return 'nan';
  return x > 0 ? 'inf' : '-inf';
}

function parseNumber(text) {
  if (text === 'inf') return Number.POSITIVE_INFINITY;
  if (text === '-inf') return Number.NEGATIVE_INFINITY;
  return Number(text); // 'nan' is no number to Number either
}

/** Free text must stay on its line. */
function oneLine(text) {
  return text.replace(/\p{Cc}+/gu, ' ').slice(0, 200);
}

/** The next line without its line feed; null at the end of the input. */
function readLine() {
  for (;;) {
    for (let at = start; at < end; at += 1) {
      if (buffer[at] !== LF) continue;
      const line = buffer.toString('latin1', start, at);
      start = at + 1;
      return line;
    }
    if (!fillBuffer()) return null;
  }
}

function fillBuffer() {
  if (start === end) {
    start = 0;
    end = 0;
  } else if (start > 0) {
    buffer.copyWithin(0, start, end);
    end -= start;
    start = 0;
  }
  if (end === buffer.length) buffer = Buffer.concat([buffer], buffer.length * 2);
  const count = patiently(() => readSync(0, buffer, end, buffer.length - end, null));
  end += count;
  return count > 0;
}

/** Writes a line, and before it those that were kept for it. */
function write(line) {
  const text = `${waiting}${line}\n`;
  waiting = '';
  send(text);
}

function keep(line) {
  waiting += `${line}\n`;
  if (waiting.length > WAITING_MOST) sendWaiting();
}

function sendWaiting() {
  const text = waiting;
  waiting = '';
  if (text !== '') send(text);
}

/** A short text goes in one call, as it is; what the pipe does not take at once follows as bytes. */
function send(text) {
  const count = patiently(() => writeSync(1, text));
  if (count >= text.length && count === Buffer.byteLength(text)) return;
  const bytes = Buffer.from(text);
  let at = count;
  while (at < bytes.length) at += patiently(() => writeSync(1, bytes, at, bytes.length - at));
}

/** Descriptors that somebody made non-blocking say EAGAIN instead of waiting. */
function patiently(act) {
  for (;;) {
    try {
      return act();
    } catch (error) {
      if (error.code === 'EOF') return 0;
      if (error.code === 'EPIPE') process.exit(0);
      if (error.code !== 'EAGAIN' && error.code !== 'EWOULDBLOCK') throw error;
      Atomics.wait(pauseCell, 0, 0, 1);
    }
  }
}
