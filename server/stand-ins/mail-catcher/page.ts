import type { CaughtMail } from './mail-catcher.ts';

const entities: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const escapeText = (text: string) => text.replace(/[&<>"']/g, (character) => entities[character] ?? '');

/** Addresses of web pages become links; everything else is text. */
function withLinks(text: string): string {
  return text
    .split(/(https?:\/\/[^\s<>"']+)/)
    .map((piece, index) =>
      index % 2 === 1
        ? `<a href="${escapeText(piece)}" rel="noreferrer">${escapeText(piece)}</a>`
        : escapeText(piece),
    )
    .join('');
}

const style = `
  body { font: 1rem/1.5 sans-serif; max-width: 46rem; margin: 2rem auto; padding: 0 1rem; color: #222; background: #fff; }
  article { border-top: 1px solid #999; padding: 1rem 0; }
  h2 { font-size: 1.1rem; margin: 0; }
  p { margin: .25rem 0; }
  pre { white-space: pre-wrap; overflow-wrap: anywhere; font: inherit; margin: 1rem 0 0; }
`;

/** All mails on one plain page, the newest first; it works without script. */
export function mailsPage(mails: readonly CaughtMail[]): string {
  const list = mails
    .toReversed()
    .map(
      ({ id, to, subject, at, text }) => `<article id="mail-${id}">
<h2>${escapeText(subject)}</h2>
<p>To ${escapeText(to.join(', '))}, <time datetime="${at}">${at.slice(0, 19).replace('T', ' ')} UTC</time></p>
<pre>${withLinks(text)}</pre>
</article>`,
    )
    .join('\n');
  return `<!doctype html>
<html lang="en">
<head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><title>Caught mails</title><style>${style}</style></head>
<body>
<h1>Caught mails</h1>
<p>Mails of the demo end here and go nowhere else. They are kept until the server stops. <a href="/">Look again</a></p>
${list === '' ? '<p>No mail has come yet.</p>' : list}
</body>
</html>
`;
}
