import type { ReactNode } from 'react';
import { Navigate, useParams } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { SubNav } from '../../components/sheet/sub-nav.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { AuditLog } from '../../features/audit/audit-log.tsx';
import { useMay } from '../../features/session/use-may.ts';
import { type SitePage as PageName, paths } from '../../paths.ts';
import { LanesSection } from './lanes-section.tsx';
import { MailSection } from './mail-section.tsx';
import { PeopleSection } from './people-section.tsx';

interface Section {
  page: PageName | undefined;
  label: string;
  sentence: string;
  render: () => ReactNode;
}

const sections: readonly Section[] = [
  { page: undefined, label: 'People', sentence: 'Who has an account.', render: () => <PeopleSection /> },
  {
    page: 'lanes',
    label: 'Lanes',
    sentence: 'What is being measured, and with what.',
    render: () => <LanesSection />,
  },
  { page: 'mail', label: 'Mail', sentence: 'What was sent, and what waits.', render: () => <MailSection /> },
  { page: 'log', label: 'Audit log', sentence: 'Who did what.', render: () => <AuditLog /> },
];

/** For those who look after the site. */
export function SitePage() {
  const { page } = useParams();
  const may = useMay();
  const section = sections.find((one) => one.page === page);
  if (section === undefined) return <Navigate to={paths.site()} replace />;
  return (
    <Page
      title={`Site, ${section.label.toLowerCase()}`}
      trail={[
        { label: 'Site', ...(section.page === undefined ? {} : { to: paths.site() }) },
        ...(section.page === undefined ? [] : [{ label: section.label }]),
      ]}
    >
      {may('site.people') ? (
        <>
          <VerdictBlock sign="Site" colour="text-ink" sentence={section.sentence}>
            <SubNav
              label="Site"
              words={sections.map((one) => ({
                to: one.page === undefined ? paths.site() : paths.sitePage(one.page),
                label: one.label,
                isHere: one.page === section.page,
              }))}
            />
          </VerdictBlock>
          {section.render()}
        </>
      ) : (
        <Entry title="Site">
          <StateNote title="This is for the admins of the site">
            They look after people, mail and lanes. Ask one of them.
          </StateNote>
        </Entry>
      )}
    </Page>
  );
}
