import { Fragment, type ReactNode, useEffect, useState } from 'react';
import { Link } from 'react-router';
import { useKeys } from '../../lib/use-keys.ts';
import { Kbd } from '../ui/kbd.tsx';

export interface TrailStep {
  label: string;
  to?: string;
}

export interface PageKey {
  keys: readonly string[];
  does: string;
}

export interface PageProps {
  title: string;
  trail: readonly TrailStep[];
  keys?: readonly PageKey[];
  children: ReactNode;
}

export const careSentence =
  'Results say how a build behaved on the listed equations on one machine. They are no proof of correctness and no licence to use a solver where people can be hurt; there, the codes and the licensed practice of the place decide.';

const everywhere: readonly PageKey[] = [
  { keys: ['/'], does: 'search' },
  { keys: ['?'], does: 'all keys' },
];

function KeyList({ keys }: { keys: readonly PageKey[] }) {
  return (
    <ul className="no-print flex flex-wrap gap-x-5 gap-y-1" aria-label="Keys">
      {keys.map((entry) => (
        <li key={entry.does}>
          {entry.keys.map((key) => (
            <Fragment key={key}>
              <span className="sr-only">{key} </span>
              <Kbd>{key}</Kbd>{' '}
            </Fragment>
          ))}
          {entry.does}
        </li>
      ))}
    </ul>
  );
}

/** Trail, entries, and at the foot the keys of this page and the sentence of care. */
export function Page({ title, trail, keys = [], children }: PageProps) {
  const [isShowingAll, setIsShowingAll] = useState(false);
  useEffect(() => {
    document.title = `${title} · Tallyroot`;
  }, [title]);
  useKeys({ '?': () => setIsShowingAll((isShowing) => !isShowing) });
  const shown = isShowingAll ? [...keys, ...everywhere] : [...keys, { keys: ['?'], does: 'all keys' }];
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
          <KeyList keys={shown} />
          <p className="mt-2 max-w-[78em]">{careSentence}</p>
        </div>
      </footer>
    </>
  );
}
