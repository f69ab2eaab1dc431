import { existsSync } from 'node:fs';
import { mkdir, mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { Interrupted } from '../../../cli/exit.ts';
import { writeFolder } from '../../../cli/output/folder.ts';
import { SimError } from '../../../sim/error.ts';

let home = '';
beforeEach(async () => {
  home = await mkdtemp(join(tmpdir(), 'perilag-folder-'));
});
afterEach(() => rm(home, { recursive: true, force: true }));

const files = [
  { name: 'a.txt', pieces: ['one ', new TextEncoder().encode('two')] },
  { name: 'b.txt', pieces: ['three'] },
];

describe('writeFolder', () => {
  test('makes the folder and its parents, writes the pieces in order, leaves nothing temporary', async () => {
    const folder = join(home, 'deep', 'er');
    await writeFolder(folder, files);
    expect((await readdir(folder)).sort()).toEqual(['a.txt', 'b.txt']);
    expect(await readFile(join(folder, 'a.txt'), 'utf8')).toBe('one two');
  });

  test('replaces its own files and leaves others alone', async () => {
    await writeFile(join(home, 'a.txt'), 'old and longer than the new one');
    await writeFile(join(home, 'mine.txt'), 'precious');
    await writeFolder(home, files);
    expect(await readFile(join(home, 'a.txt'), 'utf8')).toBe('one two');
    expect(await readFile(join(home, 'mine.txt'), 'utf8')).toBe('precious');
  });

  test('a file where the folder should be, or above it, is an error of the input that leaves it alone', async () => {
    const file = join(home, 'plain');
    await writeFile(file, 'precious');
    await expect(writeFolder(file, files)).rejects.toThrow(`${file}: a file stands where the output folder should be.`);
    await expect(writeFolder(join(file, 'sub'), files)).rejects.toThrow('a part of this path is a file, not a folder');
    expect(await readFile(file, 'utf8')).toBe('precious');
  });

  test.skipIf(!existsSync('/proc/self'))(
    'where the system lets no folder be made: an error, and no endless wait',
    async () => {
      await expect(writeFolder('/proc/perilag-test', files)).rejects.toThrow('the output folder cannot be made here');
      await expect(writeFolder('/proc/perilag-test/deep/er', files)).rejects.toThrow(SimError);
    },
  );

  test('folders made on the way to one that cannot be made are removed again', async () => {
    const long = join(home, 'x', 'y', 'z'.repeat(300));
    await expect(writeFolder(long, files)).rejects.toThrow('this path is too long');
    const tooLong = writeFolder(join(home, 'x', 'n'.repeat(200), 'z'.repeat(300)), files);
    await expect(tooLong).rejects.toThrow('this path is too long');
    expect(await readdir(home)).toEqual([]);
  });

  test('two runs that make the same folders at once both finish', async () => {
    const folder = (name: string) => join(home, 'a', 'b', 'c', name);
    await Promise.all(['one', 'two', 'three'].map((name) => writeFolder(folder(name), files)));
    expect((await readdir(join(home, 'a', 'b', 'c'))).sort()).toEqual(['one', 'three', 'two']);
  });

  test('a folder where a file should go is found before anything is replaced', async () => {
    await writeFile(join(home, 'a.txt'), 'old');
    await mkdir(join(home, 'b.txt'));
    await expect(writeFolder(home, files)).rejects.toThrow('a folder stands where this file should go');
    expect(await readFile(join(home, 'a.txt'), 'utf8')).toBe('old');
    expect((await readdir(home)).sort()).toEqual(['a.txt', 'b.txt']);
  });

  test('a disk that fills up half-way leaves neither files nor the folders made for them', async () => {
    function* endless(): Generator<string> {
      yield 'some text';
      throw Object.assign(new Error('write'), { code: 'ENOSPC' });
    }
    const full = [files[0]!, { name: 'c.txt', pieces: endless() as unknown as string[] }];
    const written = writeFolder(join(home, 'x', 'y'), full);
    await expect(written).rejects.toThrow('the disk is full');
    await expect(written).rejects.toBeInstanceOf(SimError);
    expect(await readdir(home)).toEqual([]);
  });

  test('a signal while writing leaves nothing behind', async () => {
    function* interrupting(): Generator<string> {
      yield 'some text';
      process.emit('SIGINT', 'SIGINT');
      yield 'more text';
    }
    const written = writeFolder(join(home, 'x'), [
      { name: 'c.txt', pieces: interrupting() as unknown as string[] },
      files[0]!,
    ]);
    await expect(written).rejects.toBeInstanceOf(Interrupted);
    expect(await readdir(home)).toEqual([]);
    expect(process.listenerCount('SIGINT')).toBe(0);
  });

  test('what a killed run left behind is removed, another live run’s is not', async () => {
    const dead = `.perilag-${hostname()}-999999999`;
    const alive = `.perilag-${hostname()}-${process.ppid}`;
    await mkdir(join(home, dead));
    await writeFile(join(home, dead, 'report.html'), 'half');
    await mkdir(join(home, alive));
    await writeFolder(home, files);
    expect((await readdir(home)).sort()).toEqual([alive, 'a.txt', 'b.txt'].sort());
  });
});
