/** The worker's side: takes a job's setup once, then ranges of rows, and answers with their numbers. */
import { parentPort, workerData } from 'node:worker_threads';
import { SimError } from '../../sim/error.ts';
import { type Chunk, computeChunk } from './chunk.ts';
import { calculateOf, type Kinds, type Range } from './job.ts';

/** What crosses to a worker when it starts. */
export interface WorkerData {
  readonly kind: string;
  readonly setup: unknown;
  /** Of the columns. */
  readonly names: readonly string[];
}

/** An error, as it crosses between threads; `mend` only of a SimError. */
export interface Fault {
  readonly message: string;
  readonly stack: string;
  readonly parts: { readonly where: string; readonly what: string; readonly mend: string } | null;
}

export type Answer = { readonly chunk: Chunk } | { readonly fault: Fault };

/** Answers this thread's owner until it lets go. */
export async function serve(kinds: Kinds): Promise<void> {
  const port = parentPort!;
  const { kind, setup, names } = workerData as WorkerData;
  const calculate = calculateOf({ kind, setup }, kinds);
  calculate.catch(() => undefined); // told with the first answer
  port.on('message', async (range: Range) => {
    try {
      const chunk = computeChunk(await calculate, range, names);
      const buffers = chunk.columns.map(({ buffer }) => buffer as ArrayBuffer);
      port.postMessage({ chunk } satisfies Answer, [...new Set(buffers)]);
    } catch (error) {
      port.postMessage({ fault: faultOf(error) } satisfies Answer);
    }
  });
}

function faultOf(error: unknown): Fault {
  if (!(error instanceof Error)) return { message: String(error), stack: String(error), parts: null };
  const { message, stack = message } = error;
  const parts = error instanceof SimError ? { where: error.where, what: error.what, mend: error.mend } : null;
  return { message, stack, parts };
}

/** The error again, on the other side. */
export function errorOf({ message, stack, parts }: Fault): Error {
  if (parts !== null) return new SimError(parts.where, parts.what, parts.mend);
  return Object.assign(new Error(message), { stack });
}
