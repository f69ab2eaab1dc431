/**
 * One run at a time in a work folder. Each leaves a file there by its own name, then looks for others: of two that begin at the
 * same moment at least one sees the other, and nobody ever removes a file of a run that lives, as every name is that of one process.
 */
import { readdirSync } from 'node:fs';
import { rm, writeFile } from 'node:fs/promises';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { isAlive } from '../output/folder.ts';
import { makeFolder } from '../output/makeFolder.ts';

interface Holder {
  /** Path of its file. */
  readonly path: string;
  readonly host: string;
  readonly pid: number;
}

/**
 * Calls `work` while `folder` is held, made where it is missing. Whether a run on another computer lives cannot be known from here (a
 * node that died is a usual reason to go on): it is told by `warn`, `work` hears that the folder may be shared, and its file stays.
 * Errors: SimError when another process of this computer holds it.
 */
export async function whileHeld<T>(
  folder: string,
  warn: (text: string) => void,
  work: (isShared: boolean) => Promise<T>,
): Promise<T> {
  await makeFolder(folder);
  const own = join(folder, `lock.${hostname()}-${process.pid}`);
  await writeFile(own, '');
  try {
    refuseHeld(folder);
    await removeDead(folder);
    const others = holdersOf(folder).filter(({ host }) => host !== hostname());
    for (const { path, host } of others)
      warn(
        `${path}: a run on ${host} works there, too, or was cut off. If it works, stop one of the two; else remove that file`,
      );
    return await work(others.length > 0);
  } finally {
    await rm(own, { force: true });
  }
}

/** Errors: SimError when another process of this computer holds `folder`. */
export function refuseHeld(folder: string): void {
  const other = holdersOf(folder).find(({ host, pid }) => host === hostname() && pid !== process.pid && isAlive(pid));
  if (other === undefined) return;
  throw new SimError(
    folder,
    `another run, process ${other.pid}, is at work there`,
    `Wait for its end or stop it, or choose another folder with -o. (If no run has that number, remove ${other.path})`,
  );
}

async function removeDead(folder: string): Promise<void> {
  const dead = holdersOf(folder).filter(({ host, pid }) => host === hostname() && !isAlive(pid));
  await Promise.all(dead.map(({ path }) => rm(path, { force: true })));
}

/** None where there is no such folder. */
function holdersOf(folder: string): readonly Holder[] {
  const matches = namesIn(folder).map((name) => /^lock\.(.+)-(\d+)$/.exec(name));
  return matches
    .filter((match) => match !== null)
    .map(([name, host, pid]) => ({ path: join(folder, name), host: host!, pid: Number(pid) }));
}

function namesIn(folder: string): readonly string[] {
  try {
    return readdirSync(folder);
  } catch (error) {
    if (['ENOENT', 'ENOTDIR'].includes((error as NodeJS.ErrnoException).code ?? '')) return [];
    throw error;
  }
}
