/** A stretch of a sentence. `strong`: a name. `figure`: digits, set in the figures' type. */
export interface Span {
  text: string;
  strong?: true;
  figure?: true;
}

export type RichText = Span[];

type Part = string | number | Span | RichText;

/** A sentence from a pattern: numbers become figures, spans and rich texts stay what they are. */
export function say(pattern: TemplateStringsArray, ...parts: Part[]): RichText {
  const spans: RichText = [];
  for (const [i, text] of pattern.entries()) {
    spans.push({ text });
    const part = parts[i];
    if (part !== undefined) spans.push(...spansOf(part));
  }
  return merge(spans);
}

/** A solver's or a case's name. */
export function name(text: string): Span {
  return { text, strong: true };
}

/** A number with a fixed count of decimals, with a true minus. */
export function fixed(value: number, decimals: number): Span {
  return { text: trueMinus(value.toFixed(decimals)), figure: true };
}

/** `12.3 %`: one decimal, none where it is 0, with a thin no-break space. */
export function percent(value: number): RichText {
  const digits = value.toFixed(1).replace(/\.0$/, '');
  return [{ text: trueMinus(digits), figure: true }, { text: '\u202f%' }];
}

/** `30 → 16`, with thin spaces round the arrow. */
export function fromTo(from: number, to: number, decimals = 0): RichText {
  return [fixed(from, decimals), { text: '\u202f→\u202f' }, fixed(to, decimals)];
}

/** `a`, `a and b`, `a, b and c`. */
export function list(items: readonly Part[]): RichText {
  const spans: RichText = [];
  for (const [i, item] of items.entries()) {
    if (i > 0) spans.push({ text: i === items.length - 1 ? ' and ' : ', ' });
    spans.push(...spansOf(item));
  }
  return merge(spans);
}

/** Sentences one after another. */
export function paragraph(sentences: readonly RichText[]): RichText {
  return merge(sentences.flatMap((sentence, i) => (i === 0 ? sentence : [{ text: ' ' }, ...sentence])));
}

export function plainText(rich: RichText): string {
  return rich.map((span) => span.text).join('');
}

function spansOf(part: Part): RichText {
  if (typeof part === 'string') return [{ text: part }];
  if (typeof part === 'number') return [{ text: trueMinus(String(part)), figure: true }];
  return Array.isArray(part) ? part : [part];
}

function trueMinus(text: string): string {
  // "-0.0" is a rounded nothing.
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : text.replace('-', '−');
}

function merge(spans: RichText): RichText {
  const merged: RichText = [];
  for (const span of spans) {
    const last = merged.at(-1);
    if (span.text === '') continue;
    if (last !== undefined && last.strong === span.strong && last.figure === span.figure) {
      merged[merged.length - 1] = { ...last, text: last.text + span.text };
    } else merged.push(span);
  }
  return merged;
}
