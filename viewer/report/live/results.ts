/** Results of cases as a reader has moved them: the last ones are kept for the way back. */
import type { CaseResult, RunResult } from '../../../sim/run.ts';
import type { EditedCase } from '../../../sim/scenario/edited.ts';

const mostKept = 64;

export interface Results {
  keep(one: EditedCase, result: CaseResult): void;
  of(one: EditedCase): CaseResult | undefined;
  /** The run with these cases; null while one of them is not computed. */
  whole(cases: readonly EditedCase[]): RunResult | null;
}

export function resultsOf(original: RunResult): Results {
  const kept = new Map<string, CaseResult>();
  const names = original.cases.map(({ name }) => name);
  const find = (one: EditedCase): CaseResult | undefined => {
    const isOwn = one.edits.length === 0 && one.name === one.from;
    return isOwn ? original.cases.find(({ name }) => name === one.name) : kept.get(JSON.stringify(one));
  };
  return {
    keep(one, result) {
      kept.set(JSON.stringify(one), result);
      const [oldest] = kept.keys();
      if (kept.size > mostKept && oldest !== undefined) kept.delete(oldest);
    },
    of: find,
    whole(cases) {
      const isOriginal = cases.length === names.length && cases.every(({ edits }) => edits.length === 0);
      if (isOriginal) return original;
      const found = cases.map(find);
      return found.every((one) => one !== undefined) ? { ...original, cases: found } : null;
    },
  };
}
