/**
 * Format, lint, types and every test, then one closing line: "N passed, N failed".
 * A check that fails counts as one failure.
 */
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { execa } from 'execa';

const root = fileURLToPath(new URL('..', import.meta.url));
const scratch = mkdtempSync(join(tmpdir(), 'tallyroot-tests-'));
let passed = 0;
let failed = 0;

async function run(command: string, args: string[]): Promise<boolean> {
  const { exitCode } = await execa(command, args, {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
    reject: false,
    preferLocal: true,
  });
  return exitCode === 0;
}

function count(isFine: boolean): void {
  if (isFine) passed += 1;
  else failed += 1;
}

async function runTests(project: string): Promise<void> {
  const report = join(scratch, `${project}.json`);
  const isFine = await run('vitest', [
    'run',
    '--project',
    project,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ]);
  const counts = readCounts(report);
  passed += counts.passed;
  failed += counts.failed;
  // A file that could not be loaded has no test that failed, yet the run has.
  if (!isFine && counts.failed === 0) failed += 1;
}

function readCounts(report: string): { passed: number; failed: number } {
  try {
    const { numPassedTests, numFailedTests } = JSON.parse(readFileSync(report, 'utf8'));
    return { passed: Number(numPassedTests), failed: Number(numFailedTests) };
  } catch {
    return { passed: 0, failed: 1 };
  }
}

count(await run('biome', ['ci', '--colors=off', '.']));
count(await run('tsc', []));
count(await run('vite', ['build', '--logLevel', 'warn']));
for (const project of ['unit', 'http', 'peers', 'e2e']) await runTests(project);
rmSync(scratch, { recursive: true, force: true });
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;
