#!/usr/bin/env node
import { fileURLToPath } from 'node:url';
import { processIo } from './io.ts';
import { main } from './program.ts';

const at = (path: string) => fileURLToPath(new URL(path, import.meta.url));
const io = processIo(at('../dist/report.html'), at('engine/workerFromSource.mjs'));
process.exitCode = await main(process.argv.slice(2), io);
