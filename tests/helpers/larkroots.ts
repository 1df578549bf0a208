import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { simpleGit } from 'simple-git';
import { writeLarkroots } from '../../server/demo/larkroots.ts';
import type { SuiteRevision } from '../../shared/schemas/case.ts';
import { prepareSuite } from '../../shared/suites/prepare.ts';
import { readSuiteText } from '../../shared/suites/read-suite.ts';

/** The demo library on disk, with a checkout of any of its commits. */
export interface Larkroots {
  /** Absolute folder of a checkout of a branch or of main~N. */
  checkout(ref: string): Promise<string>;
  remove(): void;
}

export async function createLarkroots(): Promise<Larkroots> {
  const scratch = mkdtempSync(join(tmpdir(), 'larkroots-'));
  const repository = join(scratch, 'repository');
  await writeLarkroots(repository);
  let count = 0;
  return {
    async checkout(ref) {
      count += 1;
      const folder = join(scratch, `build-${count}`);
      await simpleGit(repository).raw('worktree', 'add', '--detach', folder, ref);
      return folder;
    },
    remove: () => rmSync(scratch, { recursive: true, force: true }),
  };
}

/** A suite from the YAML of its cases (indented by two), certified. */
export function suiteOf(cases: string): SuiteRevision {
  const head = 'format: 1\nid: test\ntitle: Test\nlimits: { evaluations: 1000, seconds: 10 }\ncases:\n';
  return prepareSuite(readSuiteText(head + cases));
}
