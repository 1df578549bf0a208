const browsers: readonly [RegExp, string][] = [
  [/\bEdg(e|A|iOS)?\//, 'Edge'],
  [/\b(OPR|Opera)\//, 'Opera'],
  [/\b(Firefox|FxiOS)\//, 'Firefox'],
  [/\b(Chrome|Chromium|HeadlessChrome|CriOS)\//, 'Chrome'],
  [/\bSafari\//, 'Safari'],
];
const systems: readonly [RegExp, string][] = [
  [/\b(iPhone|iPad)\b/, 'iOS'],
  [/\bAndroid\b/, 'Android'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b/, 'macOS'],
  [/\bLinux\b/, 'Linux'],
];

const first = (list: typeof browsers, text: string): string | undefined =>
  list.find(([pattern]) => pattern.test(text))?.[1];

/** A browser and its system in words, as far as its own text tells; otherwise that text, cut. */
export function browserWords(userAgent: string | null): string {
  if (userAgent === null) return 'unknown browser';
  const [browser, system] = [first(browsers, userAgent), first(systems, userAgent)];
  if (browser === undefined) return userAgent.slice(0, 40);
  return system === undefined ? browser : `${browser} on ${system}`;
}
