#!/usr/bin/env node
// Starts the bundled command line; the build copies this file to dist/perilag.mjs. Beside the bundle lies V8's compiled
// form of it, which saves a sixth of a short run. Another version of Node turns that down and compiles anew.
import { existsSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { Script } from 'node:vm';

const at = (name) => fileURLToPath(new URL(name, import.meta.url));
const filename = at('perilag.cjs');
const cachedData = existsSync(at('perilag.v8')) ? readFileSync(at('perilag.v8')) : undefined;
const script = new Script(readFileSync(filename, 'utf8'), { filename, cachedData });
const { main, processIo } = script.runInThisContext()(createRequire(import.meta.url));
process.exitCode = await main(process.argv.slice(2), processIo(at('report.html'), at('worker.cjs')));
