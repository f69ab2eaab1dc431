/** The work folder of a table: a manifest, and the rows that are computed, a whole file for each chunk. */
import { existsSync, readdirSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { chunkPieces, readChunk } from './chunkFile.ts';
import { columnsOf, type Range, type Rows } from './job.ts';
import { landBytes, removeAbandoned } from './landing.ts';
import { differences, type Manifest, manifestText, readManifest, shardWords } from './manifest.ts';
import { countRows, withoutOverlaps } from './plan.ts';

export interface Store {
  readonly folder: string;
  readonly manifest: Manifest;
  /** What is there, in order, each row once. */
  chunks(): readonly Range[];
  /** Errors: as the system gives them. */
  land(chunk: Range & Rows): Promise<void>;
  /** Errors: SimError when the file is damaged. */
  read(range: Range): Rows;
  remove(): Promise<void>;
}

const suffix = '.work';

export function workFolder(out: string, table: string): string {
  return join(out, table + suffix);
}

/** Tables whose rows are kept in an output folder. */
export function tablesIn(out: string): readonly string[] {
  const entries = readdirSync(out, { withFileTypes: true });
  const folders = entries.filter((entry) => entry.isDirectory() && entry.name.endsWith(suffix));
  return folders.map(({ name }) => name.slice(0, -suffix.length)).sort();
}

/** What stands in a work folder, or null. Errors: SimError when its manifest cannot be read. */
export function findStore(folder: string): Store | null {
  const manifest = readManifest(join(folder, 'manifest.json'));
  return manifest === null ? null : storeOf(folder, manifest);
}

/**
 * What is there of these rows, null for none. Looks only.
 * Errors: SimError when rows are there and `resume` is false, or they are of another job.
 */
export function findFitting(folder: string, manifest: Manifest, resume: boolean): Store | null {
  const found = findStore(folder);
  if (found === null) {
    if (chunksIn(folder).length > 0) refuseNameless(folder);
    return null;
  }
  if (found.chunks().length === 0) return null;
  refuseOthers(found, manifest);
  if (!resume) refuseFresh(found);
  return found;
}

/**
 * A store for these rows in a folder that is held (`whileHeld`): a new one, or with `resume` the one that is there. Where a run on
 * another computer may be at work there, too, its manifest is never written over.
 * Errors: as `findFitting`, and SimError when that other run is of another job; nothing is lost either way.
 */
export async function openStore(
  folder: string,
  manifest: Manifest,
  { resume, isShared }: { readonly resume: boolean; readonly isShared: boolean },
): Promise<Store> {
  const found = findFitting(folder, manifest, resume) ?? (isShared ? requireSame(folder, manifest) : null);
  await removeAbandoned(folder);
  if (found !== null) return found;
  await landBytes(join(folder, 'manifest.json'), [Buffer.from(manifestText(manifest))]);
  return storeOf(folder, manifest);
}

/** What a run on another computer has begun, without rows so far. */
function requireSame(folder: string, manifest: Manifest): Store {
  const found = findStore(folder);
  if (found === null)
    throw new SimError(
      folder,
      'a run on another computer begins there, or was cut off at its beginning',
      'Try again when it is under way, or remove that folder if it is no more',
    );
  refuseOthers(found, manifest);
  return found;
}

function refuseFresh({ folder, manifest, chunks }: Store): void {
  const rows = `${countRows(chunks())} of ${countRows([manifest.range])} rows`;
  throw new SimError(
    folder,
    `${rows} of an earlier run with the same settings are kept there`,
    'Add --resume to go on with them, or remove that folder to start afresh',
  );
}

function refuseNameless(folder: string): never {
  throw new SimError(
    folder,
    'rows are kept there, but not of which run: manifest.json is missing',
    'Remove that folder',
  );
}

function refuseOthers({ folder, manifest, chunks }: Store, wanted: Manifest): void {
  const [there, now] = [shardWords(manifest.shard), shardWords(wanted.shard)];
  const found = differences(manifest.job, wanted.job);
  const all = there === now ? found : [...found, `${there} there, ${now} now`];
  if (all.length === 0) return;
  throw new SimError(
    folder,
    `${countRows(chunks())} rows of an unfinished run with other settings are kept there (${all.join('; ')})`,
    'Go on with the settings of that run and --resume, choose another folder with -o, or remove that folder to start afresh',
  );
}

function storeOf(folder: string, manifest: Manifest): Store {
  const columns = columnsOf(manifest.job).length;
  const path = ({ from, to }: Range) => join(folder, `rows-${from}-${to}.bin`);
  // Two runs at once, as on two machines, may have cut their chunks elsewhere: rows follow from their numbers, so none is lost.
  const present = [...withoutOverlaps(chunksIn(folder))];
  return {
    folder,
    manifest,
    chunks: () => present.toSorted((a, b) => a.from - b.from),
    land: async (chunk) => {
      await landBytes(path(chunk), chunkPieces(chunk));
      present.push({ from: chunk.from, to: chunk.to });
    },
    read: (range) => readChunk(path(range), range, columns),
    remove: () => rm(folder, { recursive: true, force: true }),
  };
}

function chunksIn(folder: string): Range[] {
  const names = (existsSync(folder) ? readdirSync(folder) : []).map((name) => /^rows-(\d+)-(\d+)\.bin$/.exec(name));
  return names.filter((match) => match !== null).map(([, from, to]) => ({ from: Number(from), to: Number(to) }));
}
