/** Colours of the sheet, as `src/styles/tokens.css` has them; a test holds the two together. */
const light = `--paper: #f3f5f0; --sunk: #e8ece5; --ink: #16202a; --ink-2: #3c4a54; --ink-3: #56636b;
  --rule: #cdd5cf; --rule-strong: #78868a; --margin: #a9bfbc;`;
const dark = `--paper: #12181d; --sunk: #1b2329; --ink: #e6eae3; --ink-2: #b9c3c2; --ink-3: #95a2a4;
  --rule: #2c363c; --rule-strong: #6f7d82; --margin: #3e5354;`;

export const pageStyle = `
:root { color-scheme: light dark; ${light}
  --sans: "Fira Sans", "Source Sans 3", "Noto Sans", system-ui, sans-serif;
  --mono: "Fira Mono", "DejaVu Sans Mono", ui-monospace, monospace; }
@media (prefers-color-scheme: dark) { :root { ${dark} } }
* { box-sizing: border-box; }
body { margin: 0 auto; max-width: 1180px; padding: 0 32px 64px; background: var(--paper); color: var(--ink);
  font: 400 15px/22px var(--sans); }
h1 { font-size: 26px; line-height: 34px; font-weight: 400; max-width: 34em; margin: 34px 0 8px; text-wrap: pretty; }
h2 { font-size: 19px; line-height: 26px; font-weight: 600; margin: 0 0 8px; }
h3 { font: 500 14px/20px var(--mono); margin: 0; overflow-wrap: anywhere; }
code, .type { font-family: var(--mono); font-size: 12.5px; overflow-wrap: anywhere; }
a { color: inherit; text-underline-offset: 3px; }
a:focus-visible { outline: 2px solid var(--ink); outline-offset: 2px; }
p { margin: 4px 0; max-width: 46em; }
nav ul { list-style: none; display: flex; flex-wrap: wrap; gap: 4px 22px; padding: 0; }
section.chapter { border-top: 4px double var(--margin); margin-top: 34px; padding-top: 18px; }
article { display: grid; grid-template-columns: 260px minmax(0, 1fr); gap: 4px 28px; padding: 14px 0;
  border-bottom: 1px solid var(--rule); scroll-margin-top: 8px; }
article > div > p:first-child { margin-top: 0; }
article:target { background: var(--sunk); }
.quiet { color: var(--ink-3); font-size: 12.5px; line-height: 17px; }
.method { text-transform: uppercase; font-weight: 700; }
table { border-collapse: collapse; width: 100%; font-size: 13px; line-height: 18px; margin: 6px 0 2px; }
th { text-align: left; font-weight: 400; color: var(--ink-3); font-size: 12px; border-bottom: 1px solid var(--rule-strong); }
th, td { padding: 3px 14px 3px 0; vertical-align: top; }
td { border-bottom: 1px solid var(--rule); }
td:first-child { width: 12em; }
@media (max-width: 860px) { body { padding: 0 16px 40px; } article { grid-template-columns: minmax(0, 1fr); }
  h1 { font-size: 21px; line-height: 28px; } }
@media print { :root { color-scheme: light; --paper: #fff; --sunk: #fff; --ink: #000; --ink-2: #222; --ink-3: #444;
  --rule: #cdd5cf; --rule-strong: #78868a; --margin: #a9bfbc; } body { padding: 0; max-width: none; }
  nav { display: none; } article, tr { break-inside: avoid; } }
`;
