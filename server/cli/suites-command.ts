import { AppError } from '../../shared/errors.ts';
import { prepareSuite } from '../../shared/suites/prepare.ts';
import { readSuiteText } from '../../shared/suites/read-suite.ts';
import { parseCommand } from './arguments.ts';
import { exitCodes } from './exit.ts';
import { builtInSuites, openSuite, readSuiteFile, storedCertificates } from './open-suite.ts';
import { formatTable } from './table.ts';

export const suitesUsage = 'tallyroot suites [check FILE]';

/** `suites`: lists the built-in ones. `suites check FILE`: reads one and certifies its roots. */
export async function suitesCommand(words: readonly string[]): Promise<number> {
  const { positionals } = parseCommand(words, {}, suitesUsage);
  const [action, path, ...rest] = positionals;
  if (action === undefined) {
    console.log(
      formatTable(
        [
          { title: 'suite', text: (suite) => suite.id },
          { title: 'cases', align: 'right', text: (suite) => String(suite.cases.length) },
          {
            title: 'with a root',
            align: 'right',
            text: (suite) => String(suite.cases.filter((one) => one.roots.length > 0).length),
          },
          { title: 'revision', text: (suite) => suite.revision.slice(0, 12) },
          { title: 'title', text: (suite) => suite.title },
        ],
        builtInSuites().map((id) => openSuite(id)),
      ),
    );
    return exitCodes.fine;
  }
  if (action !== 'check' || path === undefined || rest.length > 0) {
    throw new AppError('invalid', `Usage: ${suitesUsage}`);
  }
  const suite = prepareSuite(readSuiteText(readSuiteFile(path)), storedCertificates());
  const roots = suite.cases.reduce((sum, one) => sum + one.roots.length, 0);
  console.log(
    `${suite.id}: ${suite.cases.length} cases, ${roots} roots certified, revision ${suite.revision.slice(0, 12)}`,
  );
  return exitCodes.fine;
}
