const references: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Markup that is safe to send. */
export class Html {
  readonly text: string;
  constructor(text: string) {
    this.text = text;
  }
}

type Part = Html | string | number | readonly Part[];

function textOf(part: Part): string {
  if (part instanceof Html) return part.text;
  if (typeof part === 'string' || typeof part === 'number')
    return String(part).replace(/[&<>"']/g, (sign) => references[sign] ?? sign);
  return part.map(textOf).join('');
}

/** Markup with values put in; whatever is no markup itself is escaped. */
export function html(strings: TemplateStringsArray, ...parts: Part[]): Html {
  return new Html(strings.map((text, index) => text + textOf(parts[index] ?? '')).join(''));
}
