/** The only place where a figure is rounded for the screen. Absent figures are an en dash, never 0. */

const minus = '\u2212';
const narrowSpace = '\u202f';
const absent = '\u2013';

const withTrueMinus = (text: string): string => text.replaceAll('-', minus);

/** A count or other figure as it is; from five digits on, groups of three. */
export function formatFigure(value: number | null | undefined): string {
  if (value === null || value === undefined) return absent;
  const text = String(value);
  const grouped = /^-?\d{5,}$/.test(text) ? text.replace(/\B(?=(\d{3})+$)/g, narrowSpace) : text;
  return withTrueMinus(grouped);
}

/** With its sign: +39, −14, and a bare 0. */
export function formatDifference(value: number | null | undefined): string {
  if (value === null || value === undefined) return absent;
  return value > 0 ? `+${formatFigure(value)}` : formatFigure(value);
}

/** Percent more or less, to one place: +68.8 %, −7.3 %, 0 %. What rounds to nothing but is not says so. */
export function formatPercent(value: number | null | undefined): string {
  if (value === null || value === undefined) return absent;
  if (value === 0) return `0${narrowSpace}%`;
  const size = Math.abs(value);
  const sign = value > 0 ? '+' : minus;
  const figure = size < 0.05 ? '<0.1' : size.toFixed(1).replace(/\.0$/, '');
  return `${sign}${figure}${narrowSpace}%`;
}

/** Correct digits, one place. */
export function formatDigits(value: number | null | undefined): string {
  return value === null || value === undefined ? absent : value.toFixed(1);
}

/** Correct digits in a path, two places; the right end is written 16. */
export function formatPathDigits(value: number | null | undefined): string {
  if (value === null || value === undefined) return absent;
  return value >= 16 ? '16' : value.toFixed(2);
}

/** Order of convergence, two places. */
export function formatOrder(value: number | null | undefined): string {
  return value === null || value === undefined ? absent : value.toFixed(2);
}

/** A claimed order as it was declared: 2, 1.618. */
export function formatClaim(value: number | null | undefined): string {
  return value === null || value === undefined ? 'none' : withTrueMinus(String(Number(value.toFixed(4))));
}

/** Reference, arrow, candidate, with thin spaces that do not break. */
export function formatArrow(reference: string, candidate: string): string {
  return `${reference}${narrowSpace}→${narrowSpace}${candidate}`;
}

/** A function value: 5 significant places and an exponent; says what is not a number. */
export function formatValue(value: number): string {
  if (Number.isNaN(value)) return 'not a number';
  if (!Number.isFinite(value)) return value > 0 ? '∞' : `${minus}∞`;
  if (value === 0) return '0';
  return withTrueMinus(value.toExponential(4).replace('e+', 'e'));
}

/** The shortest decimal that reads back to the same bits, with a true minus. */
export function formatExact(value: number): string {
  if (Number.isNaN(value)) return 'not a number';
  if (!Number.isFinite(value)) return value > 0 ? '∞' : `${minus}∞`;
  return withTrueMinus(Object.is(value, -0) ? '-0' : String(value));
}

/** A decimal text (an input, a certified root) with a true minus, cut to `places` characters with an ellipsis. */
export function formatDecimalText(text: string, places = Number.POSITIVE_INFINITY): string {
  return withTrueMinus(text.length > places ? `${text.slice(0, places)}…` : text);
}

const months = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

const two = (value: number): string => String(value).padStart(2, '0');

/** 14 March 2026, in UTC. */
export function formatDate(iso: string): string {
  const date = new Date(iso);
  if (Number.isNaN(date.getTime())) return absent;
  return `${date.getUTCDate()} ${months[date.getUTCMonth()]} ${date.getUTCFullYear()}`;
}

/** 14 Mar 2026, in UTC: for columns. */
export function formatShortDate(iso: string): string {
  const date = new Date(iso);
  if (Number.isNaN(date.getTime())) return absent;
  return `${date.getUTCDate()} ${months[date.getUTCMonth()]?.slice(0, 3)} ${date.getUTCFullYear()}`;
}

/** 14 March 2026 09:12, in UTC. */
export function formatDateTime(iso: string): string {
  const date = new Date(iso);
  if (Number.isNaN(date.getTime())) return absent;
  return `${formatDate(iso)} ${two(date.getUTCHours())}:${two(date.getUTCMinutes())}`;
}

/** 840 ms, 3.2 s, 2 min 5 s. */
export function formatElapsed(elapsedMs: number | null | undefined): string {
  if (elapsedMs === null || elapsedMs === undefined) return absent;
  if (elapsedMs < 1000) return `${Math.round(elapsedMs)} ms`;
  if (elapsedMs < 60_000) return `${(elapsedMs / 1000).toFixed(1)} s`;
  const seconds = Math.round(elapsedMs / 1000);
  return `${Math.floor(seconds / 60)} min ${seconds % 60} s`;
}

/** The first seven of a commit hash; other labels stay whole. */
export function formatCommit(label: string): string {
  return /^[0-9a-f]{12,}$/i.test(label) ? label.slice(0, 7) : label;
}

/** `1 case`, `2 cases`. */
export function formatCount(count: number, singular: string, plural = `${singular}s`): string {
  return `${formatFigure(count)} ${count === 1 ? singular : plural}`;
}
