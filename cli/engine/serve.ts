/** The worker's side: is told of setups and jobs, then of ranges of rows, and answers with their numbers. */
import { parentPort } from 'node:worker_threads';
import { SimError } from '../../sim/error.ts';
import { type Chunk, computeChunk } from './chunk.ts';
import { type Calculate, calculateOf, type Kinds, type Range } from './job.ts';

/** What crosses to a worker. Jobs and setups have numbers, so that those which several jobs share cross once. */
export type Order =
  | { readonly setup: number; readonly data: unknown }
  | { readonly job: number; readonly kind: string; readonly names: readonly string[]; readonly setup: number }
  | { readonly ticket: number; readonly job: number; readonly range: Range };

/** An error, as it crosses between threads; `mend` only of a SimError. */
export interface Fault {
  readonly message: string;
  readonly stack: string;
  readonly parts: { readonly where: string; readonly what: string; readonly mend: string } | null;
}

export type Answer = { readonly ticket: number } & ({ readonly chunk: Chunk } | { readonly fault: Fault });

interface Known {
  readonly calculate: Promise<Calculate>;
  /** Of the columns. */
  readonly names: readonly string[];
}

/** Answers this thread's owner until it lets go. */
export function serve(kinds: Kinds): void {
  const port = parentPort!;
  const setups = new Map<number, unknown>();
  const jobs = new Map<number, Known>();
  port.on('message', async (order: Order) => {
    if ('data' in order) setups.set(order.setup, order.data);
    else if ('kind' in order) jobs.set(order.job, knownOf(order.kind, setups.get(order.setup), order.names, kinds));
    else {
      const { ticket, job, range } = order;
      try {
        const { calculate, names } = jobs.get(job)!;
        const chunk = computeChunk(await calculate, range, names);
        const buffers = chunk.columns.map(({ buffer }) => buffer as ArrayBuffer);
        port.postMessage({ ticket, chunk } satisfies Answer, [...new Set(buffers)]);
      } catch (error) {
        port.postMessage({ ticket, fault: faultOf(error) } satisfies Answer);
      }
    }
  });
}

function knownOf(kind: string, setup: unknown, names: readonly string[], kinds: Kinds): Known {
  const calculate = calculateOf({ kind, setup }, kinds);
  calculate.catch(() => undefined); // told with the first answer
  return { calculate, names };
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
