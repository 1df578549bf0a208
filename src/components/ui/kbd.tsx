export interface KbdProps {
  children: string;
}

/** The name of a key, inside the control that it triggers or in the line of keys at the foot. */
export function Kbd({ children }: KbdProps) {
  return (
    <span
      aria-hidden="true"
      className="inline-block min-w-[17px] rounded-control border border-current/55 px-1 text-center font-mono text-key font-normal text-ink-2 in-[.is-ink]:text-paper"
    >
      {children}
    </span>
  );
}
