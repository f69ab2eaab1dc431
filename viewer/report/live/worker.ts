/** The worker's side: opens the scenario once, then computes what it is asked for, one request after another. */
import * as z from 'zod';
import { SimError } from '../../../sim/error.ts';
import type { Session } from '../../../sim/live/session.ts';
import type { CaseResult } from '../../../sim/run.ts';
import type { Answer, Request } from './protocol.ts';

/** Of a dedicated worker's global scope, which the page's own types do not know. */
interface Scope {
  onmessage: ((event: MessageEvent<Request>) => void) | null;
  postMessage(answer: Answer, transfer?: Transferable[]): void;
}

const scope = globalThis as unknown as Scope;
/** The page's policy forbids to compile code, here too: to be said before any schema is made. */
z.config({ jitless: true });
const computation = import('./computation.ts');

let session: Promise<Session> | null = null;

scope.onmessage = async ({ data }) => {
  try {
    if (data.kind === 'open') {
      session = computation.then(({ open }) => open(data.tree, data.file));
      scope.postMessage({ kind: 'opened', cases: (await session).dials });
    } else answer(data, await session!);
  } catch (error) {
    const isTheirs = error instanceof SimError;
    const message = error instanceof Error ? error.message : String(error);
    const id = data.kind === 'open' ? 0 : data.id;
    scope.postMessage({ kind: 'failed', id, where: isTheirs ? error.where : null, message });
  }
};

function answer({ kind, id, cases }: Exclude<Request, { kind: 'open' }>, opened: Session): void {
  if (kind === 'write') {
    scope.postMessage({ kind: 'written', id, text: opened.write(cases) });
    return;
  }
  const began = performance.now();
  const results = opened.run(cases);
  const seconds = (performance.now() - began) / 1000;
  scope.postMessage({ kind: 'ran', id, cases: results, seconds }, buffersOf(results));
}

function buffersOf(results: readonly CaseResult[]): ArrayBuffer[] {
  const datasets = results.flatMap(({ states }) => states.map(({ dataset }) => dataset));
  const buffers = datasets.flatMap(({ variables }) => Object.values(variables).map(({ data }) => data.buffer));
  return [...new Set(buffers as ArrayBuffer[])];
}
