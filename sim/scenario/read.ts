/** Text of a scenario file → Scenario, or every problem of the file at once. */
import { readDocument } from './document.ts';
import { ScenarioError } from './problem.ts';
import { type ReadTree, readTree } from './readTree.ts';
import type { Scenario } from './types.ts';

/**
 * Reads a scenario: YAML 1.2 or JSON.
 * Shape:  text and the name of its file (for messages only) in, every case as a World out.
 * Units:  SI and radians inside; the user's own number text stays beside it.
 * Errors: ScenarioError with all problems of the file, sorted by place.
 */
export function readScenario(text: string, file: string): Scenario {
  return readWithTrees(text, file).scenario;
}

/** The same, with the tree of each case, its defaults still open, for what varies its numbers. */
export function readWithTrees(text: string, file: string): ReadTree {
  const { root, problems } = readDocument(text, file);
  if (!root) throw new ScenarioError(problems);
  return readTree(root, file, problems);
}
