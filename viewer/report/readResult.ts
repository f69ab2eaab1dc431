/** The run that the page carries. Pure: the text of the data block in, a RunResult or a message for the reader out. */
import { fromPortable } from '../../sim/dataset/portable.ts';
import type { RunResult } from '../../sim/run.ts';

/** What the page says instead of a report. */
export class PageError extends Error {
  override readonly name = 'PageError';
}

const needed = ['time', 'meanAnomaly', 'trueAnomaly', 'distance', 'instellation', 'temperature', 'steadyTemperature'];

/** Errors: PageError when the block is empty, is not JSON, or holds no run that this page can show. */
export function readResult(text: string): RunResult {
  if (text.trim() === '') {
    throw new PageError('This page holds no run yet. `perilag run` writes a copy of it with the results inside.');
  }
  const { result } = parsed(text);
  if (!isRun(result)) throw damaged('the data are not a run');
  for (const { name, states } of result.cases) {
    for (const { dataset } of states) {
      const lengths = needed.map((variable) => dataset?.variables?.[variable]?.data?.length ?? 0);
      if (lengths.some((length) => length < 2 || length !== lengths[0]))
        throw damaged(`numbers of “${name}” are missing`);
    }
  }
  return result;
}

function parsed(text: string): { result?: unknown } {
  try {
    return fromPortable<{ result?: unknown } | null>(JSON.parse(text)) ?? {};
  } catch {
    throw damaged('the data cannot be read');
  }
}

function isRun(value: unknown): value is RunResult {
  const run = value as Partial<RunResult> | null | undefined;
  if (typeof run !== 'object' || run === null || typeof run.scenario !== 'object' || run.program === undefined)
    return false;
  const { cases } = run;
  if (!Array.isArray(cases) || cases.length === 0) return false;
  return cases.every((one) => typeof one?.name === 'string' && Array.isArray(one.states) && one.states.length > 0);
}

function damaged(what: string): PageError {
  return new PageError(`This report is damaged: ${what}. Run the scenario again to write a new one.`);
}
