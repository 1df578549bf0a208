/** The sign: a five-bar tally whose crossing stroke is a secant, meeting the tops of the outer bars' curve. */
export function BrandMark({ size = 26 }: { size?: number }) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 32 32"
      fill="none"
      stroke="currentColor"
      strokeWidth={2.75}
      aria-hidden="true"
      className="flex-none"
    >
      <path d="M6.8 29V20.2M12.9 29V7.2M19 29V3.2M25.1 29V9.9" />
      <path d="M1.4 23.3 30.6 6.7" />
    </svg>
  );
}
