import { Fragment } from 'react';
import { Kbd } from '../ui/kbd.tsx';

export interface PageKey {
  keys: readonly string[];
  does: string;
}

export interface KeyListProps {
  keys: readonly PageKey[];
  /** One below the other; else in one line that wraps. */
  isLong?: boolean;
}

/** Keys, each with what it does. */
export function KeyList({ keys, isLong = false }: KeyListProps) {
  return (
    <ul
      className={isLong ? 'grid gap-y-1.5' : 'no-print flex flex-wrap gap-x-5 gap-y-1'}
      aria-label={isLong ? undefined : 'Keys'}
    >
      {keys.map((entry) => (
        <li key={entry.does} className={isLong ? 'grid grid-cols-[128px_minmax(0,1fr)] gap-3' : undefined}>
          <span>
            {entry.keys.map((key) => (
              <Fragment key={key}>
                <span className="sr-only">{key} </span>
                <Kbd>{key}</Kbd>{' '}
              </Fragment>
            ))}
          </span>
          {isLong ? <span>{entry.does}</span> : entry.does}
        </li>
      ))}
    </ul>
  );
}
