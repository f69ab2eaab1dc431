// Bundles the HDF5 library into dist/ as two files. As published its WebAssembly is a text of 4 MB inside the script, and to
// decode that takes longer than all else; in a file of its own it is read as it is.
import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { Script } from 'node:vm';
import { build } from 'esbuild';

/** Names the library's licence must be told with. */
export const hdf5Change =
  'Changed by the build of perilag, since December 2026: the WebAssembly stands in a file of its own, hdf5.wasm.\n' +
  'h5wasm is the work of the National Institute of Standards and Technology (NIST).';

/** For the bundle of the command line: the library stays outside it. */
export const hdf5Outside = {
  name: 'hdf5-outside',
  setup({ onResolve }) {
    onResolve({ filter: /^h5wasm\/node$/ }, () => ({ path: './hdf5.cjs', external: true }));
  },
};

/** Writes hdf5.cjs and hdf5.wasm; gives esbuild's list of what is in it. */
export async function buildHdf5(root) {
  const { metafile } = await build({
    absWorkingDir: root,
    stdin: { contents: "export * from 'h5wasm/node';", resolveDir: root },
    outfile: 'dist/hdf5.cjs',
    bundle: true,
    minifyWhitespace: true,
    minifySyntax: true,
    format: 'cjs',
    platform: 'node',
    target: 'node20',
    define: { 'import.meta.url': 'ownUrl' },
    banner: { js: "const ownUrl=require('node:url').pathToFileURL(__filename).href;" },
    legalComments: 'none',
    metafile: true,
    logLevel: 'warning',
    plugins: [wasmApart(join(root, 'dist/hdf5.wasm'))],
  });
  return metafile;
}

function wasmApart(path) {
  return {
    name: 'wasm-apart',
    setup({ onLoad }) {
      onLoad({ filter: /hdf5_util\.js$/ }, async (file) => {
        const text = await readFile(file.path, 'utf8');
        const decode = between(text, 'function binaryDecode(bin){', 'return o}');
        const find = between(text, "function findWasmBinary(){return binaryDecode('", "')}function ").slice(0, -9);
        await writeFile(path, new Script(`${decode};${find};findWasmBinary()`).runInThisContext());
        const read = "function findWasmBinary(){return require('node:fs').readFileSync(__dirname+'/hdf5.wasm')}";
        return { contents: text.replace(find, () => read) };
      });
    },
  };
}

/** The part of `text` from `start` to `end`, both included. */
function between(text, start, end) {
  const from = text.indexOf(start);
  const to = text.indexOf(end, from);
  if (from === -1 || to === -1) throw new Error(`h5wasm has changed: ${start} … ${end} is not in it`);
  return text.slice(from, to + end.length);
}
