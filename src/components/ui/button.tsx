import type { ButtonHTMLAttributes } from 'react';
import { Link } from 'react-router';
import { classNames } from '../../lib/class-names.ts';
import { Kbd } from './kbd.tsx';

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  /** The one thing to do next of its section: ink ground. */
  isMain?: boolean;
  hotkey?: string;
}

const shape =
  'inline-flex items-center gap-2 rounded-control border px-3 py-[5px] max-wide:py-[7px] text-body font-medium';
const plain =
  'border-rule-strong hover:border-ink hover:bg-sunk disabled:cursor-not-allowed disabled:border-dashed disabled:border-rule-strong disabled:bg-transparent disabled:text-ink-3';
const main = 'is-ink border-ink bg-ink text-paper no-underline';

export function Button({
  isMain = false,
  hotkey,
  children,
  className,
  type = 'button',
  ...rest
}: ButtonProps) {
  return (
    <button
      type={type}
      aria-keyshortcuts={hotkey}
      className={classNames(shape, isMain && rest.disabled !== true ? main : plain, className)}
      {...rest}
    >
      {children}
      {hotkey !== undefined && <Kbd>{hotkey}</Kbd>}
    </button>
  );
}

export interface ButtonLinkProps {
  to: string;
  isMain?: boolean;
  hotkey?: string;
  children: string;
}

/** A link that looks like a button: it leads somewhere, so it is a link. */
export function ButtonLink({ to, isMain = false, hotkey, children }: ButtonLinkProps) {
  return (
    <Link
      to={to}
      aria-keyshortcuts={hotkey}
      className={classNames(shape, 'no-underline', isMain ? main : plain)}
    >
      {children}
      {hotkey !== undefined && <Kbd>{hotkey}</Kbd>}
    </Link>
  );
}
