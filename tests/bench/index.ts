/**
 * Every ratio that the project promises, measured in this run, each beside its bound. Run it on a quiet
 * machine; it fails nothing, it prints.
 */
import { benchComparison } from './comparison.ts';
import { benchEvaluator } from './evaluator.ts';
import { benchInserts } from './inserts.ts';
import { printRequests } from './requests.ts';
import { benchWire, wireBounds } from './wire.ts';

interface Line {
  what: string;
  ratio: number;
  bound: string;
  isKept: boolean;
  note: string;
}

const atMost = (what: string, ratio: number, bound: number, note: string): Line => {
  return { what, ratio, bound: `at most ${bound.toFixed(1)}`, isKept: ratio <= bound, note };
};

function print({ what, ratio, bound, isKept, note }: Line): void {
  const kept = isKept ? '' : '  NOT KEPT';
  process.stdout.write(`${what.padEnd(46)} ${ratio.toFixed(2).padStart(6)}  ${bound}${kept}  (${note})\n`);
}

const us = (value: number): string => `${value.toFixed(1)} µs`;

const wire = await benchWire();
const bare = `bare ${us(wire.barePingPong)}`;
print(
  atMost(
    'round trip, lane and C adapter, to bare',
    wire.ratioC,
    wireBounds.ratioC,
    `${us(wire.laneC)}, ${bare}`,
  ),
);
print(
  atMost(
    'round trip, lane and Node adapter, to bare',
    wire.ratioNode,
    wireBounds.ratioNode,
    `${us(wire.laneNode)}, ${bare}`,
  ),
);
const run = `${wire.solves} solves, ${wire.evaluations} evaluations`;
print(atMost('whole run to its evaluations, C adapter', wire.wholeRunC, wireBounds.wholeRun, run));
print(atMost('whole run to its evaluations, Node adapter', wire.wholeRunNode, wireBounds.wholeRun, run));

for (const { equation, ratio, generatedNs } of benchEvaluator()) {
  print(
    atMost(`generated f to hand-written: ${equation.slice(0, 16)}`, ratio, 2, `${generatedNs.toFixed(0)} ns`),
  );
}

const inserts = await benchInserts();
print({
  what: 'solves stored, to bare prepared inserts',
  ratio: inserts.ratio,
  bound: 'at least 0.5',
  isKept: inserts.ratio >= 0.5,
  note: `${Math.round(inserts.solvesPerSecond)} solves/s, ${Math.round(inserts.bytesPerSolve)} bytes each`,
});

const comparison = await benchComparison();
print(
  atMost(
    `comparison of ${comparison.pairs} pairs to the bare read`,
    comparison.ratio,
    5,
    `${comparison.compareMs.toFixed(0)} ms, read ${comparison.bareReadMs.toFixed(0)} ms`,
  ),
);

// Fills a database of two million solves the first time, which takes minutes.
if (process.argv.includes('--large')) await printRequests();
