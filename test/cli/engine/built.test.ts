/** The engine's parts as the built program has them: apart from the bundle, and working from dist alone. */
import { execFileSync, spawnSync } from 'node:child_process';
import { copyFileSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Worker } from 'node:worker_threads';
import { afterEach, beforeEach, expect, test } from 'vitest';
import type { Answer, Order } from '../../../cli/engine/serve.ts';
import { threeCasesText } from '../support.ts';

const dist = (name: string) => fileURLToPath(new URL(`../../../dist/${name}`, import.meta.url));
let home = '';
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'perilag-built-'));
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

test('a run neither holds nor loads the Parquet library and the worker', () => {
  expect(readFileSync(dist('perilag.cjs'), 'utf8')).not.toContain('ParquetWriter {');
  for (const name of ['perilag.mjs', 'perilag.cjs', 'perilag.v8', 'report.html'])
    copyFileSync(dist(name), join(home, name));
  for (const name of ['parquet.cjs', 'worker.cjs']) writeFileSync(join(home, name), 'throw new Error("loaded")');
  writeFileSync(join(home, 'corvane.yaml'), threeCasesText);
  const { status, stderr } = spawnSync(process.execPath, ['perilag.mjs', 'run', 'corvane.yaml'], { cwd: home });
  expect({ status, stderr: stderr.toString() }).toMatchObject({ status: 0 });
});

test('the worker starts from dist alone, and answers', async () => {
  copyFileSync(dist('worker.cjs'), join(home, 'worker.cjs'));
  const worker = new Worker(join(home, 'worker.cjs'));
  const orders: Order[] = [
    { setup: 0, data: null },
    { job: 1, kind: 'nonesuch', names: [], setup: 0 },
    { ticket: 7, job: 1, range: { from: 0, to: 1 } },
  ];
  const answer = await new Promise<Answer>((resolve, reject) => {
    worker.on('message', resolve);
    worker.on('error', reject);
    for (const order of orders) worker.postMessage(order);
  });
  await worker.terminate();
  expect(answer).toMatchObject({
    ticket: 7,
    fault: { message: 'no arithmetic is called "nonesuch": see cli/engine/kinds.ts' },
  });
});

test('the Parquet library works from dist alone, and its licence is told', () => {
  copyFileSync(dist('parquet.cjs'), join(home, 'parquet.cjs'));
  const code = `const { ByteWriter, snappyCompress } = require('./parquet.cjs');
    const writer = new ByteWriter();
    writer.appendBytes(snappyCompress(new Uint8Array(1000)));
    console.log(writer.offset < 100);`;
  expect(execFileSync(process.execPath, ['-e', code], { cwd: home, encoding: 'utf8' })).toBe('true\n');
  for (const name of ['hyparquet 1.31.5', 'hyparquet-writer 0.17.0'])
    expect(readFileSync(dist('LICENSES.txt'), 'utf8')).toContain(`=== ${name} ===\n\nThe MIT License`);
});
