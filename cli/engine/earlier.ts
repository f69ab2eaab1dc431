/** Tables of an earlier run that lie where a run has finished which made none of that name: a reader would take them for its own. */
import { rm } from 'node:fs/promises';
import { basename } from 'node:path';
import { SimError } from '../../sim/error.ts';
import type { Settings } from './job.ts';
import { settingsApart } from './manifest.ts';
import { countRows } from './plan.ts';
import { findStore, workFolder } from './store.ts';
import { tablePaths } from './table.ts';

export interface Earlier {
  /** Names in the folder of what was of other settings, and is gone. */
  readonly removed: readonly string[];
  /** Work folders with rows of these very settings: they can be gone on with. */
  readonly unfinished: readonly string[];
}

/**
 * Looks at `tables` in `folder`, none of which the finished run made. What it cannot read as its own kind of file, and tables
 * of the same settings, which belong to the run although it did not make them, stay.
 */
export async function clearEarlier(folder: string, tables: readonly string[], settings: Settings): Promise<Earlier> {
  const removed: string[] = [];
  const unfinished: string[] = [];
  const remove = async (path: string) => {
    await rm(path, { recursive: true, force: true });
    removed.push(basename(path));
  };
  for (const table of tables) {
    const { path, failedPath } = tablePaths(folder, table);
    const written = await settingsOf(path);
    if (written !== null && isOther(written, settings)) {
      await remove(path);
      await rm(failedPath, { force: true });
    }
    const store = storeAt(workFolder(folder, table));
    if (store === null) continue;
    if (isOther(store.manifest.job.settings, settings)) await remove(store.folder);
    else if (countRows(store.chunks()) > 0) unfinished.push(basename(store.folder));
  }
  return { removed, unfinished };
}

function isOther(there: Settings, now: Settings): boolean {
  return settingsApart({ settings: there }, { settings: now }, ['there', 'now']).length > 0;
}

/** Null where there is no file, or none of ours. */
async function settingsOf(path: string): Promise<Settings | null> {
  const { openParquet } = await import('../output/parquetReader.ts');
  const file = await openParquet(path).catch(() => null);
  if (file === null) return null;
  await file.close();
  const { fingerprint, settings } = file.metadata;
  if (fingerprint === undefined || settings === undefined) return null;
  try {
    return JSON.parse(settings) as Settings;
  } catch {
    return null; // of a file that another program wrote under our words
  }
}

/** Null where there is none, or one whose manifest cannot be read. */
function storeAt(folder: string) {
  try {
    return findStore(folder);
  } catch (error) {
    if (error instanceof SimError) return null;
    throw error;
  }
}
