/** Little readers of what the exports write, made without looking at how they write it. */

/** RFC 4180: fields by quote state, rows by CR LF outside quotes. Throws on what the grammar does not allow. */
export function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let at = 0;
  while (at < text.length) {
    let field = '';
    if (text[at] === '"') {
      at += 1;
      for (;;) {
        if (at >= text.length) throw new Error('quote without end');
        if (text[at] === '"' && text[at + 1] === '"') {
          field += '"';
          at += 2;
        } else if (text[at] === '"') {
          at += 1;
          break;
        } else {
          field += text[at];
          at += 1;
        }
      }
    } else {
      while (at < text.length && text[at] !== ',' && text[at] !== '\r') {
        if (text[at] === '"' || text[at] === '\n') throw new Error(`bare ${JSON.stringify(text[at])}`);
        field += text[at];
        at += 1;
      }
    }
    row.push(field);
    if (text[at] === ',') at += 1;
    else if (text[at] === '\r' && text[at + 1] === '\n') {
      rows.push(row);
      row = [];
      at += 2;
    } else throw new Error(`unexpected ${JSON.stringify(text[at])} after a field`);
  }
  if (row.length > 0) throw new Error('last row without CR LF');
  return rows;
}

export interface XmlNode {
  name: string;
  attributes: Record<string, string>;
  children: XmlNode[];
  text: string;
}

/** The XML that a report needs: declaration, elements, attributes in double quotes, references. Well-formed or thrown. */
export function readXml(source: string): XmlNode {
  for (const character of source) {
    const code = character.codePointAt(0) ?? 0;
    const isLegal =
      [9, 10, 13].includes(code) ||
      (code >= 0x20 && code <= 0xd7ff) ||
      (code >= 0xe000 && code <= 0xfffd) ||
      code >= 0x10000;
    if (!isLegal) throw new Error(`U+${code.toString(16)} is illegal in XML 1.0`);
  }
  const top: XmlNode = { name: '', attributes: {}, children: [], text: '' };
  const open = [top];
  const token = /<\?[^?]*\?>|<\/([\w-]+)>|<([\w-]+)((?:\s+[\w-]+="[^"<]*")*)\s*(\/?)>|([^<]+)/y;
  while (token.lastIndex < source.length) {
    const at = token.lastIndex;
    const found = token.exec(source);
    if (found === null) throw new Error(`not well-formed at ${source.slice(at, at + 40)}`);
    const [, closed, opened, attributes = '', isEmpty, text] = found;
    const here = open.at(-1);
    if (here === undefined) throw new Error('no element is open');
    if (text !== undefined) here.text += dereference(text);
    else if (closed !== undefined) {
      if (open.pop()?.name !== closed) throw new Error(`${closed} closes nothing`);
    } else if (opened !== undefined) {
      const node: XmlNode = { name: opened, attributes: {}, children: [], text: '' };
      for (const [, key = '', value = ''] of attributes.matchAll(/([\w-]+)="([^"]*)"/g)) {
        if (Object.hasOwn(node.attributes, key)) throw new Error(`${key} stands twice`);
        // A reader of XML makes spaces of blanks in attributes; references stay what they are.
        node.attributes[key] = dereference(value.replace(/[\t\r\n]/g, ' '));
      }
      here.children.push(node);
      if (isEmpty === '') open.push(node);
    }
  }
  const [root] = top.children;
  if (open.length !== 1 || root === undefined || top.children.length !== 1)
    throw new Error('one root element');
  return root;
}

function dereference(text: string): string {
  return text.replace(/&([^;]*);?/g, (whole, name: string) => {
    const named = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" }[name];
    if (named !== undefined && whole.endsWith(';')) return named;
    const number = /^#(\d+)$/.exec(name)?.[1];
    if (number === undefined) throw new Error(`unknown reference ${whole}`);
    return String.fromCodePoint(Number(number));
  });
}

/** The cells of every table row (lines that begin with a bar), escapes taken away; unescaped bars part cells. */
export function readTables(markdown: string): string[][] {
  return markdown
    .split('\n')
    .filter((line) => line.startsWith('|'))
    .map((line) => {
      const cells: string[] = [];
      let cell = '';
      for (let at = 1; at < line.length; at += 1) {
        if (line[at] === '\\' && /[!-/:-@[-`{-~]/.test(line[at + 1] ?? '')) {
          cell += line[at + 1];
          at += 1;
        } else if (line[at] === '|') {
          cells.push(cell.trim());
          cell = '';
        } else cell += line[at];
      }
      if (cell.trim() !== '') throw new Error(`a row without its last bar: ${line}`);
      return cells;
    });
}

/** What Markdown would still act on: the text with every escaped mark taken out. */
export function unescapedRest(markdown: string): string {
  return markdown.replace(/\\[!-/:-@[-`{-~]/g, '');
}
