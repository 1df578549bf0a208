import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { Section } from '../../../shared/guide/section.ts';
import { BlockView } from './block-view.tsx';

export interface GuideSectionProps {
  section: Section;
  children?: ReactNode;
}

/** A section: its head stands in the margin and is a link to itself, its blocks in the body. */
export function GuideSection({ section, children }: GuideSectionProps) {
  return (
    <section className="ledger entry scroll-mt-4" aria-labelledby={section.id}>
      <div className="entry-side">
        <h2 id={section.id} className="scroll-mt-6">
          <Link to={`#${section.id}`} className="no-underline hover:underline">
            {section.title}
          </Link>
        </h2>
      </div>
      <div className="min-w-0">
        {section.blocks.map((block, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: the blocks of a section keep their places
          <BlockView key={index} block={block} />
        ))}
        {children}
      </div>
    </section>
  );
}
