import { compareCommand, compareUsage } from './compare-command.ts';
import { demoCommand, demoUsage } from './demo-command.ts';
import { exitCodes, explainError } from './exit.ts';
import { measureCommand, measureUsage } from './measure-command.ts';
import { schemaCommand, schemaUsage } from './schema-command.ts';
import { suitesCommand, suitesUsage } from './suites-command.ts';
import { traceCommand, traceUsage } from './trace-command.ts';

const commands = new Map<string, (words: readonly string[]) => Promise<number>>([
  ['measure', measureCommand],
  ['compare', compareCommand],
  ['trace', traceCommand],
  ['suites', suitesCommand],
  ['schema', schemaCommand],
  ['demo', demoCommand],
]);

const help = [
  'tallyroot: what a change did to a solver',
  '',
  ...[measureUsage, compareUsage, traceUsage, suitesUsage, schemaUsage, demoUsage].map(
    (usage) => `  ${usage}`,
  ),
  '',
  'Exit status: 0 done, or within allowances; 1 beyond allowances; 2 anything that went wrong.',
].join('\n');

async function run(): Promise<number> {
  const [name, ...words] = process.argv.slice(2);
  if (name === undefined || name === 'help' || name === '--help' || name === '-h') {
    console.log(help);
    return exitCodes.fine;
  }
  const command = commands.get(name);
  if (command === undefined) {
    console.error(`There is no command ${JSON.stringify(name)}.\n\n${help}`);
    return exitCodes.wrong;
  }
  return command(words);
}

try {
  process.exitCode = await run();
} catch (error) {
  console.error(explainError(error));
  process.exitCode = exitCodes.wrong;
}
