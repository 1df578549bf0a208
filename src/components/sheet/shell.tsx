import { Link, NavLink, Outlet, ScrollRestoration } from 'react-router';
import { paths } from '../../paths.ts';
import { BrandMark } from './brand-mark.tsx';
import { SchemeSwitch } from './scheme-switch.tsx';
import { SearchField } from './search-field.tsx';

export interface NavWord {
  to: string;
  label: string;
}

/** Only what is there: a page that does not exist is not linked. */
export const navWords: readonly NavWord[] = [
  { to: paths.libraries(), label: 'Libraries' },
  { to: paths.suites(), label: 'Suites' },
  { to: paths.guide(), label: 'Guide' },
];

/** Head of every sheet: sign, words, search, colours. */
export function Shell() {
  return (
    <div className="sheet">
      <a href="#sheet" className="skip">
        To the sheet
      </a>
      <header className="head ledger ledger-end items-end max-wide:grid-cols-[minmax(0,1fr)_auto]! border-b-2 border-ink pb-2.5 pt-3.5 max-wide:pb-0">
        <Link
          to={paths.libraries()}
          className="flex items-center gap-[9px] text-[17px] font-medium tracking-[-0.005em] no-underline"
        >
          <BrandMark />
          <span>Tallyroot</span>
        </Link>
        <nav aria-label="Main" className="max-wide:col-span-2 max-wide:row-start-2 max-wide:overflow-x-auto">
          <ul className="flex gap-5.5 max-wide:gap-4">
            {navWords.map((word) => (
              <li key={word.to}>
                <NavLink
                  to={word.to}
                  className="nav-word relative inline-block whitespace-nowrap py-[3px] text-ink-2 no-underline hover:text-ink hover:no-underline max-wide:pb-2.5 max-wide:pt-2"
                >
                  {word.label}
                </NavLink>
              </li>
            ))}
          </ul>
        </nav>
        <div className="head-tools flex items-center gap-4.5 text-ink-2 max-wide:gap-3">
          <SearchField />
          <SchemeSwitch />
        </div>
      </header>
      <Outlet />
      <ScrollRestoration />
    </div>
  );
}
