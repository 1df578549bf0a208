import { z } from 'zod';
import { type ErrorCode, errorStatus } from '../../shared/errors.ts';
import { type Actions, componentSchemas, keyOf, operationId } from './document.ts';
import type { ApiAnswer, ApiEntry, NamedSchema } from './entry.ts';
import { Html, html } from './html.ts';
import { pageStyle } from './page-style.ts';
import { readSchema, typeWords } from './schema-words.ts';

/** The description of the API as one page: no script, nothing loaded. */

const linkTo = ({ name }: NamedSchema): Html => html`<a href="#schema-${name}">${name}</a>`;

function fieldRows(value: unknown): Html[] {
  const { properties = {}, required = [] } = readSchema(value);
  return Object.entries(properties).map(([name, field]) => {
    const may =
      required.includes(name) || readSchema(field).default !== undefined
        ? ''
        : html` <span class="quiet">may be left out</span>`;
    return html`<tr><td><code>${name}</code></td><td><span class="type">${typeWords(field)}</span>${may}</td></tr>`;
  });
}

function fieldTable(caption: string, rows: readonly Html[]): Html {
  if (rows.length === 0) return html``;
  return html`<table><thead><tr><th scope="col">${caption}</th><th scope="col">type</th></tr></thead><tbody>${rows}</tbody></table>`;
}

function answerLine({ status, meaning, body, mediaTypes }: ApiAnswer): Html {
  const what = body ? html` ${linkTo(body)}` : '';
  const as = mediaTypes ? html` <span class="quiet">as ${mediaTypes.join(', ')}</span>` : '';
  return html`<p><code>${status}</code>${what}${as}: ${meaning}</p>`;
}

function problemLine(codes: readonly ErrorCode[]): Html {
  if (codes.length === 0) return html``;
  const words = codes.map((code) => `${errorStatus[code]} ${code}`).join(', ');
  return html`<p class="quiet">Problems: ${words}</p>`;
}

function entryBlock(entry: ApiEntry, action: string | undefined): Html {
  const { method, path, summary, about, query, body, file } = entry;
  return html`<article id="${operationId(entry)}">
<h3><span class="method">${method}</span> /api${path.replace(/:(\w+)/g, '{$1}')}</h3>
<div><p>${summary}</p>
${about === undefined ? '' : html`<p class="quiet">${about}</p>`}
${fieldTable('query', query ? fieldRows(z.toJSONSchema(query, { io: 'input' })) : [])}
${body ? html`<p>Send ${linkTo(body)} as JSON${file ? html`, or a form with the file <code>${file.field}</code>: ${file.about}` : '.'}</p>` : ''}
${entry.answers.map(answerLine)}
${problemLine(entry.problems)}
${action === undefined ? '' : html`<p class="quiet">Needs: ${action}</p>`}
</div></article>`;
}

function schemaBlock(name: string, value: unknown): Html {
  const rows = fieldRows(value);
  const whole = rows.length > 0 ? fieldTable('field', rows) : html`<p class="type">${typeWords(value)}</p>`;
  return html`<article id="schema-${name}"><h3>${name}</h3><div>${whole}</div></article>`;
}

export function apiPage(entries: readonly ApiEntry[], version: string, actions: Actions = new Map()): string {
  const schemas = Object.entries(componentSchemas(entries));
  const chapters = [...new Set(entries.map((entry) => entry.chapter))];
  const idOf = (chapter: string): string => `chapter-${chapter.toLowerCase().replaceAll(' ', '-')}`;
  const page = html`<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>The API of Tallyroot</title><style>${new Html(pageStyle)}</style></head>
<body><header><h1>Everything that the pages of Tallyroot show and do goes through these ${entries.length} addresses; programs may use them as well.</h1>
<p class="quiet">Version ${version}. For programs: <a href="/api/openapi.json">the same as OpenAPI 3.1</a>. Errors come as problem details (RFC 9457) with a code of a closed list. Lists come in pages: give <code>next</code> back as <code>cursor</code>.</p></header>
<nav aria-label="Chapters"><ul>${chapters.map((chapter) => html`<li><a href="#${idOf(chapter)}">${chapter}</a></li>`)}<li><a href="#schemas">Schemas</a></li></ul></nav>
<main>${chapters.map(
    (chapter) => html`<section class="chapter" id="${idOf(chapter)}"><h2>${chapter}</h2>
${entries.filter((entry) => entry.chapter === chapter).map((entry) => entryBlock(entry, actions.get(keyOf(entry))))}</section>`,
  )}
<section class="chapter" id="schemas"><h2>Schemas</h2>${schemas.map(([name, value]) => schemaBlock(name, value))}</section></main>
</body></html>`;
  return page.text;
}
