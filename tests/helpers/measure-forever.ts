import { caseOf, measureWith, solverOf } from './measuring.ts';

/** A program of its own that measures a solver which never ends; for the test that kills it. */
const limits = { seconds: 600, readyMs: 20_000 };
process.stdout.write('measuring\n');
await measureWith('sh $A/unruly.sh', [solverOf(process.argv[2] ?? 'hang')], [caseOf('one')], { limits });
