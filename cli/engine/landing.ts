/**
 * Files appear whole or not at all, also when the process is killed: written beside, synced, renamed. When the power fails, the last
 * names may be lost, as the folder itself is not synced; what stands under a name is whole.
 */
import { closeSync, fsync, openSync, renameSync, writeSync } from 'node:fs';
import { open, readdir, rename, rm } from 'node:fs/promises';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { isAlive } from '../output/folder.ts';

const fsyncFile = promisify(fsync);

/** `write` makes the file under another name; it stands at `path` only when all of it is on the disk. */
export async function land<T>(path: string, write: (temporary: string) => Promise<T>): Promise<T> {
  const temporary = temporaryName(path);
  try {
    const result = await write(temporary);
    await sync(temporary);
    await rename(temporary, path);
    return result;
  } catch (error) {
    await rm(temporary, { force: true });
    throw error;
  }
}

/**
 * These bytes, one piece after the other. All but the waiting for the disk happens at once: a thread that computes, too, comes
 * round to it seldom.
 */
export async function landBytes(path: string, pieces: readonly Uint8Array[]): Promise<void> {
  const temporary = temporaryName(path);
  try {
    const file = openSync(temporary, 'w');
    try {
      for (const piece of pieces) writeAll(file, piece);
      await fsyncFile(file);
    } finally {
      closeSync(file);
    }
    renameSync(temporary, path);
  } catch (error) {
    await rm(temporary, { force: true });
    throw error;
  }
}

function writeAll(file: number, bytes: Uint8Array): void {
  for (let at = 0; at < bytes.length; ) at += writeSync(file, bytes, at);
}

function temporaryName(path: string): string {
  return `${path}.${hostname()}-${process.pid}.tmp`;
}

async function sync(path: string): Promise<void> {
  const file = await open(path, 'r+');
  try {
    await file.sync();
  } finally {
    await file.close();
  }
}

/** Removes what processes on this machine left in `folder` that were killed while they wrote. */
export async function removeAbandoned(folder: string): Promise<void> {
  const parts = (await readdir(folder)).map((name) => ({ name, match: /^.+\.(.+)-(\d+)\.tmp$/.exec(name) }));
  const ours = parts.filter(({ match }) => match?.[1] === hostname() && !isAlive(Number(match[2])));
  await Promise.all(ours.map(({ name }) => rm(join(folder, name), { force: true })));
}
