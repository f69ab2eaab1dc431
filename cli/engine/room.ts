/** Is there room for a table, in memory and on the disk? Asked before it is computed: an hour later is late to hear of it. */
import { constants } from 'node:buffer';
import { statfs } from 'node:fs/promises';
import { totalmem } from 'node:os';
import { dirname } from 'node:path';
import { getHeapStatistics } from 'node:v8';
import { SimError } from '../../sim/error.ts';
import { grouped } from '../output/progressBar.ts';
import { columnsOf, groupRows, type JobRecord } from './job.ts';

/** Bytes that can be had. */
export interface Machine {
  readonly memory: number;
  /** Of what V8 keeps itself: objects and texts, not the numbers of columns. */
  readonly heap: number;
  readonly longestText: number;
}

type Size = Pick<JobRecord, 'inputs' | 'findings' | 'rows'>;

/** What a command holds at once when it reads its table back. */
export interface Held {
  /** Columns of all rows, as they are read; Infinity for all there are. */
  readonly columns: number;
  /** Bytes of objects and texts for each number of the table. */
  readonly heapANumber: number;
  /** Characters for each number, where all stand in one text. */
  readonly textANumber: number;
}

/** Program, page and what is under way. */
const besides = 300e6;
/** What Parquet's list of contents takes for each column of a row group, while it is written and when it is read. */
const bytesListed = 1500;

export function thisMachine(): Machine {
  const constrained = process.constrainedMemory();
  return {
    memory: constrained > 0 ? Math.min(constrained, totalmem()) : totalmem(),
    heap: getHeapStatistics().heap_size_limit,
    longestText: constants.MAX_STRING_LENGTH,
  };
}

/**
 * Errors: SimError at `where` (an option that says how many rows there are) when this machine cannot hold what the command
 * needs at its end, whatever else runs on it.
 */
export function requireMemory(where: string, job: Size, held: Held, machine: Machine = thisMachine()): void {
  const columns = columnsOf(job).length;
  const numbers = job.rows * columns;
  const heap = Math.ceil(job.rows / groupRows) * columns * bytesListed + numbers * held.heapANumber;
  const memory = besides + 8 * job.rows * Math.min(held.columns, columns) + heap;
  const mend = 'Ask for fewer';
  const rows = `${grouped(job.rows)} rows`;
  if (memory > machine.memory) {
    const what = `${rows} take about ${bytesText(memory)} of memory at the end, and this machine has ${bytesText(machine.memory)}`;
    throw new SimError(where, what, `${mend}, or use a larger machine`);
  }
  if (heap > machine.heap) {
    const what = `what is noted of ${rows} takes about ${bytesText(heap)} of memory, and Node allows ${bytesText(machine.heap)}`;
    const megabytes = Math.ceil((1.2 * heap + besides) / 2 ** 20);
    throw new SimError(where, what, `${mend}, or set NODE_OPTIONS=--max-old-space-size=${megabytes}`);
  }
  if (numbers * held.textANumber > machine.longestText)
    throw new SimError(where, `${rows} of ${columns} columns make a text longer than Node can hold`, mend);
}

/** Of a table that is to be computed, from what is missing of it. */
export interface Need {
  readonly missingRows: number;
  readonly job: Size;
  /** Is the table itself written there, too? */
  readonly isTable: boolean;
}

/**
 * For all tables of a command: their rows are kept until its end.
 * Errors: SimError when the disk cannot even hold the rows; gives a warning where it holds them, but probably not the
 * tables beside them, else null.
 */
export async function requireDisk(folder: string, needs: readonly Need[]): Promise<string | null> {
  const free = await freeBytes(folder);
  if (free === null) return null;
  const sum = (bytesOf: (need: Need, row: number) => number) =>
    needs.reduce((bytes, need) => bytes + bytesOf(need, 8 * columnsOf(need.job).length), 0);
  const rows = sum(({ missingRows }, row) => row * missingRows);
  const all = rows + sum(({ isTable, job }, row) => (isTable ? row * job.rows : 0));
  const missingRows = needs.reduce((count, need) => count + need.missingRows, 0);
  const there = `${bytesText(free)} are free there`;
  const what = `${grouped(missingRows)} rows take ${bytesText(rows)} of disk while they are computed, and ${there}`;
  if (rows > free) throw new SimError(folder, what, 'Make room, choose another folder with -o, or ask for fewer');
  return all > free ? `${folder}: rows and table together may take ${bytesText(all)}, and ${there}` : null;
}

/** Where `folder` will be; null where the system does not say. */
async function freeBytes(folder: string): Promise<number | null> {
  try {
    const { bavail, bsize, blocks } = await statfs(folder);
    return blocks === 0 ? null : bavail * bsize;
  } catch (error) {
    const isMissing = (error as NodeJS.ErrnoException).code === 'ENOENT' && dirname(folder) !== folder;
    return isMissing ? freeBytes(dirname(folder)) : null;
  }
}

/** `3.2 GB`. */
function bytesText(bytes: number): string {
  const [size, unit] = bytes >= 1e9 ? [1e9, 'GB'] : bytes >= 1e6 ? [1e6, 'MB'] : [1e3, 'kB'];
  return `${(bytes / size).toPrecision(3)} ${unit}`;
}
