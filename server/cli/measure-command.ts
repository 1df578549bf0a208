import { resolve } from 'node:path';
import { measurementFile } from '../../shared/schemas/measurement.ts';
import { parseCommand, parseCount, requireOption } from './arguments.ts';
import { exitCodes } from './exit.ts';
import { writeJsonFile } from './json-file.ts';
import { measureFolder } from './measure-folder.ts';
import { openSuite } from './open-suite.ts';
import { createProgressBar, type ProgressBar } from './progress-bar.ts';
import { summariseMeasurement } from './summary.ts';
import { printable } from './table.ts';

export const measureUsage =
  'tallyroot measure --build DIR --suite ID-or-FILE [--solver NAME]… [--case ID]… [--lanes N] [--fresh] [--json FILE]';

/** `measure`: runs a build on a suite and prints what came of it. Needs no server and no database. */
export async function measureCommand(words: readonly string[]): Promise<number> {
  const { values } = parseCommand(
    words,
    {
      build: { type: 'string' },
      suite: { type: 'string' },
      solver: { type: 'string', multiple: true },
      case: { type: 'string', multiple: true },
      lanes: { type: 'string' },
      fresh: { type: 'boolean' },
      json: { type: 'string' },
    },
    measureUsage,
  );
  const folder = resolve(requireOption(values.build, 'build', measureUsage));
  const suite = openSuite(requireOption(values.suite, 'suite', measureUsage));
  const stop = new AbortController();
  const onInterrupt = (): void => stop.abort();
  process.once('SIGINT', onInterrupt);
  const progress: { bar?: ProgressBar } = {};
  try {
    const file = await measureFolder({
      folder,
      suite,
      solvers: values.solver ?? [],
      cases: values.case ?? [],
      lanes: parseCount(values.lanes, 'lanes', 1) ?? 1,
      fresh: values.fresh ?? false,
      onPlanned: (solves) => {
        progress.bar = createProgressBar(solves);
      },
      onSolved: (solver, caseId) => progress.bar?.advance(`${solver} on ${caseId}`),
      signal: stop.signal,
    });
    progress.bar?.finish();
    console.log(
      `${printable(file.build.library)} ${file.build.label} on ${suite.id}, ${file.suite.cases.length} cases`,
    );
    if (file.build.adapterText !== '') console.log(`adapter: ${printable(file.build.adapterText)}`);
    console.log(`\n${summariseMeasurement(file)}`);
    if (values.json !== undefined) {
      writeJsonFile(values.json, measurementFile.parse(file));
      console.log(`\nWritten to ${values.json}`);
    }
    if (file.stopped !== null) console.error(`\nThe run stopped early: ${printable(file.stopped)}`);
    return file.stopped === null ? exitCodes.fine : exitCodes.wrong;
  } finally {
    progress.bar?.finish();
    process.removeListener('SIGINT', onInterrupt);
  }
}
