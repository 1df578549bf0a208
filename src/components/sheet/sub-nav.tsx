import { Link } from 'react-router';

export interface SubNavProps {
  label: string;
  words: readonly { to: string; label: string; isHere: boolean }[];
}

/** The pages of one thing, as words under its sentence. */
export function SubNav({ label, words }: SubNavProps) {
  return (
    <nav aria-label={label} className="no-print mt-4 border-b border-rule">
      <ul className="flex flex-wrap gap-x-5.5 gap-y-1">
        {words.map((word) => (
          <li key={word.to}>
            <Link
              to={word.to}
              aria-current={word.isHere ? 'page' : undefined}
              className={`inline-block border-b-2 pb-1 pt-1 no-underline hover:text-ink ${word.isHere ? 'border-ink font-medium text-ink' : 'border-transparent text-ink-2'}`}
            >
              {word.label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
