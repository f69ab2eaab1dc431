/**
 * The HDF5 library, loaded only when a file needs it: it is 4 MB of WebAssembly. The built program has it beside the
 * bundle (`cli/buildHdf5.mjs`).
 */
import { setFlagsFromString } from 'node:v8';

export type Hdf5 = typeof import('h5wasm/node');

/**
 * How much a WebAssembly function runs before V8 compiles it anew, optimized. A file of a few megabytes is written sooner
 * than that compiler is done with the library's large functions: with V8's own figure a short run took a third longer.
 */
const tieringBudget = { patient: 100_000_000, asInNode20: 1_800_000 };

/** Ready to use; every call gives the same library. Without its throwing error handler it fails in silence. */
export async function loadHdf5(): Promise<Hdf5> {
  setFlagsFromString(`--wasm-tiering-budget=${tieringBudget.patient}`);
  const library = await import('h5wasm/node');
  const module = await library.ready;
  setFlagsFromString(`--wasm-tiering-budget=${tieringBudget.asInNode20}`);
  module.activate_throwing_error_handler();
  return library;
}

/**
 * Calls `work` with the clock at zero. HDF5 stamps each object with the time and offers no way here to leave that out;
 * without the stamps the same input gives the same bytes. `work` is synchronous, so nothing else sees this clock.
 */
export function withoutClock<T>(work: () => T): T {
  const now = Date.now;
  Date.now = () => 0;
  try {
    return work();
  } finally {
    Date.now = now;
  }
}
