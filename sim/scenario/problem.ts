/** What is wrong with a file, all at once. */
import { SimError, sentence } from '../error.ts';
import type { Problem } from './types.ts';

/** `FILE:LINE:COL: key: what was found. How to mend it.` */
export function problemText({ file, line, column, key, what, mend }: Problem): string {
  return `${file}:${line}:${column}: ${key}: ${what}. ${sentence(mend)}`;
}

/** Every problem of a scenario file, in the order of the file; its message has one line for each. */
export class ScenarioError extends SimError {
  override readonly name = 'ScenarioError';
  readonly problems: readonly Problem[];

  constructor(problems: readonly Problem[]) {
    const { file, line, column, key, what, mend } = problems[0]!;
    super(`${file}:${line}:${column}: ${key}`, what, mend);
    this.problems = problems;
    this.message = problems.map(problemText).join('\n');
  }
}
