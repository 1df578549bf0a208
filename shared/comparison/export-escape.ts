const joiner = '\u2060';

/**
 * A text that Markdown shows as it is, in one line, in a paragraph or in a cell of a table.
 *
 * Control characters, line breaks and bidirectional marks become a blank or U+FFFD; every punctuation mark that
 * means something to Markdown or HTML within a line is escaped (a caller never begins a line with such a text). Hosts look for mentions, numbers of issues, addresses and
 * signs of emotion after they have taken the escapes away, so an invisible word joiner parts what would start
 * one: after @, after # and ! before a letter or digit, after : before / or a letter, after www and in GH-1.
 */
export function escapeMarkdown(text: string): string {
  return text
    .replace(/\s+/gu, (blank) => (/[\u202f\u00a0]/.test(blank) && blank.length === 1 ? blank : ' '))
    .replace(/[\p{Cc}\p{Bidi_Control}\p{Cs}\u200b\ufeff]/gu, '\ufffd')
    .replace(/[\\`*_{}[\]()<>#!|~&@$^]|={2,}/g, (marks) => marks.replace(/./g, '\\$&'))
    .replace(/@/g, `@${joiner}`)
    .replace(/([#!:])(?=[\p{L}\p{N}+\-/])/gu, `$1${joiner}`)
    .replace(/(www)(?=\.)/gi, `$1${joiner}`)
    .replace(/\b(GH)(?=-\d)/gi, `$1${joiner}`);
}

/** A text for the content or an attribute of an element of XML 1.0; what XML cannot hold becomes U+FFFD. */
export function escapeXml(text: string): string {
  return text
    .replace(/[^\t\n\r\u0020-\ud7ff\ue000-\ufffd\u{10000}-\u{10ffff}]/gu, '\ufffd')
    .replace(/[&<>"'\t\n\r]/g, (mark) => xmlReferences.get(mark) ?? mark);
}

/** Blanks other than the space are references too: a reader would make spaces of them in an attribute. */
const xmlReferences = new Map([
  ['&', '&amp;'],
  ['<', '&lt;'],
  ['>', '&gt;'],
  ['"', '&quot;'],
  ["'", '&apos;'],
  ['\t', '&#9;'],
  ['\n', '&#10;'],
  ['\r', '&#13;'],
]);
