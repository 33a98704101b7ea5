import { families } from '../functions/declaration';
import type { Declaration } from '../functions/declaration';
import { functionsMetadata } from '../functions/metadata';
import { namespace } from '../functions/names';
import type { Entry } from './Entry';
import { guide } from './guide';

const escape = (text: string): string => text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c]!);
const code = (text: string): string => `<code>${escape(text)}</code>`;

/** The files of the reference by name: one page, its style and its search. It needs nothing else, and no network. */
export function referenceFiles(declarations: readonly Declaration[], entries: Readonly<Record<string, Entry>>, version: string): ReadonlyMap<string, string> {
  return new Map([['reference.html', page(declarations, entries, version)], ['reference.css', STYLE], ['reference.js', SCRIPT]]);
}

function page(declarations: readonly Declaration[], entries: Readonly<Record<string, Entry>>, version: string): string {
  const groups = families.map((family) => [family, declarations.filter((d) => d.family === family)] as const).filter(([, list]) => list.length > 0);
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'self'; script-src 'self'">
<title>Rootsum: reference of the functions</title>
<link rel="stylesheet" href="reference.css">
</head>
<body>
<header>
<h1>Reference of the functions</h1>
<p>Rootsum ${escape(version)}. An aid: the laboratory validates it for its own use; the applicable standards, local codes and licensed practice come first.</p>
<p><label for="search">Search</label> <input id="search" type="search" autocomplete="off"> <span id="count" role="status"></span></p>
</header>
<main>
<section aria-labelledby="tasks"><h2 id="tasks">By task</h2>
${guide.map(({ title, steps }) => `<details class="item"><summary>${escape(title)}</summary>${steps.map((s) => (s.startsWith('=') ? `<pre>${escape(s)}</pre>` : `<p>${escape(s)}</p>`)).join('')}</details>`).join('\n')}
</section>
${groups.map(([family, list]) => `<section aria-labelledby="${idOf(family)}"><h2 id="${idOf(family)}">${escape(family)}</h2>\n${list.map((d) => article(d, entries[d.name])).join('\n')}\n</section>`).join('\n')}
</main>
<script src="reference.js"></script>
</body>
</html>
`;
}

const idOf = (text: string): string => text.toLowerCase().replace(/[^a-z]+/g, '-');

function article(declaration: Declaration, entry: Entry): string {
  const [{ parameters }] = functionsMetadata([declaration]).functions;
  const list = parameters.map((p) => (p.repeating ? `${p.name}, …` : p.optional ? `[${p.name}]` : p.name)).join(', ');
  return `<article class="item" id="${declaration.name}">
<h3>${code(`${namespace}.${declaration.name}(${list})`)}</h3>
<p>${escape(declaration.help)}</p>
<p>${escape(entry.purpose)}</p>
${parameters.length > 0 ? `<table><thead><tr><th scope="col">argument</th><th scope="col">what it is</th></tr></thead><tbody>${parameters.map((p) => `<tr><th scope="row">${code(p.name)}</th><td>${escape(p.description)}</td></tr>`).join('')}</tbody></table>` : ''}
<dl>
<dt>Gives</dt><dd>${escape(declaration.result)}</dd>
<dt>Formula</dt><dd>${escape(entry.formula)}</dd>
<dt>Source</dt><dd>${escape(entry.source)}</dd>
<dt>Example</dt><dd>${example(entry)}</dd>
<dt>Mind</dt><dd><ul>${entry.cautions.map((c) => `<li>${escape(c)}</li>`).join('')}</ul></dd>
</dl>
</article>`;
}

function example({ example: { story, cells, at, formula, shows } }: Entry): string {
  const given = Object.entries(cells).map(([address, value]) => `${address}: ${value}`).join('   ');
  return `<p>${escape(story)}</p>${given === '' ? '' : `<pre>${escape(given)}</pre>`}<pre>${at}: ${escape(formula)}</pre><table class="shows"><tbody>${shows.map((row) => `<tr>${row.map((v) => `<td>${escape(v)}</td>`).join('')}</tr>`).join('')}</tbody></table>`;
}

const STYLE = `:root { color-scheme: light dark; --ink: #1c2b33; --paper: #fff; --line: #b9c4ca; --soft: #f2f5f6; --link: #15505c; }
@media (prefers-color-scheme: dark) { :root { --ink: #e4ebee; --paper: #12191d; --line: #45535b; --soft: #1c262c; --link: #8fd0dc; } }
body { margin: 0 auto; max-width: 52rem; padding: 1rem; font: 1rem/1.5 system-ui, sans-serif; color: var(--ink); background: var(--paper); }
h2 { margin-top: 2rem; border-bottom: 1px solid var(--line); }
h3 { margin-bottom: 0.25rem; overflow-wrap: anywhere; color: var(--link); }
article { padding-bottom: 1rem; }
table { border-collapse: collapse; margin: 0.5rem 0; }
th, td { border: 1px solid var(--line); padding: 0.2rem 0.6rem; text-align: left; vertical-align: top; font-weight: normal; }
.shows td { font-variant-numeric: tabular-nums; }
dt { font-weight: 600; margin-top: 0.5rem; }
dd { margin: 0 0 0 1rem; }
pre { background: var(--soft); padding: 0.4rem 0.6rem; margin: 0.3rem 0; white-space: pre-wrap; overflow-wrap: anywhere; }
details { margin: 0.4rem 0; }
summary { cursor: pointer; font-weight: 600; }
input { font: inherit; padding: 0.3rem 0.5rem; width: 16rem; max-width: 100%; }
:focus-visible { outline: 3px solid var(--link); outline-offset: 2px; }
[hidden] { display: none; }
@media print { header input, header label { display: none; } article { break-inside: avoid; } }
`;

const SCRIPT = `'use strict';
const field = document.getElementById('search');
const items = [...document.querySelectorAll('.item')];
const words = items.map((item) => item.textContent.toLowerCase());
field.addEventListener('input', () => {
  const wanted = field.value.toLowerCase().split(/\\s+/).filter(Boolean);
  let found = 0;
  items.forEach((item, i) => {
    item.hidden = !wanted.every((w) => words[i].includes(w));
    if (!item.hidden) found += 1;
  });
  for (const section of document.querySelectorAll('section')) section.hidden = !section.querySelector('.item:not([hidden])');
  document.getElementById('count').textContent = wanted.length === 0 ? '' : found + ' found';
});
`;
