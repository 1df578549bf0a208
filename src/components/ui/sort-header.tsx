export interface SortHeaderProps {
  label: string;
  direction: 'up' | 'down' | null;
  onSort: () => void;
}

/** The head of a column that can be sorted: a word that is a button, an arrow once it is in use. */
export function SortHeader({ label, direction, onSort }: SortHeaderProps) {
  return (
    <button
      type="button"
      onClick={onSort}
      title={`Sort by ${label}`}
      className="min-h-6 text-left underline decoration-transparent underline-offset-3 hover:decoration-current"
    >
      {label}
      {direction !== null && <span aria-hidden="true"> {direction === 'up' ? '↑' : '↓'}</span>}
    </button>
  );
}
