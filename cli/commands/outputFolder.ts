/** Where the files of a command go. */
import { basename, extname, join } from 'node:path';
import { SimError } from '../../sim/error.ts';

/** Errors: SimError at `-o` for a folder without a name. */
export function requireName(out: string | undefined, mend = 'Name one, e.g. `-o results`, or leave -o out'): void {
  if (out?.trim() === '') throw new SimError('-o', 'the folder has no name', mend);
}

/** `-o` itself, or `out/<file name without extension>/<command>`. Errors: as `requireName`. */
export function outputFolder(file: string, command: string, out: string | undefined): string {
  requireName(out);
  return out ?? join('out', basename(file, extname(file)), command);
}
