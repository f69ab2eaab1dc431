/** A scenario whose numbers a reader moves: which there are, and what comes of them. The same code as behind every other result. */
import { SimError } from '../error.ts';
import { type CaseResult, runCase } from '../run.ts';
import type { Dial } from '../scenario/dial.ts';
import { dialsOf } from '../scenario/dials.ts';
import { type EditedCase, editedTree } from '../scenario/edited.ts';
import { ScenarioError } from '../scenario/problem.ts';
import { readTree } from '../scenario/readTree.ts';
import type { Branch } from '../scenario/tree.ts';
import type { Scenario } from '../scenario/types.ts';
import { caseForPage } from './caseForPage.ts';

export interface Session {
  /** Of each case of the file, in its order. */
  readonly dials: readonly { readonly name: string; readonly dials: readonly Dial[] }[];
  /** Errors: SimError where the numbers are no sound planet: key, what was found, how to mend it. */
  run(cases: readonly EditedCase[]): CaseResult[];
  /** The text of a scenario file with these cases: running it gives the same numbers. Errors: as `run`. */
  write(cases: readonly EditedCase[]): string;
}

export function openSession(tree: Branch, file: string): Session {
  const { scenario } = readTree(tree, file);
  const edited = (cases: readonly EditedCase[]): Scenario =>
    withoutPlaces(() => readTree(editedTree(tree, cases), file).scenario);
  return {
    dials: scenario.cases.map((one) => ({ name: one.name, dials: dialsOf(one) })),
    run: (cases) => edited(cases).cases.map((one) => caseForPage(runCase(one))),
    write: (cases) => edited(cases).asUnderstood,
  };
}

/** What was moved stands in no file: its key says where. */
function withoutPlaces<T>(read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof ScenarioError)) throw error;
    const [{ key, what, mend }] = error.problems as [(typeof error.problems)[number]];
    throw new SimError(key, what, mend, error);
  }
}
