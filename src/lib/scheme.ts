/** Which colours the sheet takes. Kept per browser; `system` follows the machine's own setting. */
export const schemes = ['light', 'dark', 'system'] as const;
export type Scheme = (typeof schemes)[number];

const storageKey = 'tallyroot.scheme';

export function isScheme(value: unknown): value is Scheme {
  return schemes.some((scheme) => scheme === value);
}

/** Storage may be switched off by the browser: then the system decides, each time. */
export function readScheme(): Scheme {
  try {
    const kept = window.localStorage.getItem(storageKey);
    return isScheme(kept) ? kept : 'system';
  } catch {
    return 'system';
  }
}

export function applyScheme(scheme: Scheme): void {
  document.documentElement.dataset.scheme = scheme;
}

export function keepScheme(scheme: Scheme): void {
  applyScheme(scheme);
  try {
    window.localStorage.setItem(storageKey, scheme);
  } catch {
    // Without storage the choice holds until the page is closed.
  }
}
