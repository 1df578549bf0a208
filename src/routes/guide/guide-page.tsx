import { Link } from 'react-router';
import { chapters } from '../../../shared/guide/chapters.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { KitList } from '../../features/guide/kit-list.tsx';
import { moveRowFocus } from '../../lib/row-focus.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';

/** The chapters of the guide, in the order in which a newcomer reads them. */
export function GuidePage() {
  useKeys({ j: () => moveRowFocus(1), k: () => moveRowFocus(-1) });
  return (
    <Page
      title="Guide"
      trail={[{ label: 'Guide' }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous chapter' },
        { keys: ['enter'], does: 'open the chapter' },
      ]}
    >
      <VerdictBlock
        sign="guide"
        sentence={
          <>
            Connect a library with <b>one small adapter</b>; everything after that is counted here.
          </>
        }
        lead="How to write an adapter and a manifest, what a suite holds, and what each word, mark and figure means."
      />
      <Entry title="Chapters" note="From the first adapter to the fine print.">
        <ol className="finds">
          {chapters.map((chapter, index) => (
            <li key={chapter.id}>
              <span className="num text-ink-3 max-wide:hidden">{index + 1}</span>
              <span>
                <Link to={paths.guideChapter(chapter.id)} data-row-link className="font-medium">
                  {chapter.title}
                </Link>
                <span className="block text-ink-2">{chapter.summary}</span>
              </span>
            </li>
          ))}
        </ol>
      </Entry>
      <Entry title="Kits" note="An adapter to copy, with an example that runs.">
        <KitList />
      </Entry>
    </Page>
  );
}
