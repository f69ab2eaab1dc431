import { existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { whileHeld } from '../../../cli/engine/lock.ts';
import { SimError } from '../../../sim/error.ts';
import { demoJob } from './demo.ts';
import { type Bench, bench } from './support.ts';

let place: Bench;
beforeEach(() => {
  place = bench();
});
afterEach(() => place.remove());

const job = demoJob(100);
/** A file as a run of that number would have left it. */
function leave(host: string, pid: number): string {
  mkdirSync(place.path('a', 'draws.work'), { recursive: true });
  const path = place.path('a', 'draws.work', `lock.${host}-${pid}`);
  writeFileSync(path, '');
  return path;
}

test('a second run in a folder where one is at work is refused, and leaves nothing; the next may', async () => {
  const path = leave(hostname(), process.ppid);
  const run = place.compute(job, 'a');
  await expect(run).rejects.toBeInstanceOf(SimError);
  await expect(run).rejects.toThrow(`another run, process ${process.ppid}, is at work there`);
  await expect(run).rejects.toThrow(`remove ${path}`);
  expect(readdirSync(place.path('a', 'draws.work'))).toHaveLength(1);
  rmSync(path);
  await (await place.compute(job, 'a')).discardWork();
  expect(existsSync(place.path('a', 'draws.work'))).toBe(false);
});

test('what a process that is no more left is taken away', async () => {
  const path = leave(hostname(), 2 ** 22 + 1); // larger than Linux numbers a process
  await place.compute(job, 'a');
  expect(existsSync(path)).toBe(false);
});

test('a run on another computer: told, the same job goes on, another one is refused even before there are rows', async () => {
  leave('node7', 12);
  await expect(place.compute(job, 'a')).rejects.toThrow('a run on another computer begins there, or was cut off');
  rmSync(place.path('a'), { recursive: true });
  await place.compute(job, 'a', { shard: { index: 1, count: 2 } });
  for (const name of readdirSync(place.path('a', 'draws.work')))
    if (name.endsWith('.bin')) rmSync(place.path('a', 'draws.work', name));
  const path = leave('node7', 12);
  const other = demoJob(100, { seed: 2 });
  await expect(place.compute(other, 'a', { shard: { index: 1, count: 2 } })).rejects.toThrow('seed: 1 there, 2 now');
  place.told();
  await place.compute(job, 'a', { shard: { index: 1, count: 2 } });
  expect(place.told()).toContain(`warning: ${path}: a run on node7 works there, too, or was cut off.`);
});

test('is let go when the work fails', async () => {
  const folder = join(mkdtempSync(join(tmpdir(), 'perilag-lock-')), 'new');
  const failing = async () => {
    expect(readdirSync(folder)).toEqual([`lock.${hostname()}-${process.pid}`]);
    throw new Error('broke');
  };
  await expect(whileHeld(folder, () => undefined, failing)).rejects.toThrow('broke');
  expect(readdirSync(folder)).toEqual([]);
  rmSync(folder, { recursive: true });
});
