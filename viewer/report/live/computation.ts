/** All that a worker computes with: a file of its own, so that it is made after the worker is set up. */
import { openSession, type Session } from '../../../sim/live/session.ts';
import { fromPortableTree } from '../../../sim/scenario/portableTree.ts';

export function open(tree: unknown, file: string): Session {
  return openSession(fromPortableTree(tree), file);
}
