import { type ReactNode, useEffect, useState } from 'react';
import { Link } from 'react-router';
import { careSentence } from '../../../shared/guide/care.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { KeyList, type PageKey } from './key-list.tsx';
import { KeysDialog } from './keys-dialog.tsx';

export interface TrailStep {
  label: string;
  to?: string;
}

export interface PageProps {
  title: string;
  trail: readonly TrailStep[];
  keys?: readonly PageKey[];
  children: ReactNode;
}

/** Trail, entries, and at the foot the keys of this page and the sentence of care. */
export function Page({ title, trail, keys = [], children }: PageProps) {
  const [isShowingAll, setIsShowingAll] = useState(false);
  useEffect(() => {
    document.title = `${title} · Tallyroot`;
  }, [title]);
  useKeys({ '?': () => setIsShowingAll(true) });
  return (
    <>
      <div className="ledger ledger-end border-b border-rule py-[7px] text-[12.5px] leading-[18px] text-ink-3">
        <span className="max-wide:hidden" />
        <nav aria-label="Trail" className="trail">
          <ol className="flex flex-wrap gap-x-2">
            {trail.map((step) => (
              <li key={step.label}>
                {step.to === undefined ? (
                  <span aria-current="page" className="text-ink">
                    {step.label}
                  </span>
                ) : (
                  <Link to={step.to}>{step.label}</Link>
                )}
              </li>
            ))}
          </ol>
        </nav>
        <span className="max-wide:hidden">all times UTC</span>
      </div>
      <main id="sheet" tabIndex={-1} className="flex-[1_0_auto]">
        {children}
      </main>
      <footer className="ledger mt-8.5 border-t border-rule pt-2.5 text-[12.5px] leading-[18px] text-ink-3">
        <span className="max-wide:hidden" />
        <div>
          <KeyList keys={[...keys, { keys: ['?'], does: 'all keys' }]} />
          {isShowingAll && <KeysDialog keys={keys} onClose={() => setIsShowingAll(false)} />}
          <p className="mt-2 max-w-[78em]">{careSentence}</p>
        </div>
      </footer>
    </>
  );
}
