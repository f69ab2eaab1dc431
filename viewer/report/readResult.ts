/** The run that the page carries. Pure: the text of the data block in, a RunResult or a message for the reader out. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import { fromPortableLazily } from '../../sim/dataset/portable.ts';
import type { RunResult } from '../../sim/run.ts';

/** What the page says instead of a report. */
export class PageError extends Error {
  override readonly name = 'PageError';
}

const needed = ['time', 'meanAnomaly', 'trueAnomaly', 'distance', 'instellation', 'temperature', 'steadyTemperature'];
const neededByLatitude = ['bandTemperature', 'bandInsolation', 'bandIceFraction'];

/** Errors: PageError when the block is empty, is not JSON, or holds no run that this page can show. */
export function readResult(text: string): RunResult {
  return checkedRun(parsed(text).result);
}

/** Errors: PageError as for `readResult`. */
export function checkedRun(result: unknown): RunResult {
  if (!isRun(result)) throw damaged('the data are not a run');
  for (const { name, states } of result.cases) {
    if (!states.every(({ dataset }) => isWhole(dataset))) throw damaged(`numbers of “${name}” are missing`);
  }
  return result;
}

/** Every row of what the page shows, and every latitude where there are any. */
function isWhole(dataset: Dataset | undefined): boolean {
  const rows = lengthOf(dataset, 'time');
  if (rows < 2 || needed.some((name) => lengthOf(dataset, name) !== rows)) return false;
  if (dataset?.variables.latitude === undefined) return true;
  const bands = lengthOf(dataset, 'latitude');
  return (
    bands > 1 &&
    lengthOf(dataset, 'latitudeBounds') === 2 * bands &&
    lengthOf(dataset, 'solarLongitude') === rows &&
    neededByLatitude.every((name) => lengthOf(dataset, name) === rows * bands)
  );
}

/** 0 for what is not there or cannot be decoded. */
function lengthOf(dataset: Dataset | undefined, name: string): number {
  try {
    return dataset?.variables?.[name]?.data?.length ?? 0;
  } catch {
    return 0;
  }
}

/** One of these stands in the data block. */
interface Block {
  readonly result?: unknown;
  readonly tree?: unknown;
  readonly trace?: unknown;
  readonly grid?: unknown;
  readonly spread?: unknown;
}

/** Errors: PageError when the block is empty or is not JSON. */
export function parsed(text: string): Block {
  if (text.trim() === '') {
    throw new PageError('This page holds no run yet. `perilag run` writes a copy of it with the results inside.');
  }
  try {
    return fromPortableLazily<Block | null>(JSON.parse(text)) ?? {};
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

export function damaged(what: string): PageError {
  return new PageError(`This report is damaged: ${what}. Run the scenario again to write a new one.`);
}
