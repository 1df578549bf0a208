import { useEffect, useId, useRef, useState } from 'react';
import { Link, useLocation } from 'react-router';
import { SchemeSwitch } from '../../components/sheet/scheme-switch.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { paths } from '../../paths.ts';
import type { Person } from './asker.ts';
import { leaveByTheDoor, useSignOut } from './session.queries.ts';

export interface PersonMenuProps {
  person: Person;
}

/** The name at the right of the head; under it the account, the colours of the sheet, and the way out. */
export function PersonMenu({ person }: PersonMenuProps) {
  const [openAt, setOpenAt] = useState<string | null>(null);
  const place = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const id = useId();
  const signOut = useSignOut(leaveByTheDoor);
  // Open on the page that it was opened on: going to another one closes it.
  const { key } = useLocation();
  const isOpen = openAt === key;
  useEffect(() => {
    if (!isOpen) return;
    function leave(event: Event): void {
      if (event.target instanceof Node && place.current?.contains(event.target) === false) setOpenAt(null);
    }
    document.addEventListener('pointerdown', leave);
    document.addEventListener('focusin', leave);
    return () => {
      document.removeEventListener('pointerdown', leave);
      document.removeEventListener('focusin', leave);
    };
  }, [isOpen]);
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: Escape closes from anywhere within; every control in it is one by itself
    <div
      ref={place}
      className="relative"
      onKeyDown={(event) => {
        if (event.key !== 'Escape' || !isOpen) return;
        event.preventDefault();
        setOpenAt(null);
        button.current?.focus();
      }}
    >
      <button
        ref={button}
        type="button"
        aria-expanded={isOpen}
        aria-controls={isOpen ? id : undefined}
        onClick={() => setOpenAt(isOpen ? null : key)}
        className="block max-w-[16em] truncate py-[3px] text-ink-2 underline decoration-rule-strong decoration-1 underline-offset-3 hover:text-ink hover:decoration-current max-wide:max-w-[38vw]"
      >
        {person.name}
      </button>
      {isOpen && (
        <div
          id={id}
          className="absolute right-0 top-[calc(100%+11px)] z-20 w-[17em] border border-ink bg-paper px-3.5 py-2.5 text-ink"
        >
          <p className="wrap-anywhere text-note text-ink-3">
            {person.email}
            {person.isAdmin && ', admin of this site'}
            {person.isDemo && ', invented for the demo'}
          </p>
          <ul className="mt-2 border-t border-rule pt-1.5">
            <li className="py-1">
              <Link to={paths.account()}>Account</Link>
            </li>
            <li className="flex items-center justify-between py-1">
              <span>Colours</span>
              <SchemeSwitch />
            </li>
            <li className="mt-1 border-t border-rule pt-1.5">
              <TextAction disabled={signOut.isPending} onClick={() => signOut.mutate()}>
                Sign out
              </TextAction>
            </li>
          </ul>
          {signOut.error !== null && (
            <p role="alert" className="text-note text-worse">
              {signOut.error.message}
            </p>
          )}
        </div>
      )}
    </div>
  );
}
