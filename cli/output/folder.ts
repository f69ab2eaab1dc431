/**
 * Writes the files of a run so that they appear whole or not at all: into a temporary folder inside the output folder
 * (so on the same disk), and then each renamed to its place. Other files in the output folder are left alone.
 */
import { closeSync, openSync, writeSync } from 'node:fs';
import { mkdir, readdir, rename, rm, rmdir, stat } from 'node:fs/promises';
import { hostname } from 'node:os';
import { dirname, join } from 'node:path';
import { setImmediate } from 'node:timers/promises';
import { SimError } from '../../sim/error.ts';
import { interruptible } from '../interrupt.ts';
import { makeFolder } from './makeFolder.ts';
import { writingFault } from './writingFault.ts';

/** A file to write: its name in the folder, and its pieces one after the other. */
export interface PiecedFile {
  readonly name: string;
  readonly pieces: readonly (string | Uint8Array)[];
}

/** A file of a format that writes itself, to a path where nothing stands yet; it calls `checkpoint` where it may stop. */
export interface SelfWritingFile {
  readonly name: string;
  write(path: string, checkpoint: () => void): Promise<void>;
}

export type OutputFile = PiecedFile | SelfWritingFile;

/** Files that are there already, on the same disk, and go to their places with the others. */
export interface MadeBefore {
  /** Name in the folder, and where the file is now. */
  readonly files: readonly { readonly name: string; readonly path: string }[];
  /** Of an earlier run, where this one has no such file. */
  readonly removed: readonly string[];
}

const stagePrefix = '.perilag-';

/**
 * `folder` is an absolute path; it and its parents are made where missing.
 * Errors: SimError when the folder cannot be written, Interrupted on a signal; either way nothing of this run is left.
 */
export async function writeFolder(
  folder: string,
  files: readonly OutputFile[],
  before: MadeBefore = { files: [], removed: [] },
): Promise<void> {
  await interruptible(async (checkpoint) => {
    const firstMade = await attempt(folder, () => makeFolder(folder));
    const stage = join(folder, `${stagePrefix}${hostname()}-${process.pid}`);
    try {
      await attempt(folder, () => fillStage(stage, files, checkpoint));
      const made = files.map(({ name }) => ({ name, path: join(stage, name) }));
      await attempt(folder, () => moveInto(folder, [...before.files, ...made], before.removed));
    } catch (error) {
      await rm(stage, { recursive: true, force: true });
      if (firstMade !== undefined) await removeEmpty(folder, firstMade);
      throw error;
    }
    await rm(stage, { recursive: true, force: true });
    await removeAbandonedStages(folder);
  });
}

async function fillStage(stage: string, files: readonly OutputFile[], checkpoint: () => void): Promise<void> {
  await rm(stage, { recursive: true, force: true });
  await mkdir(stage);
  for (const file of files) {
    const path = join(stage, file.name);
    if ('write' in file) await file.write(path, checkpoint);
    else writeWhole(path, file.pieces);
    await setImmediate(); // a signal is heard between files
    checkpoint();
  }
}

/** All at once: for a few megabytes the thread pool costs more than it saves. */
function writeWhole(path: string, pieces: PiecedFile['pieces']): void {
  const file = openSync(path, 'wx');
  try {
    for (const piece of pieces) {
      const bytes = typeof piece === 'string' ? Buffer.from(piece) : piece;
      for (let at = 0; at < bytes.length; ) at += writeSync(file, bytes, at);
    }
  } finally {
    closeSync(file);
  }
}

async function moveInto(folder: string, files: MadeBefore['files'], removed: readonly string[]): Promise<void> {
  for (const { name } of files) await refuseFolder(join(folder, name));
  for (const { name, path } of files) await rename(path, join(folder, name));
  for (const name of removed) await rm(join(folder, name), { force: true });
}

/** A folder where a file should go would stop the renames half-way: found before the first. */
async function refuseFolder(path: string): Promise<void> {
  const found = await stat(path).catch(() => null);
  if (found?.isDirectory())
    throw new SimError(
      path,
      'a folder stands where this file should go',
      'Move it away, or choose another folder with -o',
    );
}

/** From `folder` up to the first one that this run made. */
export async function removeEmpty(folder: string, firstMade: string): Promise<void> {
  for (let path = folder; path.length >= firstMade.length; path = dirname(path)) {
    await rmdir(path).catch(() => undefined);
  }
}

/** What a killed run on this machine left behind. */
async function removeAbandonedStages(folder: string): Promise<void> {
  const ours = `${stagePrefix}${hostname()}-`;
  const stages = (await readdir(folder)).filter((name) => name.startsWith(ours));
  const dead = stages.filter((name) => !isAlive(Number(name.slice(ours.length))));
  await Promise.all(dead.map((name) => rm(join(folder, name), { recursive: true, force: true })));
}

/** Does a process with this number run on this machine? */
export function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code !== 'ESRCH';
  }
}

async function attempt<T>(folder: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    throw writingFault(folder, error);
  }
}
