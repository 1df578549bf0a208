import { type ReactNode, useEffect, useId } from 'react';
import { Link } from 'react-router';
import { careSentence } from '../../../shared/guide/care.ts';
import { BrandMark } from '../../components/sheet/brand-mark.tsx';
import { SchemeSwitch } from '../../components/sheet/scheme-switch.tsx';
import { paths } from '../../paths.ts';

export interface DoorProps {
  /** In the margin, and of the window. */
  title: string;
  notes?: readonly ReactNode[];
  /** The one sentence at the top. */
  heading: ReactNode;
  children: ReactNode;
  /** Beside the form. */
  beside?: ReactNode;
}

/** A sheet outside: for those who are not signed in. */
export function Door({ title, notes = [], heading, children, beside }: DoorProps) {
  const id = useId();
  useEffect(() => {
    document.title = `${title} · Tallyroot`;
  }, [title]);
  return (
    <div className="sheet">
      <a href="#sheet" className="skip">
        To the sheet
      </a>
      <header className="ledger ledger-end items-end border-b-2 border-ink pb-2.5 pt-3.5 max-wide:grid-cols-[minmax(0,1fr)_auto]!">
        <Link
          to={paths.home()}
          className="flex items-center gap-[9px] text-[17px] font-medium tracking-[-0.005em] no-underline"
        >
          <BrandMark />
          <span>Tallyroot</span>
        </Link>
        <span className="max-wide:hidden" />
        <div className="flex items-center gap-4.5">
          <Link to={paths.guide()} className="text-ink-2">
            Guide
          </Link>
          <SchemeSwitch />
        </div>
      </header>
      <main id="sheet" tabIndex={-1} className="flex-[1_0_auto]">
        <section className="ledger" aria-labelledby={id}>
          <div className="entry-side pt-[calc(8vh+8px)] max-wide:pt-5!">
            <h2 id={id}>{title}</h2>
            {notes.map((note, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: notes keep their places
              <p key={index}>{note}</p>
            ))}
          </div>
          <div className="grid grid-cols-[minmax(0,340px)_minmax(0,1fr)] gap-x-18 gap-y-10 pt-[8vh] max-wide:grid-cols-[minmax(0,1fr)] max-wide:pt-7">
            <div>
              <h1 className="mb-5.5 text-verdict">{heading}</h1>
              {children}
            </div>
            {beside}
          </div>
        </section>
      </main>
      <footer className="ledger mt-8.5 border-t border-rule pt-2.5 text-[12.5px] leading-[18px] text-ink-3">
        <span className="max-wide:hidden" />
        <p className="max-w-[78em]">{careSentence}</p>
      </footer>
    </div>
  );
}
