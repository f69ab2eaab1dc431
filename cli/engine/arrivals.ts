/** Rows on their way from workers to the table: a row group is handed on when all of it is there, while others are computed. */
import type { Chunk } from './chunk.ts';
import { groupRows, type Range } from './job.ts';
import { missing } from './plan.ts';
import type { Store } from './store.ts';
import type { Piece, Source } from './table.ts';

export interface Arrivals extends Source {
  /** A chunk stands in the store now. */
  landed(chunk: Chunk): void;
  /** No more will come. */
  fail(error: unknown): void;
}

/** Chunks of so many groups from the one that is waited for are kept as they came; others are read from the store. */
const groupsKept = 2;

interface Waiting {
  readonly range: Range;
  readonly resolve: (pieces: readonly Piece[]) => void;
  readonly reject: (error: unknown) => void;
}

/** Two functions, each with a scope of its own: in one scope what reads from the store would hold the chunk as well. */
function held(chunk: Chunk): Piece {
  return { from: chunk.from, to: chunk.to, read: () => chunk };
}

function stored(store: Store, range: Range): Piece {
  return { ...range, read: () => store.read(range) };
}

/** Of a store for all rows of a table; what is there already counts. */
export function arrivalsOf(store: Store): Arrivals {
  const groups = new Map<number, Piece[]>();
  const groupOf = ({ from }: Range) => Math.floor(from / groupRows);
  const add = (piece: Piece) => {
    const group = groupOf(piece);
    const pieces = groups.get(group);
    if (pieces === undefined) groups.set(group, [piece]);
    else pieces.push(piece);
  };
  for (const range of store.chunks()) add(stored(store, range));
  let next = 0;
  let waiting: Waiting | null = null;
  let failure: { readonly error: unknown } | null = null;

  const look = () => {
    if (waiting === null) return;
    const { range, resolve } = waiting;
    const pieces = groups.get(groupOf(range)) ?? [];
    if (missing(range, pieces).length > 0) return;
    waiting = null;
    groups.delete(groupOf(range));
    resolve(pieces.sort((a, b) => a.from - b.from));
  };
  return {
    group: (range) =>
      new Promise((resolve, reject) => {
        if (failure !== null) return reject(failure.error);
        next = groupOf(range);
        waiting = { range, resolve, reject };
        look();
      }),
    landed: (chunk) => {
      const { from, to } = chunk;
      const isNear = groupOf(chunk) < next + groupsKept;
      add(isNear ? held(chunk) : stored(store, { from, to }));
      look();
    },
    fail: (error) => {
      failure = { error };
      waiting?.reject(error);
      waiting = null;
    },
  };
}
