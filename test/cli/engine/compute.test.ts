import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { whileListening, whileRowsAreKept } from '../../../cli/engine/interruption.ts';
import { calculateOf } from '../../../cli/engine/job.ts';
import { findStore } from '../../../cli/engine/store.ts';
import { Interrupted } from '../../../cli/exit.ts';
import { SimError } from '../../../sim/error.ts';
import { readColumn } from '../readColumn.ts';
import { demoJob, demoKinds, hashed } from './demo.ts';
import { type Bench, bench } from './support.ts';

let place: Bench;
beforeEach(() => {
  place = bench();
});
afterEach(() => place.remove());

const job = demoJob(40_000, { failEvery: 1000 });
const chunkNames = (folder: string) =>
  readdirSync(place.path(folder, 'draws.work')).filter((name) => name.startsWith('rows-'));

/** Begins a run and stops it by a signal when so many chunks are there. */
async function interrupted(folder: string, chunks: number, options = {}): Promise<string> {
  place.stopAfter(chunks);
  const run = place.compute(job, folder, options);
  await expect(run).rejects.toBeInstanceOf(Interrupted);
  place.stopAfter(Infinity);
  return run.then(
    () => '',
    (error: Error) => error.message,
  );
}

describe('computeTable', () => {
  test('writes every row, and lists those that failed with their inputs', async () => {
    const { files, discardWork } = await place.compute(job, 'a');
    await discardWork();
    expect(files).toMatchObject({ rows: 40_000, failed: 40 });
    expect(readdirSync(place.path('a')).sort()).toEqual(['draws.parquet', 'failed.csv']);
    const albedo = await readColumn(files!.path, 'planet.bondAlbedo');
    expect(albedo).toEqual(Float64Array.from({ length: 40_000 }, (_, draw) => hashed(1, draw, 0)));
    const last = await readColumn(files!.path, 'finding2');
    const lacking = (draw: number) => draw % 97 === 0 || draw % 1000 === 999;
    expect(last.every((value, draw) => (lacking(draw) ? Number.isNaN(value) : value === hashed(1, draw, 3)))).toBe(
      true,
    );
    const lines = readFileSync(files!.failedPath!, 'utf8').split('\n');
    expect(lines).toHaveLength(42);
    expect(lines[0]).toBe('draw,planet.bondAlbedo,message');
    expect(lines[2]).toBe(`1999,${hashed(1, 1999, 0)},"no world, ""1999"""`);
  });

  test('what failed of a grid is listed by its node', async () => {
    const { files } = await place.compute(demoJob(10, { failEvery: 5 }), 'a', { table: 'grid' });
    expect(files!.failedPath).toBe(place.path('a', 'failed-grid.csv'));
    expect(readFileSync(files!.failedPath!, 'utf8')).toMatch(/^node,planet\.bondAlbedo,message\n4,/);
  });

  test('without failures there is no list of them, not even an old one', async () => {
    await (await place.compute(job, 'a')).discardWork();
    const { files } = await place.compute(demoJob(100), 'a');
    expect(files).toMatchObject({ failed: 0, failedPath: null });
    expect(existsSync(place.path('a', 'failed.csv'))).toBe(false);
  });

  test('the same bytes on any number of workers', async () => {
    for (const workers of [1, 2, 4]) await place.compute(job, `w${workers}`, { workers });
    expect(place.bytes('w1')).toContain('failed.csv:draw');
    expect(place.bytes('w2') === place.bytes('w1')).toBe(true);
    expect(place.bytes('w4') === place.bytes('w1')).toBe(true);
  });

  test('an infinite number is no result: null, and a failed row', async () => {
    const broken = { ...demoJob(5, { findings: 0 }), kind: 'broken' };
    const { files } = await place.compute(broken, 'a');
    expect([...(await readColumn(files!.path, 'planet.bondAlbedo'))]).toEqual([1, 1, 1, NaN, 1]);
    expect(readFileSync(files!.failedPath!, 'utf8')).toBe(
      'draw,planet.bondAlbedo,message\n3,,planet.bondAlbedo is not finite\n',
    );
  });

  test.each([1, 2])(
    'arithmetic that throws, on %i workers: its error, and what was finished stays',
    async (workers) => {
      const broken = { ...demoJob(100, { findings: 0 }), kind: 'broken' };
      await expect(place.compute(broken, 'a', { workers })).rejects.toThrow('row 7 broke');
      expect(chunkNames('a')).toContain('rows-0-1.bin');
      expect(place.listeners()).toBe(0);
    },
  );

  test.each([1, 2])('a setup that is wrong, on %i workers: the input’s fault', async (workers) => {
    const run = place.compute(demoJob(100, { seed: -1 }), 'a', { workers });
    await expect(run).rejects.toBeInstanceOf(SimError);
    await expect(run).rejects.toThrow('--seed: -1 is below zero. Give zero or more.');
  });
});

test('a signal after the last table, while the rest is made: how to go on is said', async () => {
  const io = { signals: place.signals, stderr: { write: () => true }, stderrIsTTY: false };
  const kept = { folder: '/there', words: ['spread', 'a.yaml'] };
  const run = whileListening(io, { quiet: true }, (interruption) =>
    whileRowsAreKept(kept, interruption, async (checkpoint) => {
      checkpoint();
      place.signal();
      checkpoint();
    }),
  );
  await expect(run).rejects.toBeInstanceOf(Interrupted);
  await expect(run).rejects.toThrow('all rows are kept in /there. To go on:\n  perilag spread a.yaml --resume');
  expect(place.listeners()).toBe(0);
});

describe('a thread that dies', () => {
  test('our fault, but what is kept and how to go on is said', async () => {
    const job = { ...demoJob(100_000, { findings: 0 }), kind: 'dying' };
    await expect(place.compute(job, 'a', { workers: 2 })).rejects.toThrow('a worker thread ended (1)');
    expect(place.told()).toMatch(
      /What is finished stays in .*a\/draws\.work\. To go on: perilag spread .* --resume\n$/,
    );
  });

  test('of too little memory: the machine’s, with what to allow', async () => {
    const run = place.compute({ ...demoJob(100, { findings: 0 }), kind: 'hungry' }, 'a');
    await expect(run).rejects.toBeInstanceOf(SimError);
    await expect(run).rejects.toThrow(
      /ran out of memory\. Allow Node more, .*\. What is finished stays there\. .* --resume\.$/,
    );
  });
});

describe('a signal', () => {
  test.each([1, 3])('ends the run after the running chunks, and says how to go on (%i workers)', async (workers) => {
    const message = await interrupted('a', 4, { workers });
    const rows = /^Interrupted: ([\d,]+) of 40,000 rows are kept in .*a\/draws\.work\. To go on:\n/.exec(message)![1]!;
    expect(message).toMatch(/\n {2}perilag spread 'a planet\.yaml' -o a --resume$/);
    expect(place.told()).toContain('Stopping: what is running is finished first.');
    expect(place.listeners()).toBe(0);
    const kept = chunkNames('a').map((name) => /rows-(\d+)-(\d+)/.exec(name)!);
    expect(kept.reduce((sum, [, from, to]) => sum + Number(to) - Number(from), 0)).toBe(Number(rows.replace(',', '')));
    expect(readdirSync(place.path('a'))).toEqual(['draws.work']);
  });

  test.each([1, 2])('while the table is written: nothing of it is left, the rows are (%i workers)', async (workers) => {
    const large = demoJob(400_000, { failEvery: 1000, price: 2 });
    const written = () => {
      const names = existsSync(place.path('a')) ? readdirSync(place.path('a')) : [];
      const temporary = names.find((name) => name.startsWith('draws.parquet.'));
      return temporary !== undefined && statSync(place.path('a', temporary)).size > 0;
    };
    const watch = setInterval(() => written() && place.signal(), 1);
    try {
      await expect(place.compute(large, 'a', { workers })).rejects.toThrow(/[\d,]{6,} of 400,000 rows are kept/);
    } finally {
      clearInterval(watch);
    }
    expect(readdirSync(place.path('a'))).toEqual(['draws.work']);
  });
});

describe('--resume', () => {
  test('goes on where the run stopped, on other workers, to the same bytes', async () => {
    await place.compute(job, 'whole');
    await interrupted('a', 3, { workers: 2 });
    await interrupted('a', 3, { resume: true });
    place.told();
    const kept = chunkNames('a').map((name) => [name, readFileSync(place.path('a', 'draws.work', name))] as const);
    await place.compute(job, 'a', { resume: true, workers: 2 });
    expect(place.told()).toMatch(/^draws: going on with [\d,]+ finished rows\n/);
    for (const [name, bytes] of kept)
      expect(readFileSync(place.path('a', 'draws.work', name)).equals(bytes)).toBe(true);
    expect(place.bytes('a') === place.bytes('whole')).toBe(true);
  });

  test('chunks that overlap, of two runs at once: every row once, no failure twice, the same bytes', async () => {
    await place.compute(job, 'whole');
    const calculate = await calculateOf(job, demoKinds);
    for (const [folder, ranges] of Object.entries({
      a: [
        [0, 1200],
        [100, 1700],
        [16300, 16384],
      ],
      b: [
        [0, 400],
        [0, 1200],
        [1200, 16384],
        [15000, 16384],
        [16384, 32768],
        [20000, 21000],
        [32768, 40000],
      ],
    })) {
      await interrupted(folder, 1);
      for (const name of chunkNames(folder)) rmSync(place.path(folder, 'draws.work', name));
      const store = findStore(place.path(folder, 'draws.work'))!;
      for (const [from, to] of ranges as [number, number][]) await store.land({ from, to, ...calculate(from, to) });
      expect((await place.compute(job, folder, { resume: true })).files).toMatchObject({ rows: 40_000, failed: 40 });
      expect(place.bytes(folder) === place.bytes('whole')).toBe(true);
    }
  });

  test('with nothing there begins at the beginning', async () => {
    await place.compute(job, 'a', { resume: true });
    expect(place.told()).toBe('');
    expect(readdirSync(place.path('a'))).toContain('draws.parquet');
  });

  test('with all there computes nothing, and takes the kept rows away', async () => {
    await place.compute(job, 'a');
    const refusing = { ...job, kind: 'none' };
    await expect(place.compute(refusing, 'b')).rejects.toThrow('no arithmetic is called "none"');
    writeFileSync(place.path('a', 'draws.work', 'rows-0-1.bin'), 'would be found damaged');
    const { files, discardWork } = await place.compute(job, 'a', { resume: true });
    expect(files).toMatchObject({ rows: 40_000, failed: 40 });
    await discardWork();
    expect(readdirSync(place.path('a')).sort()).toEqual(['draws.parquet', 'failed.csv']);
  });

  test('of another run is refused with what differs, and loses nothing', async () => {
    await interrupted('a', 3);
    const kept = chunkNames('a');
    const sha256 = (letter: string) => letter.repeat(64);
    const changed = demoJob(40_000, { failEvery: 1000, seed: 2 }, { scenario: sha256('b'), version: '0.2.0' });
    const run = place.compute(changed, 'a', { resume: true });
    await expect(run).rejects.toBeInstanceOf(SimError);
    await expect(run).rejects.toThrow(
      /rows of an unfinished run with other settings are kept there \(seed: 1 there, 2 now; version: 0\.1\.0 there, 0\.2\.0 now; scenario: none there, bbbbbbbb… now\)\. Go on with the settings of that run/,
    );
    await expect(place.compute(demoJob(50_000), 'a', { resume: true })).rejects.toThrow(
      'draws: 40000 there, 50000 now',
    );
    await expect(place.compute(job, 'a', { resume: true, shard: { index: 2, count: 5 } })).rejects.toThrow(
      'the whole there, shard 2/5 now',
    );
    expect(chunkNames('a')).toEqual(kept);
  });

  test('a run without it refuses to throw finished rows away', async () => {
    await interrupted('a', 3);
    const kept = chunkNames('a');
    await expect(place.compute(job, 'a')).rejects.toThrow(
      /draws\.work: \d+ of 40000 rows of an earlier run with the same settings are kept there\. Add --resume to go on with them, or remove that folder/,
    );
    expect(chunkNames('a')).toEqual(kept);
  });

  test('rows of unknown origin, a manifest that does not read: refused', async () => {
    await interrupted('a', 3);
    writeFileSync(place.path('a', 'draws.work', 'manifest.json'), '{ "format": 1, "jo');
    await expect(place.compute(job, 'a', { resume: true })).rejects.toThrow('does not read as what a run noted');
  });

  test('a damaged file is found, and computed again when it is gone', async () => {
    await place.compute(job, 'whole');
    await interrupted('a', 5);
    const damaged = place.path(
      'a',
      'draws.work',
      chunkNames('a')
        .toSorted((a, b) => a.length - b.length)
        .at(-1)!,
    );
    const bytes = readFileSync(damaged);
    bytes[bytes.length - 1]! ^= 1;
    writeFileSync(damaged, bytes);
    await expect(place.compute(job, 'a', { resume: true })).rejects.toThrow(
      `${damaged}: this file is damaged. Remove it, and run again with --resume`,
    );
    expect(existsSync(place.path('a', 'draws.parquet'))).toBe(false);
    rmSync(damaged);
    await place.compute(job, 'a', { resume: true });
    expect(place.bytes('a') === place.bytes('whole')).toBe(true);
  });
});

describe('a folder that cannot be written', () => {
  test('is named; how to go on is said only where something is kept', async () => {
    writeFileSync(place.path('file'), 'precious');
    const run = place.compute(job, 'file');
    await expect(run).rejects.toBeInstanceOf(SimError);
    await expect(run).rejects.toThrow(/file\/draws\.work: .*\. Choose another folder with -o\.$/);
    expect(readFileSync(place.path('file'), 'utf8')).toBe('precious');
  });

  test.skipIf(!existsSync('/proc/self'))('where the system lets no folder be made', async () => {
    await expect(place.compute(job, 'x', { folder: '/proc/perilag-test' })).rejects.toThrow(
      '/proc/perilag-test/draws.work: the output folder cannot be made here.',
    );
  });
});
