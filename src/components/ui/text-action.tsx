import type { ButtonHTMLAttributes } from 'react';
import { classNames } from '../../lib/class-names.ts';
import { Kbd } from './kbd.tsx';

export interface TextActionProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  hotkey?: string;
}

/** An action that looks like text: underlined, no border. */
export function TextAction({ hotkey, children, className, type = 'button', ...rest }: TextActionProps) {
  return (
    <button
      type={type}
      aria-keyshortcuts={hotkey}
      className={classNames(
        'inline-flex min-h-6 items-center gap-2 text-left underline decoration-rule-strong decoration-1 underline-offset-3 hover:decoration-current hover:decoration-2 disabled:cursor-not-allowed disabled:text-ink-3 disabled:no-underline',
        className,
      )}
      {...rest}
    >
      {children}
      {hotkey !== undefined && <Kbd>{hotkey}</Kbd>}
    </button>
  );
}
