import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Navigate, useParams } from 'react-router';
import type { Action } from '../../../shared/permissions.ts';
import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { SubNav } from '../../components/sheet/sub-nav.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { AuditLog } from '../../features/audit/audit-log.tsx';
import { libraryQuery } from '../../features/libraries/libraries.queries.ts';
import { roleIn } from '../../features/session/asker.ts';
import { useMay, usePerson } from '../../features/session/use-may.ts';
import { type SettingsPage as PageName, paths } from '../../paths.ts';
import { AllowancesSection } from './allowances-section.tsx';
import { GeneralSection } from './general-section.tsx';
import { MembersSection } from './members-section.tsx';
import {
  AllowancesSentence,
  LibrarySentence,
  MembersSentence,
  type SentenceProps,
  TokensSentence,
} from './section-sentences.tsx';
import { TokensSection } from './tokens-section.tsx';

interface Section {
  page: PageName | undefined;
  label: string;
  needs: Action;
  Sentence: (props: SentenceProps) => ReactNode;
  /** Who could, where one may not. */
  otherwise: string;
  render: (library: LibraryView) => ReactNode;
}

const sections: readonly Section[] = [
  {
    page: undefined,
    label: 'Library',
    needs: 'library.read',
    Sentence: LibrarySentence,
    otherwise: '',
    render: (library) => <GeneralSection key={library.slug} library={library} />,
  },
  {
    page: 'members',
    label: 'Members',
    needs: 'members.read',
    Sentence: MembersSentence,
    otherwise: 'Its members see who they are.',
    render: (library) => <MembersSection library={library} />,
  },
  {
    page: 'tokens',
    label: 'Bot tokens',
    needs: 'tokens.edit',
    Sentence: TokensSentence,
    otherwise: 'Its maintainers make and revoke tokens.',
    render: (library) => <TokensSection library={library} />,
  },
  {
    page: 'allowances',
    label: 'Allowances',
    needs: 'library.read',
    Sentence: AllowancesSentence,
    otherwise: '',
    render: (library) => <AllowancesSection library={library} />,
  },
  {
    page: 'log',
    label: 'Log',
    needs: 'audit.read',
    Sentence: () => 'Who did what here.',
    otherwise: 'Its maintainers and the site’s admins read it.',
    render: (library) => <AuditLog library={library.slug} />,
  },
];

function Sections({ library, section }: { library: LibraryView; section: Section }) {
  const may = useMay();
  const canSee = may(section.needs, library);
  const role = roleIn(usePerson(), library.slug);
  return (
    <>
      <VerdictBlock
        sign={library.name}
        colour="text-ink"
        note={<p>{role === null ? 'You are no member of it.' : `You are ${role} here.`}</p>}
        sentence={canSee ? <section.Sentence library={library} /> : section.label}
      >
        <SubNav
          label="Settings"
          words={sections
            .filter(({ needs }) => may(needs, library))
            .map(({ page, label }) => ({
              to: paths.librarySettings(library.slug, page),
              label,
              isHere: page === section.page,
            }))}
        />
      </VerdictBlock>
      {canSee ? (
        section.render(library)
      ) : (
        <Entry title={section.label}>
          <StateNote title="This is not yours to see">{section.otherwise}</StateNote>
        </Entry>
      )}
    </>
  );
}

/** The settings of a library, one page for each kind. */
export function SettingsPage() {
  const { library: slug = '', page } = useParams();
  const query = useQuery(libraryQuery(slug));
  const section = sections.find((one) => one.page === page);
  if (section === undefined) return <Navigate to={paths.librarySettings(slug)} replace />;
  return (
    <Page
      title={`${query.data?.name ?? slug}, ${section.label.toLowerCase()}`}
      trail={[
        { label: 'Libraries', to: paths.libraries() },
        { label: query.data?.name ?? slug, to: paths.library(slug) },
        { label: section.page === undefined ? 'Settings' : `Settings, ${section.label.toLowerCase()}` },
      ]}
    >
      {query.data === undefined ? (
        <Entry title="Settings">
          <QueryState<unknown> query={query} what="the library">
            {() => null}
          </QueryState>
        </Entry>
      ) : (
        <Sections library={query.data} section={section} />
      )}
    </Page>
  );
}
