import type { ReactNode } from 'react';

export interface SvgMarkProps {
  /** Side of the drawing's own square: 16 for marks. */
  box: number;
  size: number;
  className?: string;
  /** Said and shown on hover. Without it the mark is decoration beside its word. */
  title?: string | undefined;
  children: ReactNode;
}

/** A small square drawing in the colour of its text, named or silent. */
export function SvgMark({ box, size, className = '', title, children }: SvgMarkProps) {
  const shared = {
    className: `inline-block flex-none align-[-2px] ${className}`,
    width: size,
    height: size,
    viewBox: `0 0 ${box} ${box}`,
  };
  if (title === undefined) {
    return (
      <svg {...shared} aria-hidden="true">
        {children}
      </svg>
    );
  }
  return (
    <svg {...shared} role="img" aria-label={title}>
      <title>{title}</title>
      {children}
    </svg>
  );
}
