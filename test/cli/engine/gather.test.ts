import { cpSync } from 'node:fs';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { gatherTable } from '../../../cli/engine/gather.ts';
import { tablesIn } from '../../../cli/engine/store.ts';
import { Interrupted } from '../../../cli/exit.ts';
import { SimError } from '../../../sim/error.ts';
import { demoJob } from './demo.ts';
import { type Bench, bench } from './support.ts';

let place: Bench;
beforeEach(() => {
  place = bench();
});
afterEach(() => place.remove());

const job = demoJob(40_000, { failEvery: 1000 });
const shard = (index: number, count: number) => place.compute(job, `s${index}of${count}`, { shard: { index, count } });
const gather = (...folders: string[]) =>
  gatherTable(
    folders.map((name) => place.path(name)),
    'draws',
    place.path('all'),
  );

describe('gatherTable', () => {
  test('joins shards in any order to the bytes of one run, and leaves them', async () => {
    await place.compute(job, 'whole');
    for (const index of [1, 2, 3]) {
      const { files, workFolder } = await shard(index, 3);
      expect(files).toBeNull();
      expect(workFolder).toBe(place.path(`s${index}of3`, 'draws.work'));
    }
    const { files, job: record } = await gather('s2of3', 's3of3', 's1of3');
    expect(files).toMatchObject({ rows: 40_000, failed: 40 });
    expect(record.context).toEqual({ note: 'kept for gather' });
    expect(place.bytes('all') === place.bytes('whole')).toBe(true);
    expect(tablesIn(place.path('s2of3'))).toEqual(['draws']);
  });

  test('more shards than rows: some have none, and that is no gap', async () => {
    const small = demoJob(2);
    for (const index of [1, 2, 3]) await place.compute(small, `t${index}`, { shard: { index, count: 3 } });
    expect((await gather('t1', 't2', 't3')).files.rows).toBe(2);
  });

  test('a shard that is missing is named', async () => {
    for (const index of [1, 3]) await shard(index, 4);
    const run = gather('s1of4', 's3of4');
    await expect(run).rejects.toBeInstanceOf(SimError);
    await expect(run).rejects.toThrow(
      /s1of4\/draws\.work, .*s3of4\/draws\.work: rows 10000 to 19999, 30000 to 39999 are in none of them: shard 2, 4 of 4\./,
    );
  });

  test('a shard that is not finished is named, and can go on', async () => {
    await shard(1, 2);
    place.stopAfter(2);
    await expect(shard(2, 2)).rejects.toBeInstanceOf(Interrupted);
    place.stopAfter(Infinity);
    await expect(gather('s1of2', 's2of2')).rejects.toThrow(
      /not finished: shard 2\/2 in .*s2of2\/draws\.work\. Run it there again with --resume/,
    );
    await place.compute(job, 's2of2', { shard: { index: 2, count: 2 }, resume: true });
    expect((await gather('s1of2', 's2of2')).files.rows).toBe(40_000);
  });

  test('rows in two folders are refused: a copy; another division is named', async () => {
    await shard(1, 2);
    await shard(2, 2);
    await shard(2, 3);
    cpSync(place.path('s1of2'), place.path('copy'), { recursive: true });
    await expect(gather('s1of2', 'copy', 's2of2')).rejects.toThrow(
      /s1of2\/draws\.work and .*copy\/draws\.work: both hold rows 0\./,
    );
    await expect(gather('s1of2', 's2of2', 's2of3')).rejects.toThrow(
      /s1of2\/draws\.work and .*s2of3\/draws\.work: these are parts of different divisions \(shard 1\/2 is in .*s1of2\/draws\.work, shard 2\/3 is in .*s2of3\/draws\.work\)\. Gather the shards of one division/,
    );
  });

  test('parts of different runs are refused, with what differs', async () => {
    await shard(1, 2);
    await place.compute(demoJob(40_000, { failEvery: 1000, seed: 7 }), 'other', { shard: { index: 2, count: 2 } });
    await expect(gather('s1of2', 'other')).rejects.toThrow(
      /s1of2\/draws\.work and .*other\/draws\.work: these are parts of different runs \(seed: 1 in the first, 7 in the second\)/,
    );
  });

  test('a folder without rows is named', async () => {
    await shard(1, 2);
    await expect(gather('s1of2', 'nowhere')).rejects.toThrow(/nowhere: no rows of draws are kept there\./);
  });

  test('a shard that does not exist is refused', async () => {
    await expect(shard(5, 4)).rejects.toThrow('--shard: there is no shard 5 of 4. Count from 1, e.g. --shard 3/64.');
  });
});
