import type { z } from 'zod';

type ZodIssue = z.core.$ZodIssue;

const kinds: Record<string, string> = {
  string: 'a text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  tuple: 'a list',
  object: 'a block of named values',
  record: 'a block of named values',
};

function article(kind: string): string {
  return kinds[kind] ?? kind;
}

function orList(values: readonly unknown[]): string {
  const texts = values.map((value) => String(value));
  if (texts.length < 2) return texts.join('');
  return `${texts.slice(0, -1).join(', ')} or ${texts.at(-1)}`;
}

function sizeText(
  issue: { origin: string; inclusive?: boolean },
  bound: number | bigint,
  isMinimum: boolean,
): string {
  const extent = isMinimum ? 'at least' : 'at most';
  if (issue.origin === 'string') return `${extent} ${bound} characters were expected`;
  if (issue.origin === 'array') return `${extent} ${bound} entries were expected`;
  if (issue.inclusive === false) return `a number ${isMinimum ? 'above' : 'below'} ${bound} was expected`;
  return `a number of ${extent} ${bound} was expected`;
}

/** What was expected, in a sentence without its full stop. */
export function expectedText(issue: ZodIssue): string {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined && issue.message.endsWith('undefined')
        ? `${JSON.stringify(String(issue.path.at(-1) ?? ''))} is missing: ${article(issue.expected)} was expected`
        : `${article(issue.expected)} was expected`;
    case 'invalid_value':
      return `${orList(issue.values)} was expected`;
    case 'too_small':
      return sizeText(issue, issue.minimum, true);
    case 'too_big':
      return sizeText(issue, issue.maximum, false);
    case 'unrecognized_keys':
      return `unknown key ${issue.keys.map((key) => JSON.stringify(key)).join(', ')}`;
    case 'invalid_union':
      return issue.message === 'Invalid input' ? 'a text or a number was expected' : issue.message;
    default:
      return issue.message;
  }
}
