/** Makes an output folder and those above it. */
import { mkdir, rmdir, stat } from 'node:fs/promises';
import { dirname } from 'node:path';

/**
 * Makes `folder` and what is missing above it, one by one: gives the first that was made, undefined when it stood already.
 * (Node's own recursive mkdir never returns where the system refuses a folder although the one above it is there, as in /proc.)
 */
export async function makeFolder(folder: string): Promise<string | undefined> {
  const missing: string[] = [];
  for (let path = folder; !(await isFolder(path)); path = dirname(path)) missing.unshift(path);
  const made: string[] = [];
  try {
    for (const path of missing) if (await makeOne(path)) made.push(path);
  } catch (error) {
    for (const path of made.toReversed()) await rmdir(path).catch(() => undefined);
    throw error;
  }
  return made[0];
}

/** False where nothing stands. Errors: EEXIST for a file. */
async function isFolder(path: string): Promise<boolean> {
  const found = await stat(path).catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return null;
    throw error;
  });
  if (found === null || found.isDirectory()) return found !== null;
  throw Object.assign(new Error('a file stands there'), { code: 'EEXIST' });
}

/** False when another run has made it in the meantime. */
async function makeOne(path: string): Promise<boolean> {
  try {
    await mkdir(path);
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST' && (await isFolder(path))) return false;
    throw error;
  }
}
