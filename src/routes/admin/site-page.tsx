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
import { LanesSentence, MailSentence, PeopleSentence } from './site-sentences.tsx';

interface Section {
  page: PageName | undefined;
  label: string;
  Sentence: () => ReactNode;
  render: () => ReactNode;
}

const sections: readonly Section[] = [
  { page: undefined, label: 'People', Sentence: PeopleSentence, render: () => <PeopleSection /> },
  {
    page: 'lanes',
    label: 'Lanes',
    Sentence: LanesSentence,
    render: () => <LanesSection />,
  },
  { page: 'mail', label: 'Mail', Sentence: MailSentence, render: () => <MailSection /> },
  { page: 'log', label: 'Audit log', Sentence: () => 'Who did what.', render: () => <AuditLog /> },
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
          <VerdictBlock sign="Site" colour="text-ink" sentence={<section.Sentence />}>
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
