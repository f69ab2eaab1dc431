#!/usr/bin/env node
import { fileURLToPath } from 'node:url';
import { processIo } from './io.ts';
import { main } from './program.ts';

const reportTemplate = fileURLToPath(new URL('../dist/report.html', import.meta.url));
process.exitCode = await main(process.argv.slice(2), processIo(reportTemplate));
