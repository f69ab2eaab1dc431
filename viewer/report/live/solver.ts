/**
 * The page's side of the workers. The latest request counts: one that waits is forgotten for a later one, a worker that has long
 * been at an old one is stopped and started anew, and an answer that a later one overtook is dropped.
 */
import type { CaseResult } from '../../../sim/run.ts';
import type { EditedCase } from '../../../sim/scenario/edited.ts';
import type { Answer, CaseDials, Request } from './protocol.ts';

export interface Fault {
  /** A key of the scenario; null where it is our own fault. */
  readonly where: string | null;
  readonly message: string;
}

export interface SolverEvents {
  /** Once, when the scenario can be moved. */
  opened(cases: readonly CaseDials[]): void;
  ran(cases: readonly CaseResult[], requested: readonly EditedCase[], seconds: number): void;
  failed(fault: Fault, requested: readonly EditedCase[]): void;
  /** Nothing can be moved: why. */
  unavailable(why: string): void;
}

export interface Solver {
  run(cases: readonly EditedCase[]): void;
  /** The scenario file with these cases. Errors: Error with the message for the reader. */
  write(cases: readonly EditedCase[]): Promise<string>;
  /** Nothing that was asked for before is wanted any more. */
  forget(): void;
}

const cannotStart = 'This browser lets no page from disk compute';

/** A worker that has been at a stale request for so long is not waited for. */
const patience = 250;
const hands = 2;

interface Hand {
  worker: Worker;
  /** What it is at. */
  job: { readonly id: number; readonly cases: readonly EditedCase[]; readonly since: number } | null;
}

export function startSolver(tree: unknown, file: string, events: SolverEvents): Solver {
  const script = URL.createObjectURL(
    new Blob([document.getElementById('page')?.textContent ?? ''], { type: 'text/javascript' }),
  );
  const team: Hand[] = [];
  const writing = new Map<number, { done(text: string): void; failed(error: Error): void }>();
  let ids = 0;
  let shown = 0;
  let waiting: { readonly id: number; readonly cases: readonly EditedCase[] } | null = null;
  let isOpen = false;

  function start(): Worker {
    const worker = new Worker(script);
    worker.onmessage = ({ data }: MessageEvent<Answer>) => hear(worker, data);
    worker.onerror = ({ message }) => {
      if (isOpen) giveUp(worker, message);
      else events.unavailable(cannotStart);
    };
    post(worker, { kind: 'open', tree, file });
    return worker;
  }

  function hear(worker: Worker, answer: Answer): void {
    if (answer.kind === 'opened') {
      if (isOpen) return;
      isOpen = true;
      events.opened(answer.cases);
      return;
    }
    if (answer.kind === 'failed' && answer.id === 0) {
      if (!isOpen) events.unavailable(answer.message);
      return;
    }
    const written = writing.get(answer.id);
    if (written !== undefined) {
      writing.delete(answer.id);
      if (answer.kind === 'written') written.done(answer.text);
      else if (answer.kind === 'failed') written.failed(new Error(answer.message));
      return;
    }
    const hand = team.find((one) => one.worker === worker);
    const job = hand?.job;
    if (!hand || !job || job.id !== answer.id) return;
    hand.job = null;
    deal();
    if (answer.id <= shown) return;
    shown = answer.id;
    if (answer.kind === 'ran') events.ran(answer.cases, job.cases, answer.seconds);
    else if (answer.kind === 'failed') events.failed(answer, job.cases);
  }

  /** A worker that has died takes nothing with it but the request that it was at. */
  function giveUp(worker: Worker, message: string): void {
    const hand = team.find((one) => one.worker === worker);
    if (!hand) return;
    const { job } = hand;
    worker.terminate();
    hand.worker = start();
    hand.job = null;
    if (job) events.failed({ where: null, message: message || 'The computation ended without a word.' }, job.cases);
    deal();
  }

  /** Gives what waits to a free hand, a new one, or one that has been at something old for too long. */
  function deal(): void {
    if (waiting === null) return;
    const hand = team.find(({ job }) => job === null) ?? (team.length < hands ? hire() : replaced());
    if (hand === null) return;
    hand.job = { ...waiting, since: performance.now() };
    post(hand.worker, { kind: 'run', ...waiting });
    waiting = null;
  }

  function hire(): Hand {
    const hand = { worker: start(), job: null };
    team.push(hand);
    return hand;
  }

  function replaced(): Hand | null {
    const [oldest] = team.toSorted((a, b) => a.job!.since - b.job!.since);
    const left = patience - (performance.now() - oldest!.job!.since);
    if (left > 0) {
      setTimeout(deal, left);
      return null;
    }
    oldest!.worker.terminate();
    oldest!.worker = start();
    oldest!.job = null;
    return oldest!;
  }

  try {
    hire();
  } catch {
    events.unavailable(cannotStart);
  }
  return {
    run(cases) {
      waiting = { id: ++ids, cases };
      deal();
    },
    write(cases) {
      const id = ++ids;
      return new Promise((done, failed) => {
        writing.set(id, { done, failed });
        const hand = team.find(({ job }) => job === null) ?? team[0]!;
        post(hand.worker, { kind: 'write', id, cases });
      });
    },
    forget() {
      waiting = null;
      shown = ++ids;
    },
  };
}

function post(worker: Worker, request: Request): void {
  worker.postMessage(request);
}
