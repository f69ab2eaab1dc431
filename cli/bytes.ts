/** Files that a user names: their bytes and their text, or why not. */
import { readFileSync } from 'node:fs';
import { SimError } from '../sim/error.ts';

/** `file` as the user named it, `wanted` what it should be. Errors: SimError when it cannot be read. */
export function bytesOf(file: string, path: string, wanted: string): Uint8Array {
  try {
    return readFileSync(path);
  } catch (error) {
    throw new SimError(file, readingFault(error as NodeJS.ErrnoException, wanted), 'Check the path', error);
  }
}

function readingFault(error: NodeJS.ErrnoException, wanted: string): string {
  if (error.code === 'ENOENT') return 'there is no such file';
  if (error.code === 'EISDIR') return `this is a folder, not ${wanted}`;
  if (error.code === 'EACCES') return 'the file may not be read';
  return `the file cannot be read (${error.code ?? error.message})`;
}

/** Errors: SimError unless the bytes are UTF-8. */
export function textOf(bytes: Uint8Array, file: string, mend: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    throw new SimError(file, 'this is not UTF-8 text', mend, error);
  }
}
