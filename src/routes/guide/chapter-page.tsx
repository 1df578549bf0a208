import { Fragment, useEffect } from 'react';
import { Link, useLocation, useNavigate, useParams } from 'react-router';
import { chapterOf, chapters } from '../../../shared/guide/chapters.ts';
import type { Chapter } from '../../../shared/guide/section.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { ButtonLink } from '../../components/ui/button.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { GuideSection } from '../../features/guide/guide-section.tsx';
import { KitList } from '../../features/guide/kit-list.tsx';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';

function Neighbour({
  chapter,
  word,
  hotkey,
}: {
  chapter: Chapter | undefined;
  word: string;
  hotkey: string;
}) {
  if (chapter === undefined) return null;
  return (
    <ButtonLink to={paths.guideChapter(chapter.id)} hotkey={hotkey}>{`${word}: ${chapter.title}`}</ButtonLink>
  );
}

function ChapterSheet({ chapter }: { chapter: Chapter }) {
  const navigate = useNavigate();
  const { hash } = useLocation();
  // The section that an address names is not there yet when the browser looks for it.
  useEffect(() => {
    if (hash === '') return;
    const frame = requestAnimationFrame(() => {
      document.getElementById(decodeURIComponent(hash.slice(1)))?.scrollIntoView();
    });
    return () => cancelAnimationFrame(frame);
  }, [hash]);
  const index = chapters.indexOf(chapter);
  const [before, after] = [chapters[index - 1], chapters[index + 1]];
  const go = (to: Chapter | undefined): void => {
    if (to !== undefined) void navigate(paths.guideChapter(to.id));
  };
  useKeys({ p: () => go(before), n: () => go(after), escape: () => void navigate(paths.guide()) });
  return (
    <Page
      title={chapter.title}
      trail={[{ label: 'Guide', to: paths.guide() }, { label: chapter.title }]}
      keys={[
        { keys: ['n'], does: 'next chapter' },
        { keys: ['p'], does: 'previous chapter' },
        { keys: ['esc'], does: 'all chapters' },
      ]}
    >
      <VerdictBlock
        sign={`chapter ${index + 1} of ${chapters.length}`}
        sentence={chapter.title}
        lead={chapter.summary}
      >
        <nav aria-label="Sections" className="no-print mt-3 flex flex-wrap gap-x-4.5 gap-y-1 text-table">
          {chapter.sections.map((section) => (
            <Link key={section.id} to={`#${section.id}`} className="inline-flex min-h-6 items-center">
              {section.title}
            </Link>
          ))}
        </nav>
      </VerdictBlock>
      {chapter.sections.map((section) => (
        <GuideSection key={section.id} section={section}>
          {chapter.id === 'adapter' && section.id === 'kit' && (
            <>
              <h3 className="pt-3 text-body font-medium">The kits to download</h3>
              <KitList />
            </>
          )}
        </GuideSection>
      ))}
      <Entry title="Read on">
        <p className="text-lead">
          {chapter.see.map((id, place) => (
            <Fragment key={id}>
              {place === 0 ? 'See also ' : place === chapter.see.length - 1 ? ' and ' : ', '}
              <Link to={paths.guideChapter(id)}>{chapterOf(id).title}</Link>
            </Fragment>
          ))}
          .
        </p>
        <div className="no-print mt-3 flex flex-wrap gap-x-5.5 gap-y-2">
          <Neighbour chapter={before} word="Before" hotkey="p" />
          <Neighbour chapter={after} word="Next" hotkey="n" />
        </div>
      </Entry>
    </Page>
  );
}

/** One chapter of the guide. */
export function ChapterPage() {
  const { chapter: id = '' } = useParams();
  const chapter = chapters.find((one) => one.id === id);
  if (chapter !== undefined) return <ChapterSheet key={chapter.id} chapter={chapter} />;
  return (
    <Page title="Guide" trail={[{ label: 'Guide', to: paths.guide() }, { label: id }]}>
      <Entry title="Guide">
        <StateNote
          isProblem
          title="There is no such chapter"
          actions={<ButtonLink to={paths.guide()}>All chapters</ButtonLink>}
        >
          The guide has no chapter “{id}”.
        </StateNote>
      </Entry>
    </Page>
  );
}
