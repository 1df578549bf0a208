import type { ReactNode } from 'react';
import { Link, NavLink, Outlet, ScrollRestoration } from 'react-router';
import { paths } from '../../paths.ts';
import { BrandMark } from './brand-mark.tsx';
import { SearchField } from './search-field.tsx';

export interface NavWord {
  to: string;
  label: string;
}

export interface ShellProps {
  /** Only what is there for the one who looks: a page that does not exist is not linked. */
  nav: readonly NavWord[];
  /** Whether there is anything to look through. */
  canSearch: boolean;
  /** At the right end: who is signed in. */
  children: ReactNode;
}

/** Head of every sheet: sign, words, search, person. */
export function Shell({ nav, canSearch, children }: ShellProps) {
  return (
    <div className="sheet">
      <a href="#sheet" className="skip">
        To the sheet
      </a>
      <header className="head ledger ledger-end items-end max-wide:grid-cols-[minmax(0,1fr)_auto]! border-b-2 border-ink pb-2.5 pt-3.5 max-wide:pb-0">
        <Link
          to={paths.home()}
          className="flex items-center gap-[9px] text-[17px] font-medium tracking-[-0.005em] no-underline"
        >
          <BrandMark />
          <span>Tallyroot</span>
        </Link>
        <nav aria-label="Main" className="max-wide:col-span-2 max-wide:row-start-2 max-wide:overflow-x-auto">
          <ul className="flex gap-5.5 max-wide:gap-4">
            {nav.map((word) => (
              <li key={word.to}>
                <NavLink
                  to={word.to}
                  end={word.to === paths.home()}
                  className="nav-word relative inline-block whitespace-nowrap py-[3px] text-ink-2 no-underline hover:text-ink hover:no-underline max-wide:pb-2.5 max-wide:pt-2"
                >
                  {word.label}
                </NavLink>
              </li>
            ))}
          </ul>
        </nav>
        <div className="head-tools flex items-center gap-4.5 text-ink-2 max-wide:gap-3">
          {canSearch && (
            <div className="max-wide:hidden">
              <SearchField />
            </div>
          )}
          {children}
        </div>
      </header>
      <Outlet />
      <ScrollRestoration />
    </div>
  );
}
