import { useQueries, useQuery } from '@tanstack/react-query';
import { useNavigate } from 'react-router';
import { CommandList } from '../components/command-list/command-list.tsx';
import type { Command } from '../components/command-list/rank-commands.ts';
import { buildsQuery } from '../features/builds/builds.queries.ts';
import { librariesQuery } from '../features/libraries/libraries.queries.ts';
import { type Person, personMay } from '../features/session/asker.ts';
import { suiteRevisionQuery, suitesQuery } from '../features/suites/suites.queries.ts';
import { formatCommit } from '../lib/format.ts';
import { formatEquation } from '../lib/format-equation.ts';
import { paths } from '../paths.ts';

const page = (name: string, about: string, to: string): Command => ({ kind: 'page', name, about, to });

function pagesFor(person: Person): Command[] {
  const pages = [
    page('Overview', 'what waits for you', paths.overview()),
    page('Libraries', 'all that you may see', paths.libraries()),
    page('Suites', 'equations and their certified roots', paths.suites()),
    page('Guide', 'adapters, suites, what the words mean', paths.guide()),
    page('Account', 'name, password, where you are signed in', paths.account()),
    page('Create a library', 'name, description, who sees it', paths.newLibrary()),
  ];
  if (!personMay(person, 'site.people')) return pages;
  return [
    ...pages,
    page('People', 'of the site', paths.site()),
    page('Lanes', 'of the site: where and with what is measured', paths.sitePage('lanes')),
    page('Mail', 'of the site: what was sent and waits', paths.sitePage('mail')),
    page('Audit log', 'of the site: who did what', paths.sitePage('log')),
  ];
}

/** Everything that can be gone to, read when the list is opened. */
export function CommandListSheet({ person, onClose }: { person: Person; onClose: () => void }) {
  const navigate = useNavigate();
  const libraries = useQuery(librariesQuery);
  const suites = useQuery(suitesQuery);
  const builds = useQueries({ queries: (libraries.data ?? []).map((one) => buildsQuery(one.slug)) });
  const revisions = useQueries({
    queries: (suites.data ?? []).map((suite) => suiteRevisionQuery(suite.slug, suite.revision)),
  });
  const commands: Command[] = [
    ...pagesFor(person),
    ...(libraries.data ?? []).flatMap((one) => [
      { kind: 'library', name: one.name, about: one.description, to: paths.library(one.slug) },
      ...(personMay(person, 'members.read', one)
        ? [page(`${one.name}, settings`, 'members, tokens, allowances', paths.librarySettings(one.slug))]
        : []),
    ]),
    ...(suites.data ?? []).map((one) => ({
      kind: 'suite',
      name: one.slug,
      about: one.title,
      to: paths.suite(one.slug),
    })),
    ...builds.flatMap((query) =>
      (query.data ?? []).map((build) => ({
        kind: 'build',
        name: formatCommit(build.commit ?? build.label),
        about: `${build.label}, ${build.library}`,
        to: paths.build(build.id),
      })),
    ),
    ...revisions.flatMap(({ data }) =>
      (data?.cases ?? []).map((one) => ({
        kind: 'case',
        name: one.id,
        about: `${formatEquation(one.equation)}, ${data?.suite ?? ''}`,
        to: paths.suiteCase(data?.suite ?? '', one.id),
      })),
    ),
  ];
  return (
    <CommandList
      commands={commands}
      isReading={[libraries, suites, ...builds, ...revisions].some((query) => query.isPending)}
      onClose={onClose}
      onChoose={(command) => {
        onClose();
        void navigate(command.to);
      }}
    />
  );
}
