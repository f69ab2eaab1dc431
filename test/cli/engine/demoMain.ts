/** A program for tests of whole processes: `node --import tsx demoMain.ts FOLDER ROWS PRICE WORKERS [--resume] [--columns N] [--memory]`: the last reads all back, and says how long it took and how much memory. */
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { tellError } from '../../../cli/exit.ts';
import { processIo } from '../../../cli/io.ts';
import { readColumn } from '../readColumn.ts';
import { demoJob, demoKinds } from './demo.ts';
import { computeTable } from './support.ts';

const { positionals, values } = parseArgs({
  allowPositionals: true,
  options: { resume: { type: 'boolean' }, columns: { type: 'string' }, memory: { type: 'boolean' } },
});
const [folder, rows, price, workers] = positionals as [string, string, string, string];
const io = processIo('', fileURLToPath(new URL('demoWorker.mjs', import.meta.url)));
const job = demoJob(Number(rows), { price: Number(price), failEvery: 1000, findings: Number(values.columns ?? 4) - 1 });
try {
  const options = {
    table: 'draws',
    folder,
    shard: null,
    resume: values.resume === true,
    workers: Number(workers),
    quiet: false,
    words: process.argv.slice(2),
  };
  const start = performance.now();
  const { files, discardWork } = await computeTable(job, options, demoKinds, io);
  await discardWork();
  if (values.memory) {
    for (const { name } of job.findings) (await readColumn(files!.path, name)).sort();
    const megabytes = Math.round(process.resourceUsage().maxRSS / 1024);
    io.stdout.write(`${((performance.now() - start) / 1000).toFixed(2)} s, ${megabytes} MB at most\n`);
  }
} catch (error) {
  process.exitCode = tellError(error, io);
}
