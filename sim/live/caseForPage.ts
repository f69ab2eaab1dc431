/** A case as a page carries it, and as a worker hands it to one. */
import { forPage } from '../dataset/forPage.ts';
import type { CaseResult } from '../run.ts';

export function caseForPage(result: CaseResult): CaseResult {
  return { ...result, states: result.states.map((state) => ({ ...state, dataset: forPage(state.dataset) })) };
}
