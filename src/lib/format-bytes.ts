const narrowSpace = '\u202f';

/** 840 B, 4.2 kB, 12 MB: powers of ten, two figures from 1 kB to 9.9 kB and so on. */
export function formatBytes(bytes: number): string {
  if (bytes < 1000) return `${bytes}${narrowSpace}B`;
  const units = ['kB', 'MB', 'GB'];
  let value = bytes / 1000;
  let unit = 0;
  while (Math.round(value) >= 1000 && unit < units.length - 1) {
    value /= 1000;
    unit += 1;
  }
  return `${value < 9.95 ? value.toFixed(1) : Math.round(value)}${narrowSpace}${units[unit]}`;
}
