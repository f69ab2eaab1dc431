/**
 * Builds the report page: one HTML file, no request of any kind, with an empty block for the data of a run.
 * Plotly stands as a script of its own after the page's code, so that the words are there before it is read.
 */
import { createHash } from 'node:crypto';
import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const here = (path) => fileURLToPath(new URL(path, import.meta.url));
const target = here('../dist/report.html');

const common = { bundle: true, write: false, legalComments: 'none', logLevel: 'warning' };

async function pageScript() {
  const made = await build({
    ...common,
    entryPoints: [here('./report/main.ts')],
    format: 'iife',
    minify: true,
    target: 'es2022',
  });
  const script = made.outputFiles[0].text;
  if (/new Function|\beval\(/.test(script)) throw new Error('the page must not compile code: its policy forbids it');
  return script;
}

async function styleSheet() {
  const [css, theme] = await Promise.all([
    build({ ...common, entryPoints: [here('./report/style.css')], minify: true }),
    build({ ...common, entryPoints: [here('./report/themeCss.ts')], format: 'esm' }),
  ]);
  const { themeCss } = await import(`data:text/javascript,${encodeURIComponent(theme.outputFiles[0].text)}`);
  return themeCss() + css.outputFiles[0].text;
}

/**
 * Plotly keeps the worker of its street maps as one string of half a megabyte. No figure here is a street map, and the policy
 * would forbid it the network: the string is left empty.
 */
function withoutMapWorker(script) {
  const start = ".exports='var ";
  const at = script.indexOf(start);
  const from = at + start.length - 'var '.length;
  const end = /(?<!\\)(?:\\\\)*'/g;
  end.lastIndex = from;
  const found = at < 0 ? null : end.exec(script);
  if (!found || script.indexOf(start, from) >= 0 || end.lastIndex - from < 400_000) {
    throw new Error("Plotly's map worker is not where it was: look at viewer/build.mjs");
  }
  return script.slice(0, from) + script.slice(end.lastIndex - 1);
}

/** Nothing in a script may look like its end or like a comment: both stand inside strings or patterns, where \x3C is the same. */
function inlined(script) {
  return script.replaceAll(/<(?=\/script|!--)/gi, '\\x3C');
}

function hash(script) {
  return `'sha256-${createHash('sha256').update(script).digest('base64')}'`;
}

function policy(scripts) {
  return [
    "default-src 'none'",
    `script-src ${scripts.map(hash).join(' ')}`,
    'worker-src blob:',
    "style-src 'unsafe-inline'", // Plotly styles what it draws
    'img-src data: blob:',
    "connect-src 'none'",
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
}

/** Replaces what must be there exactly once; a function keeps `$&` in a bundle from being read as a pattern. */
function filled(html, place, content) {
  if (html.split(place).length !== 2) throw new Error(`the page: ${place} is not there exactly once`);
  return html.replace(place, () => content);
}

const plotly = await readFile(createRequire(import.meta.url).resolve('plotly.js-dist-min/plotly.min.js'), 'utf8');
const scripts = [await pageScript(), withoutMapWorker(plotly)].map(inlined);
let html = await readFile(here('./template.html'), 'utf8');
html = filled(html, '<style></style>', `<style>${await styleSheet()}</style>`);
html = filled(html, '<script id="page"></script>', `<script id="page">${scripts[0]}</script>`);
html = filled(html, '<script id="plotly"></script>', `<script>${scripts[1]}</script>`);
const charset = '<meta charset="utf-8">';
html = filled(html, charset, `${charset}\n<meta http-equiv="Content-Security-Policy" content="${policy(scripts)}">`);
// Where the command line puts a run's results: it looks for the first such place and must find the only one.
filled(html, '<script type="application/json" id="perilag-data"></script>', '');

await mkdir(here('../dist'), { recursive: true });
await writeFile(`${target}.part`, html);
await rename(`${target}.part`, target);
