// Bundles the command line into dist/: one file instead of hundreds to read at every start, its licences, and V8's
// compiled form of it. What a command does not need stays unevaluated: each is imported when it is called.
import { chmod, copyFile, mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Script } from 'node:vm';
import { build } from 'esbuild';
import { buildParquet, buildWorker, parquetOutside } from './buildApart.mjs';
import { buildHdf5, hdf5Change, hdf5Outside } from './buildHdf5.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const at = (name) => join(root, 'dist', name);

await rm(at('perilag.v8'), { force: true });
const { metafile } = await build({
  absWorkingDir: root,
  stdin: {
    contents: "export { processIo } from './cli/io.ts'; export { main } from './cli/program.ts';",
    resolveDir: root,
  },
  outfile: 'dist/perilag.cjs',
  bundle: true,
  minifyWhitespace: true,
  minifySyntax: true, // names stay, so that a stack can be read
  format: 'cjs',
  platform: 'node',
  target: 'node20',
  mainFields: ['module', 'main'],
  banner: { js: '(function(require){const module={exports:{}};' },
  footer: { js: 'return module.exports})' },
  supported: { 'dynamic-import': false }, // what lies outside is required
  plugins: [hdf5Outside, parquetOutside],
  external: ['playwright-core'], // loaded from node_modules, and only for --figures
  legalComments: 'none',
  metafile: true,
  logLevel: 'warning',
});
const apart = [await buildHdf5(root), await buildParquet(root), await buildWorker(root)];
const packages = packagesIn(metafile, ...apart);
await writeFile(at('LICENSES.txt'), (await Promise.all(packages.map(licenceOf))).join('\n'));
await writeFile(at('perilag.v8'), await compiledForm(at('perilag.cjs')));
await copyFile(join(root, 'cli/start.mjs'), at('perilag.mjs'));
await chmod(at('perilag.mjs'), 0o755);

/** V8's cache of the bundle after it ran a scenario once: it holds the functions that were called. */
async function compiledForm(filename) {
  const script = new Script(await readFile(filename, 'utf8'), { filename });
  const { main } = script.runInThisContext()(createRequire(filename));
  const cwd = await mkdtemp(join(tmpdir(), 'perilag-build-'));
  const messages = [];
  const writer = { write: (text) => messages.push(text) };
  const reportTemplate = join(cwd, 'page.html');
  await writeFile(reportTemplate, '<script type="application/json" id="perilag-data"></script>');
  const io = {
    stdout: writer,
    stderr: writer,
    isTTY: false,
    columns: 80,
    stderrIsTTY: false,
    stderrColumns: 80,
    now: () => 0,
    signals: { on: () => () => undefined },
    worker: '',
    env: { LANG: 'C.UTF-8' },
    cwd,
    reportTemplate,
  };
  for (const words of ['new a.yaml', 'check a.yaml', 'run a.yaml']) {
    const code = await main(words.split(' '), io);
    if (code !== 0) throw new Error(`perilag ${words} gave ${code}:\n${messages.join('')}`);
  }
  await rm(cwd, { recursive: true });
  return script.createCachedData();
}

/** Names of the packages whose code is in the bundles. */
function packagesIn(...metafiles) {
  const paths = metafiles.flatMap(({ inputs }) => Object.keys(inputs));
  const names = paths.map((path) => /node_modules\/((?:@[^/]+\/)?[^/]+)\//.exec(path)?.[1]);
  return [...new Set(names.filter((name) => name !== undefined))].sort();
}

async function licenceOf(name) {
  const folder = join(root, 'node_modules', name);
  const file = (await readdir(folder)).find((entry) => /^licen[cs]e/i.test(entry));
  const { version, license } = JSON.parse(await readFile(join(folder, 'package.json'), 'utf8'));
  const text = file === undefined ? `Licence: ${license}` : await readFile(join(folder, file), 'utf8');
  const change = name === 'h5wasm' ? `${hdf5Change}\n\n` : '';
  return `=== ${name} ${version} ===\n\n${change}${text.trim()}\n`;
}
