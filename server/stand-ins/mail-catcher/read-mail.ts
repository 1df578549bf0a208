/** As much of a mail's form (RFC 5322, 2045, 2047) as it takes to show one. */

export interface ReadMail {
  subject: string;
  /** The first part of plain text. */
  text: string;
}

function decodeQuotedPrintable(text: string): Buffer {
  const joined = text.replace(/=[ \t]*\r?\n/g, '');
  const bytes = joined.replace(/=([0-9A-Fa-f]{2})/g, (_all, hex: string) =>
    String.fromCharCode(Number.parseInt(hex, 16)),
  );
  return Buffer.from(bytes, 'latin1');
}

function decode(body: string, encoding: string): string {
  if (encoding === 'base64') return Buffer.from(body, 'base64').toString('utf8');
  if (encoding === 'quoted-printable') return decodeQuotedPrintable(body).toString('utf8');
  return Buffer.from(body, 'latin1').toString('utf8');
}

const encodedWord = /=\?utf-8\?([BQ])\?([^?\s]*)\?=(?:\s+(?==\?))?/gi;

function decodeHeader(text: string): string {
  return text.replace(encodedWord, (_all, kind: string, word: string) =>
    kind.toUpperCase() === 'B'
      ? Buffer.from(word, 'base64').toString('utf8')
      : decodeQuotedPrintable(word.replaceAll('_', ' ')).toString('utf8'),
  );
}

interface Part {
  headers: Map<string, string>;
  body: string;
}

function readPart(source: string): Part {
  const end = source.indexOf('\r\n\r\n');
  const head = (end === -1 ? source : source.slice(0, end)).replace(/\r\n[ \t]+/g, ' ');
  const headers = new Map(
    head.split('\r\n').map((line) => {
      const colon = line.indexOf(':');
      return [line.slice(0, colon).trim().toLowerCase(), line.slice(colon + 1).trim()];
    }),
  );
  return { headers, body: end === -1 ? '' : source.slice(end + 4) };
}

function plainText(part: Part, depth = 0): string | undefined {
  const type = part.headers.get('content-type') ?? 'text/plain';
  const boundary = /boundary="?([^";]+)"?/i.exec(type)?.[1];
  if (boundary !== undefined && depth < 5)
    return part.body
      .split(`--${boundary}`)
      .slice(1)
      .map((inner) => plainText(readPart(inner.replace(/^\r\n/, '')), depth + 1))
      .find((text) => text !== undefined);
  if (!/^text\/plain/i.test(type)) return undefined;
  return decode(part.body, (part.headers.get('content-transfer-encoding') ?? '').toLowerCase());
}

export function readMail(data: Buffer): ReadMail {
  const part = readPart(data.toString('latin1'));
  const subject = Buffer.from(part.headers.get('subject') ?? '', 'latin1').toString('utf8');
  return { subject: decodeHeader(subject), text: plainText(part) ?? '' };
}
