import { existsSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { simpleGit } from 'simple-git';
import type { RunBase } from '../../shared/schemas/runs.ts';
import type { Actor } from '../actor.ts';
import type { Services } from '../features/services.ts';
import { type DemoCommit, demoCommits, writeLarkroots } from './larkroots.ts';
import { ensureDemoPeople, settleDemoPeople } from './people.ts';

const slug = 'larkroots';
/** Every build runs on the small suite; main's last one and the branches on this one too. */
const smallSuite = 'hard-dozen';
const largeSuite = 'open-starts';

const main = demoCommits.filter((commit) => commit.branch === 'main');

/**
 * Fills an empty database with the demo: writes the invented library as a git repository below `folder`, then
 * registers its commits, runs them and agrees on reference results, as anyone would. Safe to repeat after an
 * interruption: what is there already is found again.
 */
export async function seedDemo(services: Services, folder: string): Promise<void> {
  const actorOf = ensureDemoPeople(services);
  const maud = actorOf('Maud Ferreday');
  const repository = join(folder, slug);
  await writeOnce(repository);
  if (services.libraries.list({ limit: 100 }).items.every((library) => library.slug !== slug)) {
    services.libraries.create(maud, {
      slug,
      name: 'larkroots',
      description: 'Roots of one equation in one unknown, for the field notebooks of Larkmoor.',
      homepage: null,
      visibility: 'public',
    });
  }
  settleDemoPeople(services, slug);
  let before: number | null = null;
  for (const { commit, hash } of await commitsOf(repository)) {
    const build = await registerOnce({ services, repository, actorOf }, join(folder, 'builds'), commit, hash);
    const isTip = commit === main.at(-1) || commit.branch !== 'main';
    const against: RunBase | null = before === null ? null : { kind: 'run', run: before };
    // Branches are measured against what the team has agreed on, main against the build before.
    const base = commit.branch === 'main' ? against : undefined;
    const run = await runOnce(services, actorOf(commit.author.name), {
      build,
      suite: smallSuite,
      against: base,
    });
    const large = isTip
      ? await runOnce(services, actorOf(commit.author.name), { build, suite: largeSuite })
      : null;
    if (commit.branch === 'main') before = run;
    if (commit === main.at(-1)) {
      agreeOnce(services, maud, smallSuite, run);
      if (large !== null) agreeOnce(services, maud, largeSuite, large);
    }
  }
}

async function writeOnce(repository: string): Promise<void> {
  if (existsSync(repository)) return;
  const partial = `${repository}.part`;
  rmSync(partial, { recursive: true, force: true });
  await writeLarkroots(partial);
  renameSync(partial, repository);
}

async function commitsOf(repository: string): Promise<{ commit: DemoCommit; hash: string }[]> {
  const git = simpleGit(repository);
  const refOf = (commit: DemoCommit): string => {
    return commit.branch === 'main' ? `main~${main.length - 1 - main.indexOf(commit)}` : commit.branch;
  };
  return Promise.all(
    demoCommits.map(async (commit) => ({ commit, hash: (await git.revparse([refOf(commit)])).trim() })),
  );
}

interface DemoWork {
  services: Services;
  repository: string;
  actorOf(name: string): Actor;
}

async function registerOnce(
  { services, repository, actorOf }: DemoWork,
  builds: string,
  commit: DemoCommit,
  hash: string,
): Promise<number> {
  const checkout = join(builds, hash.slice(0, 12));
  if (!existsSync(checkout)) await simpleGit(repository).raw('worktree', 'add', '--detach', checkout, hash);
  const actor = actorOf(commit.author.name);
  const { build } = await services.builds.registerFolder(actor, slug, {
    folder: checkout,
    label: commit.message,
  });
  return build.id;
}

/** Runs a build on a suite, or finds the run that did, and waits for its end. */
async function runOnce(
  services: Services,
  actor: Actor,
  body: { build: number; suite: string; against?: RunBase | null | undefined },
): Promise<number> {
  const known = services.runs.list({ build: body.build, suite: body.suite, limit: 1 }).items[0];
  const run = known ?? services.runs.start(actor, body);
  const ended = await services.runs.wait(run.id);
  if (ended.status !== 'finished') throw new Error(`Demo run ${run.id} ended: ${ended.status}.`);
  return run.id;
}

function agreeOnce(services: Services, actor: Actor, suite: string, run: number): void {
  if (services.references.list(slug, { suite, limit: 1 }).items.length > 0) return;
  services.references.setFirst(actor, slug, { run, reason: 'What main does is what we agree on from here.' });
}
