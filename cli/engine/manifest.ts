/** What rows are kept in a work folder: of which job, and of which of its rows. */
import { readFileSync } from 'node:fs';
import { SimError } from '../../sim/error.ts';
import { jsonText } from '../output/json.ts';
import { fingerprintOf, type JobRecord, type Range } from './job.ts';
import type { Shard } from './plan.ts';

export interface Manifest {
  readonly table: string;
  readonly job: JobRecord;
  readonly fingerprint: string;
  /** The rows that are computed here: all, or those of one shard. */
  readonly range: Range;
  readonly shard: Shard | null;
}

const formatNumber = 1;

export function manifestText(manifest: Manifest): string {
  return `${jsonText({ format: formatNumber, ...manifest }, 'manifest')}\n`;
}

/** Null when there is none. Errors: SimError when the file is not one of these; otherwise as the system gives them. */
export function readManifest(path: string): Manifest | null {
  const text = textOf(path);
  if (text === null) return null;
  try {
    const { format, ...manifest } = JSON.parse(text);
    if (format !== formatNumber || fingerprintOf(manifest.job) !== manifest.fingerprint)
      throw new SyntaxError('format');
    return manifest;
  } catch (error) {
    throw new SimError(
      path,
      'this does not read as what a run noted about its rows',
      'Remove the folder it is in, and compute its rows again',
      error,
    );
  }
}

function textOf(path: string): string | null {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if (['ENOENT', 'ENOTDIR'].includes((error as NodeJS.ErrnoException).code ?? '')) return null;
    throw error;
  }
}

/** In which ways the second job is another one than the first, in words. None: the same bytes. */
export function differences(
  first: JobRecord,
  second: JobRecord,
  words: readonly [string, string] = ['there', 'now'],
): readonly string[] {
  const found = [...apart('kind', first.kind, second.kind, words), ...settingsApart(first, second, words)];
  if (found.length > 0 || fingerprintOf(first) === fingerprintOf(second)) return found;
  return first.rows === second.rows ? ['other columns'] : apart('rows', first.rows, second.rows, words);
}

/** In which settings two jobs differ, whatever they compute from them: the tables of one run have the same. */
export function settingsApart(
  first: Pick<JobRecord, 'settings'>,
  second: Pick<JobRecord, 'settings'>,
  words: readonly [string, string],
): readonly string[] {
  const names = [...new Set([...Object.keys(first.settings), ...Object.keys(second.settings)])];
  return names.flatMap((name) => apart(name, first.settings[name], second.settings[name], words));
}

function apart(name: string, a: unknown, b: unknown, words: readonly [string, string]): readonly string[] {
  return a === b ? [] : [`${name}: ${shown(a)} ${words[0]}, ${shown(b)} ${words[1]}`];
}

/** Checksums are told by their beginning. */
function shown(value: unknown): string {
  if (value === undefined || value === null) return 'none';
  return /^[0-9a-f]{64}$/.test(String(value)) ? `${String(value).slice(0, 8)}…` : String(value);
}

export function shardWords(shard: Shard | null): string {
  return shard === null ? 'the whole' : `shard ${shard.index}/${shard.count}`;
}
