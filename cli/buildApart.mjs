// Bundles what the command line needs only at times into files of their own beside it: the Parquet library, which is read
// when a table is written or read, and the script of the worker threads.
import { build } from 'esbuild';

const common = {
  bundle: true,
  minifyWhitespace: true,
  minifySyntax: true, // names stay, so that a stack can be read
  format: 'cjs',
  platform: 'node',
  target: 'node20',
  mainFields: ['module', 'main'],
  legalComments: 'none',
  metafile: true,
  logLevel: 'warning',
};

/** For the other bundles: the library stays outside them. */
export const parquetOutside = {
  name: 'parquet-outside',
  setup({ onResolve }) {
    onResolve({ filter: /\/parquetLibrary\.ts$/ }, () => ({ path: './parquet.cjs', external: true }));
  },
};

/** Writes parquet.cjs; gives esbuild's list of what is in it. */
export async function buildParquet(root) {
  const entryPoints = ['cli/output/parquetLibrary.ts'];
  return (await build({ ...common, absWorkingDir: root, entryPoints, outfile: 'dist/parquet.cjs' })).metafile;
}

/** Writes worker.cjs; gives esbuild's list of what is in it. */
export async function buildWorker(root) {
  const entryPoints = ['cli/engine/worker.ts'];
  const supported = { 'dynamic-import': false };
  const plugins = [parquetOutside];
  const options = { ...common, absWorkingDir: root, entryPoints, outfile: 'dist/worker.cjs', supported, plugins };
  return (await build(options)).metafile;
}
